import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { type InviteUser, inviteUserSchema, ROLES } from '../../../../shared/schemas/user.ts'
import { Button } from '../../../ui/button.tsx'
import { Field, FieldChoice } from '../../../ui/field.tsx'
import { ErrorNote } from '../../../ui/says.tsx'
import { useInvite } from '../people.queries.ts'

/** Somebody new: they get a link by mail and set their own password. */
export function InviteForm({ onDone }: { onDone: () => void }) {
  const form = useForm<InviteUser>({
    resolver: zodResolver(inviteUserSchema) as never,
    defaultValues: { number: '' as never, name: '', email: '', role: 'demonstrator' },
  })
  const invite = useInvite()
  const { errors } = form.formState
  return (
    <form
      noValidate
      className="max-w-[720px] px-margin py-3"
      onSubmit={form.handleSubmit((input) => invite.mutate(input, { onSuccess: onDone }))}
    >
      <h2 className="pb-1 text-3">Invite somebody</h2>
      <div className="border-t-2 border-ink">
        <Field label="Name" error={errors.name && 'A name is needed.'} {...form.register('name')} />
        <Field
          label="E-mail"
          type="email"
          error={errors.email && 'An e-mail address is needed, such as name@place.example.'}
          {...form.register('email')}
        />
        <Field
          label="Number"
          inputMode="numeric"
          hint="1 to 9999: what a demonstrator writes on a sheet."
          error={errors.number && 'A number from 1 to 9999.'}
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
