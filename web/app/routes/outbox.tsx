import { useQuery } from '@tanstack/react-query'
import type { Mail } from '../../../shared/schemas/mail.ts'
import { mailQueries } from '../../features/outbox/outbox.queries.ts'
import { momentText } from '../../lib/time.ts'
import { counted } from '../../lib/words.ts'
import { Page } from '../../ui/page.tsx'
import { EmptyState, ErrorState, Loading } from '../../ui/says.tsx'
import { ADMIN, OnlyFor } from './only-for.tsx'

export const Component = () => (
  <OnlyFor roles={ADMIN} title="Outbox" says="The outbox is open to the admin.">
    <OutboxPage />
  </OnlyFor>
)

function OutboxPage() {
  const mails = useQuery(mailQueries.list())
  const waiting = mails.data?.filter((m) => m.state === 'queued').length ?? 0
  const failed = mails.data?.filter((m) => m.state === 'failed').length ?? 0
  const said = mails.data?.length
    ? `${counted(mails.data.length, 'mail')} written${waiting ? `, ${waiting} on the way` : ''}${failed ? `, ${failed} not delivered` : ''}.`
    : 'Mails that were written.'
  return (
    <Page title="Outbox" sentence={said}>
      {mails.error && <ErrorState error={mails.error} again={() => mails.refetch()} />}
      {mails.isPending && <Loading what="Opening the outbox" />}
      {mails.data?.length === 0 && (
        <EmptyState says="Nothing has been written yet. Invitations and sheets sent back go out by mail." />
      )}
      <ul>
        {mails.data?.map((mail) => (
          <MailLine key={mail.id} mail={mail} />
        ))}
      </ul>
    </Page>
  )
}

const STATES = { queued: 'on the way', sent: 'sent', failed: 'not delivered' } as const

const MailLine = ({ mail }: { mail: Mail }) => (
  <li className="border-b border-feint px-margin py-1">
    <details>
      <summary className="grid max-sm:min-h-[44px] cursor-pointer grid-cols-[120px_110px_240px_1fr] gap-x-2 max-lg:block">
        <span className="figures text-[13.5px] font-normal">{momentText(mail.createdAt)}</span>{' '}
        <span className={mail.state === 'failed' ? 'font-[700]' : 'text-graphite'}>{STATES[mail.state]}</span>{' '}
        <span>{mail.to}</span> <strong>{mail.subject}</strong>
      </summary>
      {mail.error && <p className="border-l-[3px] border-ink pl-1">{mail.error}</p>}
      <p className="max-w-[720px] py-1 whitespace-pre-wrap">{mail.text}</p>
    </details>
  </li>
)
