import { useQuery } from '@tanstack/react-query'
import { Link } from 'react-router-dom'
import { paths } from '../../../lib/paths.ts'
import { ErrorNote, Loading } from '../../../ui/says.tsx'
import { sheetName } from '../sheet-words.ts'
import { mySheetQueries } from '../sheets.queries.ts'

/** The sheet that is answered: which it is, and what the desk asks. */
export function Question({ sheetId }: { sheetId: string }) {
  const sheet = useQuery(mySheetQueries.detail(sheetId))
  if (sheet.isPending) return <Loading what="Looking up the question" />
  if (sheet.error) {
    return (
      <div className="px-margin py-2">
        <ErrorNote error={sheet.error} kept="A photo sent here is kept for this sheet all the same." />
      </div>
    )
  }
  const { state, tractor, implement, runNumber, sentBackReason, reason } = sheet.data
  const what = [tractor, implement, runNumber ? `run ${runNumber}` : null].filter(Boolean).join(', ')
  const asked = state === 'sent back' ? sentBackReason : null
  return (
    <section aria-label="What is asked" className="border-b border-line bg-straw-pale px-margin py-2">
      <p>
        <Link className="word figures" to={paths.mySheet.to(sheetId)}>
          {sheetName(sheet.data, sheet.data.pages.at(-1)?.fileName)}
        </Link>{' '}
        {what}
      </p>
      {asked && <p className="text-3 leading-[28px] text-pen">“{asked}”</p>}
      {!asked && state === 'unreadable' && <p>{reason ?? 'It cannot be read: a new photo is needed.'}</p>}
      {!asked && state !== 'unreadable' && (
        <p>Nothing is asked of this sheet any more. A photo sent now goes to the desk with it.</p>
      )}
    </section>
  )
}
