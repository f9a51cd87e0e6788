import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { requestResetSchema } from '../../../../shared/schemas/user.ts'
import { paths } from '../../../lib/paths.ts'
import { Button, ButtonLink } from '../../../ui/button.tsx'
import { Field } from '../../../ui/field.tsx'
import { ErrorNote } from '../../../ui/says.tsx'
import { useRequestLink } from '../session.queries.ts'

/** Asks for a one-time link. The answer is the same whether the address is known or not. */
export function RequestLinkForm() {
  const form = useForm({ resolver: zodResolver(requestResetSchema), defaultValues: { email: '' } })
  const request = useRequestLink()
  if (request.isSuccess) {
    return (
      <div role="status">
        <p className="text-2">
          If <span className="figures text-pen">{form.getValues('email')}</span> is known here, a link is on its way. It works
          once, and for one hour.
        </p>
        <ButtonLink look="word" to={paths.signIn.to()} className="mt-3">
          Back to the sign-in
        </ButtonLink>
      </div>
    )
  }
  return (
    <form noValidate onSubmit={form.handleSubmit((input) => request.mutate(input))}>
      <div className="border-t-2 border-ink">
        <Field
          label="E-mail"
          type="email"
          autoComplete="username"
          className="min-h-[54px]"
          error={form.formState.errors.email && 'An e-mail address is needed, such as name@place.example.'}
          {...form.register('email')}
        />
      </div>
      {request.error && (
        <div className="mt-2">
          <ErrorNote error={request.error} />
        </div>
      )}
      <div className="mt-4 flex flex-wrap items-center gap-x-4 gap-y-2">
        <Button look="ink" type="submit" className="min-h-[60px] px-5" disabled={request.isPending}>
          Send the link
        </Button>
        <ButtonLink look="word" to={paths.signIn.to()}>
          Back to the sign-in
        </ButtonLink>
      </div>
    </form>
  )
}
