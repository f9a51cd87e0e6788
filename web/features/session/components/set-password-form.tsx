import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { z } from 'zod'
import { emailSchema, nameSchema, PASSWORD_MIN, passwordSchema } from '../../../../shared/schemas/user.ts'
import { ApiError } from '../../../lib/api-error.ts'
import { Button } from '../../../ui/button.tsx'
import { Field } from '../../../ui/field.tsx'
import { ErrorNote } from '../../../ui/says.tsx'
import { type OneTimeLink, useFirstAdmin, useSetPassword } from '../session.queries.ts'
import { PasswordField } from './password-field.tsx'

const schemaFor = (kind: OneTimeLink['kind']) =>
  kind === 'first admin'
    ? z.object({ password: passwordSchema, name: nameSchema, email: emailSchema })
    : z.object({ password: passwordSchema, name: z.string(), email: z.string() })

/** Uses a one-time link: an invitation, a reset, or the link that makes the first admin. */
export function SetPasswordForm({ token, link, onDone }: { token: string; link: OneTimeLink; onDone: () => void }) {
  const first = link.kind === 'first admin'
  const form = useForm({
    resolver: zodResolver(schemaFor(link.kind)),
    defaultValues: { password: '', name: link.name ?? '', email: link.email ?? '' },
  })
  const setPassword = useSetPassword()
  const makeAdmin = useFirstAdmin()
  const { errors } = form.formState
  const error = setPassword.error ?? makeAdmin.error
  const ofPassword = error instanceof ApiError ? error.issues.find((issue) => issue.path === 'password') : undefined
  const submit = form.handleSubmit((input) =>
    first
      ? makeAdmin.mutate({ token, ...input }, { onSuccess: onDone })
      : setPassword.mutate({ token, password: input.password }, { onSuccess: onDone }),
  )
  return (
    <form noValidate onSubmit={submit}>
      <div className="border-t-2 border-ink">
        {first && (
          <Field label="Name" autoComplete="name" error={errors.name && 'Your name is missing.'} {...form.register('name')} />
        )}
        <Field
          label="E-mail"
          type="email"
          autoComplete="username"
          readOnly={!first}
          error={errors.email && 'An e-mail address is needed, such as name@place.example.'}
          {...form.register('email')}
        />
        <PasswordField
          label="New password"
          autoComplete="new-password"
          hint={`At least ${PASSWORD_MIN} characters; a sentence does well. Pasting is fine.`}
          error={errors.password?.message ?? ofPassword?.message}
          {...form.register('password')}
        />
      </div>
      {error && !ofPassword && (
        <div className="mt-2">
          <ErrorNote error={error} />
        </div>
      )}
      <Button look="ink" type="submit" className="mt-4 min-h-[60px] px-5" disabled={setPassword.isPending || makeAdmin.isPending}>
        {first ? 'Begin the book' : 'Keep it, and open the book'}
      </Button>
    </form>
  )
}
