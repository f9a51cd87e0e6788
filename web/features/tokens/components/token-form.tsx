import { zodResolver } from '@hookform/resolvers/zod'
import { useEffect } from 'react'
import { useForm } from 'react-hook-form'
import { type CreatedToken, type CreateToken, createTokenSchema, SCOPE_WORDS, SCOPES } from '../../../../shared/schemas/token.ts'
import { plainIssue } from '../../../lib/plain-issue.ts'
import { Field } from '../../../ui/field.tsx'
import { FormFoot } from '../../../ui/form-foot.tsx'
import { TickList } from '../../../ui/tick-list.tsx'
import { useMakeToken } from '../tokens.queries.ts'

const TICKS = SCOPES.map((value) => ({ value, words: `${value}: ${SCOPE_WORDS[value]}` }))

export function TokenForm({ onMade, onLeave }: { onMade: (token: CreatedToken) => void; onLeave: () => void }) {
  const form = useForm<CreateToken>({
    resolver: zodResolver(createTokenSchema, { error: plainIssue } as never) as never,
    defaultValues: { name: '', scopes: ['book'], days: 90 },
  })
  const make = useMakeToken()
  const { errors } = form.formState
  const { setFocus } = form
  useEffect(() => setFocus('name'), [setFocus])
  return (
    <form
      noValidate
      className="border-b-[3px] border-double border-ink px-margin py-3"
      onSubmit={form.handleSubmit((input) => make.mutate(input, { onSuccess: onMade }))}
    >
      <h2 className="pb-1 text-3">A new token</h2>
      <div className="max-w-[720px] border-t-2 border-ink">
        <Field
          label="What it is for"
          hint="The program or the machine that will use it."
          error={errors.name?.message}
          {...form.register('name')}
        />
        <Field
          label="Runs out after"
          unit="days"
          inputMode="numeric"
          hint="1 to 366."
          error={errors.days?.message}
          {...form.register('days')}
        />
        <TickList legend="It may" ticks={TICKS} error={errors.scopes?.message} field={form.register('scopes')} />
      </div>
      <FormFoot act={make} does="Make the token" onLeave={onLeave} />
    </form>
  )
}
