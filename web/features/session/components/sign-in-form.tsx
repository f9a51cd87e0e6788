import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { signInSchema } from '../../../../shared/schemas/user.ts'
import { paths } from '../../../lib/paths.ts'
import { Button, ButtonLink } from '../../../ui/button.tsx'
import { Field } from '../../../ui/field.tsx'
import { ErrorNote } from '../../../ui/says.tsx'
import { useSignIn } from '../session.queries.ts'
import { PasswordField } from './password-field.tsx'

/** E-mail and password. What was typed stays when it is refused. */
export function SignInForm({ onDone }: { onDone: () => void }) {
  const form = useForm({ resolver: zodResolver(signInSchema), defaultValues: { email: '', password: '' } })
  const signIn = useSignIn()
  const { errors } = form.formState
  return (
    <form noValidate onSubmit={form.handleSubmit((input) => signIn.mutate(input, { onSuccess: onDone }))}>
      <div className="border-t-2 border-ink">
        <Field
          label="E-mail"
          type="email"
          autoComplete="username"
          autoCapitalize="none"
          spellCheck={false}
          className="min-h-[54px]"
          error={errors.email && 'An e-mail address is needed, such as name@place.example.'}
          {...form.register('email')}
        />
        <PasswordField
          label="Password"
          autoComplete="current-password"
          error={errors.password && 'The password is missing.'}
          {...form.register('password')}
        />
      </div>
      {signIn.error && (
        <div className="mt-2">
          <ErrorNote error={signIn.error} />
        </div>
      )}
      <div className="mt-4 flex flex-wrap items-center gap-x-4 gap-y-2">
        <Button look="ink" type="submit" className="min-h-[60px] px-5 max-sm:w-full" disabled={signIn.isPending}>
          {signIn.isPending ? 'Opening the book' : 'Open the book'}
        </Button>
        <ButtonLink look="word" to={paths.forgotten.to()}>
          Have a link sent instead
        </ButtonLink>
      </div>
    </form>
  )
}
