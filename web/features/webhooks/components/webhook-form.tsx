import { zodResolver } from '@hookform/resolvers/zod'
import { useEffect } from 'react'
import { useForm } from 'react-hook-form'
import { type CreatedWebhook, type SaveWebhook, saveWebhookSchema, WEBHOOK_EVENTS } from '../../../../shared/schemas/webhook.ts'
import { plainIssue } from '../../../lib/plain-issue.ts'
import { Field } from '../../../ui/field.tsx'
import { FormFoot } from '../../../ui/form-foot.tsx'
import { TickList } from '../../../ui/tick-list.tsx'
import { useMakeWebhook } from '../webhooks.queries.ts'

const WORDS = {
  'record.entered': 'a sheet is entered as a new record',
  'record.changed': 'a record is challenged, or gets a further version',
} as const
const TICKS = WEBHOOK_EVENTS.map((value) => ({ value, words: `${value}: ${WORDS[value]}` }))

export function WebhookForm({ onMade, onLeave }: { onMade: (webhook: CreatedWebhook) => void; onLeave: () => void }) {
  const form = useForm<SaveWebhook>({
    resolver: zodResolver(saveWebhookSchema, { error: plainIssue } as never) as never,
    defaultValues: { url: '', events: [...WEBHOOK_EVENTS] },
  })
  const make = useMakeWebhook()
  const { errors } = form.formState
  const { setFocus } = form
  useEffect(() => setFocus('url'), [setFocus])
  return (
    <form
      noValidate
      className="border-b-[3px] border-double border-ink px-margin py-3"
      onSubmit={form.handleSubmit((input) => make.mutate(input, { onSuccess: onMade }))}
    >
      <h2 className="pb-1 text-3">A new webhook</h2>
      <div className="max-w-[720px] border-t-2 border-ink">
        <Field label="Address" type="url" hint="It begins with https." error={errors.url?.message} {...form.register('url')} />
        <TickList legend="It is told when" ticks={TICKS} error={errors.events?.message} field={form.register('events')} />
      </div>
      <FormFoot act={make} does="Make the webhook" onLeave={onLeave} />
    </form>
  )
}
