import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import type { CreatedWebhook } from '../../../shared/schemas/webhook.ts'
import { WebhookEntry } from '../../features/webhooks/components/webhook-entry.tsx'
import { WebhookForm } from '../../features/webhooks/components/webhook-form.tsx'
import { useRemoveWebhook, useSetWebhookState, webhookQueries } from '../../features/webhooks/webhooks.queries.ts'
import { counted } from '../../lib/words.ts'
import { Button } from '../../ui/button.tsx'
import { Page } from '../../ui/page.tsx'
import { EmptyState, ErrorNote, ErrorState, Loading } from '../../ui/says.tsx'
import { ShownOnce } from '../../ui/shown-once.tsx'
import { FOR_PROGRAMS, InterfaceNav, PROGRAMS_SHUT } from './interface-nav.tsx'
import { OnlyFor } from './only-for.tsx'

export const Component = () => (
  <OnlyFor roles={FOR_PROGRAMS} title="Webhooks" says={PROGRAMS_SHUT}>
    <WebhooksPage />
  </OnlyFor>
)

function WebhooksPage() {
  const [making, setMaking] = useState(false)
  const [made, setMade] = useState<CreatedWebhook | null>(null)
  const webhooks = useQuery(webhookQueries.list())
  const change = useSetWebhookState()
  const remove = useRemoveWebhook()
  const active = webhooks.data?.filter((hook) => hook.state === 'active').length ?? 0
  const said = webhooks.data
    ? `${counted(active, 'webhook')} of yours ${active === 1 ? 'is' : 'are'} told of the book.`
    : 'Your webhooks.'
  return (
    <Page
      title="Webhooks"
      over={<InterfaceNav />}
      sentence={said}
      aside={<Button onClick={() => setMaking(true)}>Make a webhook</Button>}
    >
      {making && (
        <WebhookForm
          onLeave={() => setMaking(false)}
          onMade={(webhook) => {
            setMade(webhook)
            setMaking(false)
          }}
        />
      )}
      {made && <ShownOnce what={`The secret of ${made.url}`} secret={made.secret} onDone={() => setMade(null)} />}
      {(change.error || remove.error) && (
        <div className="px-margin py-2">
          <ErrorNote error={change.error ?? remove.error} />
        </div>
      )}
      {webhooks.error && <ErrorState error={webhooks.error} again={() => webhooks.refetch()} />}
      {webhooks.isPending && <Loading what="Looking up your webhooks" />}
      {webhooks.data?.length === 0 && (
        <EmptyState says="You have no webhook yet. A webhook is told within seconds when a sheet is entered or a record changes; each message is signed (Standard Webhooks)." />
      )}
      <ul>
        {webhooks.data?.map((webhook) => (
          <WebhookEntry
            key={webhook.id}
            webhook={webhook}
            onState={({ id }, state) => change.mutate({ id, state })}
            onRemove={({ id }) => remove.mutate(id)}
          />
        ))}
      </ul>
    </Page>
  )
}
