import { roundByUncertainty } from '../../../../shared/trial/format.ts'
import { mainFigureOf, type Sources } from '../record-model.ts'
import { BudgetTable } from './budget-table.tsx'

/** Which part of the ± of the run's main figure is the jar, which the edge of the plot. Every other figure has its own in its row. */
export function Budget({ sources }: { sources: Sources }) {
  const result = mainFigureOf(sources.record)
  if (!result || result.value === null || result.u === null) return null
  return (
    <section aria-labelledby="budget" className="px-margin pt-3">
      <h2 id="budget" className="pb-1 text-2">
        Where the ± of {roundByUncertainty(result.value, result.U).value} comes from
      </h2>
      <BudgetTable result={result} says={`Uncertainty budget of ${result.label}, largest part first`} />
    </section>
  )
}
