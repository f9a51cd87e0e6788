import { useQuery } from '@tanstack/react-query'
import { useSearchParams } from 'react-router-dom'
import { COMPARISON_FILTERS, FILTER_SEPARATOR } from '../../../shared/schemas/book-comparison.ts'
import { type Choices, choicesOf, compareQueries } from '../../features/compare/compare.queries.ts'
import { AnalysisTables } from '../../features/compare/components/analysis-tables.tsx'
import { ChoicesBar } from '../../features/compare/components/choices.tsx'
import { ClaimReasons, ClaimSentence } from '../../features/compare/components/claim.tsx'
import { ExclusionLog } from '../../features/compare/components/exclusion-log.tsx'
import { Legend, Plots } from '../../features/compare/components/plots.tsx'
import { RunsTable } from '../../features/compare/components/runs-table.tsx'
import { counted } from '../../lib/words.ts'
import { Page } from '../../ui/page.tsx'
import { EmptyState, ErrorState, Loading } from '../../ui/says.tsx'
import { OnlyFor } from './only-for.tsx'

export const Component = () => (
  <OnlyFor roles={['analyst', 'admin']} title="Compare" says="Comparisons are open to the analyst and the admin.">
    <ComparePage />
  </OnlyFor>
)

function ComparePage() {
  const [search, setSearch] = useSearchParams()
  const choices = choicesOf(search)
  const answer = useQuery(compareQueries.of(choices))
  const comparison = answer.data
  const change = (part: Partial<Choices>) => setSearch(searchOf({ ...choices, ...part }), { preventScrollReset: true })
  if (!comparison)
    return (
      <Page title="Compare">
        {answer.error ? (
          <ErrorState error={answer.error} again={() => answer.refetch()} />
        ) : (
          <Loading what="Comparing the runs" />
        )}
      </Page>
    )
  const { runs, analysis, whyNot, claim } = comparison
  const compared = runs.filter((run) => run.leftOut === null).length
  return (
    <Page
      title="Compare"
      over={`The one sentence ${compared === 1 ? 'this run allows' : `these ${counted(compared, 'run')} allow`}`}
      sentence={<ClaimSentence claim={claim} />}
      aside={<ClaimReasons claim={claim} />}
    >
      <ChoicesBar choices={choices} offered={comparison.choices} unit={comparison.unit} onChange={change} />
      {answer.error && <ErrorState error={answer.error} again={() => answer.refetch()} />}
      {runs.length === 0 && <EmptyState says="No run of the trial book fits these choices. Take a filter off." />}
      {analysis ? (
        <AnalysisTables comparison={comparison} analysis={analysis} />
      ) : (
        runs.length > 0 && <p className="max-w-[720px] px-margin py-2 text-2 leading-[27px]">No analysis: {whyNot}</p>
      )}
      {runs.length > 0 && (
        <>
          <div className="border-t border-line px-margin py-1">
            <Legend comparison={comparison} />
          </div>
          <Plots comparison={comparison} />
          <RunsTable comparison={comparison} />
        </>
      )}
      <ExclusionLog />
    </Page>
  )
}

/** Only what differs from the usual stands in the address. */
function searchOf({ figure, of, gap, filters }: Choices): URLSearchParams {
  const search = new URLSearchParams()
  if (figure !== 'l_per_ha') search.set('figure', figure)
  if (of !== 'tractor') search.set('of', of)
  if (gap !== '') search.set('gap', gap)
  for (const name of COMPARISON_FILTERS) if (filters[name].length > 0) search.set(name, filters[name].join(FILTER_SEPARATOR))
  return search
}
