import { roundByUncertainty } from '../../../../shared/trial/format.ts'
import { type BudgetLine, budgetOf, type Sources } from '../record-model.ts'

/** What would make a part smaller, in the field. */
const SMALLER: Record<string, string> = {
  'reading the jar': 'A jar with finer marks, or refilling it to the same line, makes it smaller.',
  'edge of the plot': 'A larger plot makes it smaller.',
  'filling the jug': 'Fewer top-ups, or a jug with finer marks, make it smaller.',
}

/** The variance, in one sentence: what to do first for a surer figure. */
function LargestPart({ lines }: { lines: readonly BudgetLine[] }) {
  const [most] = [...lines].sort((a, b) => b.share - a.share)
  if (!most || most.share < 0.4) return null
  return (
    <p className="pt-1 text-2 leading-[27px] font-[600]">
      {Math.round(most.share * 100)} % of the variance is {most.name}. {SMALLER[most.name]}
    </p>
  )
}

/** Which part of the ± is the jar, which the edge of the plot. */
export function Budget({ sources }: { sources: Sources }) {
  const result = sources.record.results.l_per_ha
  const lines = budgetOf(result)
  if (!result || result.value === null || result.u === null || lines.length === 0) return null
  const value = result.value
  return (
    <section aria-labelledby="budget" className="px-margin pt-3">
      <h2 id="budget" className="pb-1 text-2">
        Where the ± of {roundByUncertainty(value, result.U).value} comes from
      </h2>
      <table className="w-full border-collapse text-left">
        <caption className="away">Uncertainty budget of litres a hectare, largest part first</caption>
        <thead>
          <tr className="label border-b-[1.5px] border-ink">
            <th scope="col" className="font-normal">
              source
            </th>
            <th scope="col" className="text-right font-normal">
              u, {result.unit}
            </th>
            <th scope="col" className="pl-2 font-normal" colSpan={2}>
              share of the variance
            </th>
          </tr>
        </thead>
        <tbody>
          {lines.map(({ name, u, share }) => (
            <tr key={name} className="border-b border-feint">
              <th scope="row" className="py-0.5 font-normal">
                {name}
              </th>
              <td className="figures text-right">{u.toPrecision(2)}</td>
              <td className="w-[30%] pl-2">
                <span className="block h-[10px] border border-ink bg-straw" style={{ width: `${Math.max(1.5, share * 100)}%` }} />
              </td>
              <td className="figures w-[58px] text-right">{share >= 0.01 ? `${Math.round(share * 100)} %` : '< 1 %'}</td>
            </tr>
          ))}
        </tbody>
        <tfoot className="double-under border-t border-ink font-[700]">
          <tr>
            <th scope="row">together, u</th>
            <td className="figures text-right">{result.u.toPrecision(3)}</td>
            <td colSpan={2} className="pl-2">
              U = {result.k} u = {result.U?.toPrecision(2)} {result.unit}
            </td>
          </tr>
        </tfoot>
      </table>
      <LargestPart lines={lines} />
    </section>
  )
}
