import { useQuery } from '@tanstack/react-query'
import { Link, useParams } from 'react-router-dom'
import type { Sheet } from '../../../shared/schemas/sheet.ts'
import { LeastBurn } from '../../features/demonstrations/components/least-burn.tsx'
import { hasPlot } from '../../features/demonstrations/plan-model.ts'
import { MySheetDetail } from '../../features/sheets/components/my-sheet-detail.tsx'
import { sheetName } from '../../features/sheets/sheet-words.ts'
import { mySheetQueries } from '../../features/sheets/sheets.queries.ts'
import { ApiError } from '../../lib/api-error.ts'
import { paths } from '../../lib/paths.ts'
import { registerQueries } from '../../lib/register-rows.ts'
import { Page } from '../../ui/page.tsx'
import { ErrorState, Loading } from '../../ui/says.tsx'
import { NotFound } from './route-error.tsx'

export function Component() {
  const { id = '' } = useParams()
  const sheet = useQuery(mySheetQueries.detail(id))
  if (sheet.error instanceof ApiError && sheet.error.status === 404) return <NotFound />
  if (sheet.error) return <ErrorState error={sheet.error} again={() => sheet.refetch()} />
  if (!sheet.data) return <Loading what="Looking up the sheet" />
  const { tractor, implement, runNumber } = sheet.data
  const name = sheetName(sheet.data, sheet.data.pages.at(-1)?.fileName)
  const what = [tractor, implement, runNumber ? `run ${runNumber}` : null].filter(Boolean).join(', ')
  return (
    <Page
      title={name}
      over={<span className={sheet.data.code ? 'figures' : ''}>{name}</span>}
      sentence={what || name}
      aside={
        <>
          {sheet.data.readings.length > 0 && (
            <Link className="word" to={paths.sheetReadOut.to(id)}>
              Read-out
            </Link>
          )}
          {sheet.data.recordNumber !== null && (
            <Link className="word" to={paths.record.to(sheet.data.recordNumber)}>
              Record and leaf
            </Link>
          )}
          <Link className="word" to={paths.mySheets.to()}>
            My sheets
          </Link>
        </>
      }
    >
      <MySheetDetail sheet={sheet.data}>
        {sheet.data.recordNumber === null && <BurnWithItsKit sheet={sheet.data} />}
      </MySheetDetail>
    </Page>
  )
}

/** What to burn with the kit of a sheet that is not in the book yet: a run that is sent back may be worked again. */
function BurnWithItsKit({ sheet }: { sheet: Sheet }) {
  const number = sheet.readings.find((reading) => reading.key === 'kit_id')?.value
  const kits = useQuery(registerQueries.rows('kits')).data ?? []
  const perArea = hasPlot(sheet.layout ?? undefined)
  return <LeastBurn used={kits.filter((kit) => kit.number === number).map((kit) => ({ kit, perArea }))} />
}
