import { zodResolver } from '@hookform/resolvers/zod'
import { useEffect } from 'react'
import { useForm } from 'react-hook-form'
import { type InviteUser, inviteUserSchema, ROLES } from '../../../../shared/schemas/user.ts'
import { plainIssue } from '../../../lib/plain-issue.ts'
import { Button } from '../../../ui/button.tsx'
import { Field, FieldChoice } from '../../../ui/field.tsx'
import { ErrorNote } from '../../../ui/says.tsx'
import { useInvite } from '../people.queries.ts'

/** Somebody new: they get a link by mail and set their own password. */
export function InviteForm({ onDone }: { onDone: () => void }) {
  const form = useForm<InviteUser>({
    resolver: zodResolver(inviteUserSchema, { error: plainIssue } as never) as never,
    defaultValues: { number: '' as never, name: '', email: '', role: 'demonstrator' },
  })
  const invite = useInvite()
  const { errors } = form.formState
  const { setFocus } = form
  useEffect(() => setFocus('name'), [setFocus])
  return (
    <form
      noValidate
      className="border-b-[3px] border-double border-ink px-margin py-3"
      onSubmit={form.handleSubmit((input) => invite.mutate(input, { onSuccess: onDone }))}
    >
      <h2 className="pb-1 text-3">Invite somebody</h2>
      <div className="grid grid-cols-2 items-start gap-x-6 border-t-2 border-ink max-lg:grid-cols-1">
        <Field label="Name" error={errors.name?.message} {...form.register('name')} />
        <Field label="E-mail" type="email" error={errors.email?.message} {...form.register('email')} />
        <Field
          label="Number"
          inputMode="numeric"
          hint="1 to 9999: what a demonstrator writes on a sheet."
          error={errors.number?.message}
          {...form.register('number')}
        />
        <FieldChoice label="Works as" options={ROLES.map((value) => ({ value, words: value }))} {...form.register('role')} />
      </div>
      {invite.error && <ErrorNote error={invite.error} kept="What you typed is kept here." />}
      <div className="mt-2 flex gap-3">
        <Button look="ink" type="submit" disabled={invite.isPending}>
          Send the invitation
        </Button>
        <Button look="word" onClick={onDone}>
          Leave it
        </Button>
      </div>
    </form>
  )
}
