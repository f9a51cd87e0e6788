import { useQuery } from '@tanstack/react-query'
import { useMemo } from 'react'
import type { Upload } from '../../../shared/schemas/upload.ts'
import { MySheetList } from '../../features/sheets/components/my-sheet-list.tsx'
import { wantsAnswer } from '../../features/sheets/sheet-words.ts'
import { mySheetQueries } from '../../features/sheets/sheets.queries.ts'
import { uploadQueries } from '../../features/uploads/uploads.queries.ts'
import { paths } from '../../lib/paths.ts'
import { counted } from '../../lib/words.ts'
import { ButtonLink } from '../../ui/button.tsx'
import { Page } from '../../ui/page.tsx'
import { EmptyState, ErrorState, Loading } from '../../ui/says.tsx'

export function Component() {
  const list = useQuery(mySheetQueries.list())
  const uploads = useQuery(uploadQueries.list())
  const fileNames = useMemo(() => fileNamesOf(uploads.data ?? []), [uploads.data])
  const rows = list.data?.sheets ?? []
  const asked = rows.filter((row) => wantsAnswer(row.state))
  const others = rows.filter((row) => !wantsAnswer(row.state))
  return (
    <Page title="My sheets" sentence={list.data ? sentenceOf(rows.length, asked.length) : 'My sheets'}>
      {list.error && <ErrorState error={list.error} again={() => list.refetch()} />}
      {list.isPending && <Loading what="Looking up your sheets" />}
      {list.data && rows.length === 0 && (
        <EmptyState
          says="None of your sheets has arrived yet."
          next={<ButtonLink to={paths.send.to()}>Send sheets</ButtonLink>}
        />
      )}
      {asked.length > 0 && <Group says="These wait for you" rows={asked} fileNames={fileNames} />}
      {others.length > 0 && <Group says={asked.length > 0 ? 'The others' : 'All of them'} rows={others} fileNames={fileNames} />}
    </Page>
  )
}

const sentenceOf = (all: number, asked: number) =>
  asked > 0
    ? `${counted(asked, 'sheet')} ${asked === 1 ? 'waits' : 'wait'} for your answer.`
    : `${counted(all, 'sheet')}, and none waits for you.`

/** The file each sheet came in last, for sheets that have no other name. */
const fileNamesOf = (uploads: readonly Upload[]) =>
  new Map(
    uploads
      .toReversed()
      .flatMap(({ fileName, pages }) => pages.flatMap(({ sheet }) => (sheet ? [[sheet.id, fileName] as const] : []))),
  )

function Group({ says, ...list }: { says: string } & Parameters<typeof MySheetList>[0]) {
  return (
    <section>
      <h2 className="px-margin pt-3 pb-1 text-2">{says}</h2>
      <MySheetList {...list} />
    </section>
  )
}
