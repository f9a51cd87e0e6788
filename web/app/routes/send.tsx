import { useQuery } from '@tanstack/react-query'
import { Link, useSearchParams } from 'react-router-dom'
import type { Role } from '../../../shared/schemas/user.ts'
import { Question } from '../../features/sheets/components/question.tsx'
import { BeforeYouShoot } from '../../features/uploads/components/before-you-shoot.tsx'
import { NotYetSentList } from '../../features/uploads/components/not-yet-sent.tsx'
import { PickFiles } from '../../features/uploads/components/pick-files.tsx'
import { UploadList } from '../../features/uploads/components/upload-list.tsx'
import { outbox } from '../../features/uploads/outbox.ts'
import { justSentFirst } from '../../features/uploads/outcome.ts'
import { uploadQueries } from '../../features/uploads/uploads.queries.ts'
import { useOutbox } from '../../features/uploads/use-outbox.ts'
import { useMe } from '../../lib/me.ts'
import { paths } from '../../lib/paths.ts'
import { Page } from '../../ui/page.tsx'
import { EmptyState, ErrorState, Loading } from '../../ui/says.tsx'

export function Component() {
  const me = useMe()
  const forSheet = useSearchParams()[0].get('for')
  const uploads = useQuery(uploadQueries.list())
  const { answers } = useOutbox()
  const sheetPath = me.role === 'demonstrator' ? paths.mySheet.to : paths.deskSheet.to
  const shown = justSentFirst(uploads.data ?? [], answers)
  return (
    <Page title="Send sheets" sentence={sentenceFor(me.role, forSheet)}>
      {forSheet && <Question sheetId={forSheet} />}
      <PickFiles onFiles={(files) => void outbox.add(files, forSheet)} />
      <BeforeYouShoot />
      <NotYetSentList />
      <section aria-labelledby="came-of-them">
        <h2 id="came-of-them" className="px-margin pt-3 pb-1 text-2">
          What became of them
        </h2>
        {uploads.error && <ErrorState error={uploads.error} again={() => uploads.refetch()} />}
        {uploads.isPending && <Loading what="Looking up what was sent" />}
        {uploads.data && shown.length === 0 && (
          <EmptyState says="Nothing has been sent yet. Photograph a sheet, or choose a scan or a form." />
        )}
        <UploadList
          uploads={shown}
          sheetLink={({ id, code }) => (
            <Link className="word figures" to={sheetPath(id)}>
              {code}
            </Link>
          )}
        />
      </section>
    </Page>
  )
}

function sentenceFor(role: Role, forSheet: string | null): string {
  if (forSheet) return 'Answer the sheet that came back with a new photo.'
  return role === 'demonstrator' ? 'Photograph each sheet before you leave the field.' : 'Send photos, scans or filled forms.'
}
