import { useQuery } from '@tanstack/react-query'
import { useEffect } from 'react'
import { Link, useParams } from 'react-router-dom'
import { judgeSheet } from '../../../shared/checks/judge-sheet.ts'
import { findLayout } from '../../../shared/layouts/registry.ts'
import type { TrialRecord } from '../../../shared/schemas/record.ts'
import type { Sheet } from '../../../shared/schemas/sheet.ts'
import { factsSchema } from '../../../shared/trial/facts.ts'
import { toldOf } from '../../../shared/trial/told.ts'
import { bookQueries } from '../../features/book/book.queries.ts'
import { ReadOut } from '../../features/read-out/components/read-out.tsx'
import { mySheetQueries } from '../../features/sheets/sheets.queries.ts'
import { isNowhere } from '../../lib/api-error.ts'
import { paths } from '../../lib/paths.ts'
import { dateText } from '../../lib/time.ts'
import { counted } from '../../lib/words.ts'
import { ErrorState, Loading } from '../../ui/says.tsx'
import { NotFound } from './route-error.tsx'

/** A record's read-out, or, before it is entered, that of the demonstrator's own sheet. */
export function Component() {
  const { number, id } = useParams()
  useEffect(() => {
    document.title = 'Read-out · Sheafbook'
  }, [])
  return number ? <OfRecord number={Number(number)} /> : <OfSheet id={id ?? ''} />
}

function OfRecord({ number }: { number: number }) {
  const record = useQuery(bookQueries.detail(number, undefined))
  if (isNowhere(record.error)) return <NotFound />
  if (record.error) return <ErrorState error={record.error} again={() => record.refetch()} />
  if (!record.data) return <Loading what="Opening the record" />
  return <RecordReadOut record={record.data} />
}

const line = (...parts: Array<string | null | undefined>) => parts.filter(Boolean).join(', ')
const runWords = (run: { plot: string; number: number } | null) => (run ? `plot ${run.plot}, run ${run.number}` : null)

function RecordReadOut({ record }: { record: TrialRecord }) {
  const challenged = record.state === 'challenged'
  return (
    <ReadOut
      told={toldOf(record.results, record.implement.operation)}
      what={line(record.tractor.name, record.implement.name) || 'Tractor not known'}
      where={line(record.place.name, record.trialDate && dateText(record.trialDate), runWords(record.run))}
      standing={{
        firm: !challenged,
        words: challenged ? 'not firm: challenged, back at the desk' : 'firm: leaks, vent and sums checked',
      }}
      back={
        <Link className="word" to={paths.record.to(record.number)}>
          The record
        </Link>
      }
    />
  )
}

function OfSheet({ id }: { id: string }) {
  const sheet = useQuery(mySheetQueries.detail(id))
  if (isNowhere(sheet.error)) return <NotFound />
  if (sheet.error) return <ErrorState error={sheet.error} again={() => sheet.refetch()} />
  if (!sheet.data) return <Loading what="Looking up the sheet" />
  return <SheetReadOut sheet={sheet.data} />
}

/** Computed here by the same code as at the desk, from what stands on the sheet now. */
function SheetReadOut({ sheet }: { sheet: Sheet }) {
  const layout = sheet.layout ? findLayout(sheet.layout, sheet.layoutVersion ?? undefined) : null
  if (!layout) return <NotFound />
  const facts = factsSchema.parse(sheet.facts)
  const { results } = judgeSheet(layout, Object.fromEntries(sheet.readings.map((r) => [r.key, r.value])), facts)
  const run = sheet.runNumber ? `run ${sheet.runNumber}` : null
  return (
    <ReadOut
      told={toldOf(results, facts.operation ?? null)}
      what={line(sheet.tractor, sheet.implement) || 'Tractor not known yet'}
      where={line(sheet.place, sheet.trialDate && dateText(sheet.trialDate), run)}
      standing={
        sheet.openDoubts > 0
          ? { firm: false, words: `not firm yet: ${counted(sheet.openDoubts, 'doubt')} at the desk` }
          : { firm: true, words: 'firm: nothing on the sheet is in doubt' }
      }
      back={
        <Link className="word" to={paths.mySheet.to(sheet.id)}>
          The sheet
        </Link>
      }
    />
  )
}
