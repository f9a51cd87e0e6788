import { useState } from 'react'
import type { Webhook } from '../../../../shared/schemas/webhook.ts'
import { momentText } from '../../../lib/time.ts'
import { Button } from '../../../ui/button.tsx'
import { DeliveryLog } from './delivery-log.tsx'

interface WebhookEntryProps {
  webhook: Webhook
  onState: (webhook: Webhook, state: Webhook['state']) => void
  onRemove: (webhook: Webhook) => void
}

/** One webhook: where it goes, how it is, and what was sent. */
export function WebhookEntry({ webhook, onState, onRemove }: WebhookEntryProps) {
  const [logOpen, setLogOpen] = useState(false)
  const [removing, setRemoving] = useState(false)
  const { id, url, events, state, pausedBecause, lastDeliveredAt } = webhook
  const paused = state === 'paused'
  return (
    <li className="border-b border-line py-2">
      <div className="px-margin">
        <h2 className="figures text-2 break-all">{url}</h2>
        <p>
          {paused ? <strong>paused{pausedBecause ? `: ${pausedBecause}` : ''}</strong> : 'active'}, told of {events.join(' and ')}
          ; {lastDeliveredAt ? `last delivered ${momentText(lastDeliveredAt)}` : 'nothing delivered yet'}.
        </p>
        <div className="mt-1 flex flex-wrap gap-x-3">
          <Button look="word" aria-expanded={logOpen} onClick={() => setLogOpen(!logOpen)}>
            {logOpen ? 'close the log' : 'what was sent'}
          </Button>
          <Button look="word" onClick={() => onState(webhook, paused ? 'active' : 'paused')}>
            {paused ? 'take up again' : 'pause'}
          </Button>
          {removing ? (
            <Button look="word" onClick={() => onRemove(webhook)}>
              remove it with its log: yes
            </Button>
          ) : (
            <Button look="word" onClick={() => setRemoving(true)}>
              remove
            </Button>
          )}
        </div>
      </div>
      {logOpen && <DeliveryLog id={id} />}
    </li>
  )
}
