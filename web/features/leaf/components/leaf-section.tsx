import { useQuery } from '@tanstack/react-query'
import { Link } from 'react-router-dom'
import type { LeafStatus } from '../../../../shared/schemas/leaf.ts'
import { paths } from '../../../lib/paths.ts'
import { momentText } from '../../../lib/time.ts'
import { Button } from '../../../ui/button.tsx'
import { ErrorNote } from '../../../ui/says.tsx'
import { leafPath, leafQueries, useSendLeaf } from '../leaf.queries.ts'

interface LeafSectionProps {
  number: number
  version: number
  maySend: boolean
}

const STATE: Record<LeafStatus['sent'][number]['state'], string> = {
  queued: 'waits to go out',
  sent: 'sent',
  failed: 'did not go out',
}

/** The page the farmer takes home: to look at, to print, and to send once by mail. */
export function LeafSection({ number, version, maySend }: LeafSectionProps) {
  const status = useQuery(leafQueries.status(number))
  const send = useSendLeaf(number)
  return (
    <section aria-labelledby="leaf" className="px-margin py-2">
      <h2 id="leaf" className="border-b-[1.5px] border-ink text-2">
        The leaf
      </h2>
      <p className="py-1">
        <a className="word" href={leafPath(number, version)} download>
          The page for the farmer (PDF)
        </a>
      </p>
      <ul>
        {status.data?.sent.map((leaf) => (
          <li key={leaf.version} className="border-t border-feint py-0.5">
            version {leaf.version}: {STATE[leaf.state]}, {momentText(leaf.at)} by {leaf.by}
            {leaf.error && <span className="label block">{leaf.error}</span>}
          </li>
        ))}
      </ul>
      {maySend && status.data && (
        <div className="border-t border-feint py-1">
          {status.data.why ? (
            <p className="label">
              {status.data.why}{' '}
              {status.data.planId && (
                <Link className="word" to={paths.editDemonstration.to(status.data.planId)}>
                  Change the plan
                </Link>
              )}
            </p>
          ) : (
            <Button disabled={send.isPending} onClick={() => send.mutate()}>
              Send it to the farmer
            </Button>
          )}
          {send.error && <ErrorNote error={send.error} />}
        </div>
      )}
    </section>
  )
}
