import { zodResolver } from '@hookform/resolvers/zod'
import { type Resolver, useForm } from 'react-hook-form'
import { z } from 'zod'
import { plainIssue } from '../../../lib/plain-issue.ts'
import { Button } from '../../../ui/button.tsx'
import { Field } from '../../../ui/field.tsx'
import { ErrorNote } from '../../../ui/says.tsx'

const schema = z.object({ reason: z.string().trim().min(3).max(500), understood: z.boolean() })
type Answers = z.infer<typeof schema>
const resolver = zodResolver(schema as never, { error: plainIssue } as never) as unknown as Resolver<Answers>

interface WithdrawConsentProps {
  pending: boolean
  error: unknown
  onWithdraw: (reason: string) => void
}

/** Erases the farmer for good: says first what goes and what stays. */
export function WithdrawConsent({ pending, error, onWithdraw }: WithdrawConsentProps) {
  const form = useForm<Answers>({ resolver, defaultValues: { reason: '', understood: false } })
  const { errors } = form.formState
  return (
    <details className="py-1">
      <summary className="word inline-block">The farmer withdraws consent</summary>
      <form noValidate className="mt-1 max-w-[640px]" onSubmit={form.handleSubmit(({ reason }) => onWithdraw(reason))}>
        <p>
          Erased for good: name, phone and e-mail, and the place of name and signature in every stored picture of these sheets. A
          picture whose page was never found is removed whole.
        </p>
        <p className="py-1">
          Kept: the readings, the figures and the records, which name nobody. The trail says that consent was withdrawn, by whom
          and why.
        </p>
        <div className="border-t-2 border-ink">
          <Field
            label="Why, and how you know"
            autoComplete="off"
            hint="Such as: asked by phone on 3 December. Do not write the name here: this stays."
            error={errors.reason?.message}
            {...form.register('reason')}
          />
        </div>
        <label className="flex min-h-[44px] items-center gap-1">
          <input type="checkbox" className="size-[20px]" {...form.register('understood')} />
          This cannot be undone: I have made sure who asks.
        </label>
        {error !== null && error !== undefined && <ErrorNote error={error} />}
        <Button type="submit" className="mt-1" disabled={pending || !form.watch('understood')}>
          Erase the farmer
        </Button>
      </form>
    </details>
  )
}
