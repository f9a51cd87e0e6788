import type { ResultValue } from '../../../../shared/schemas/record.ts'
import { largestWords } from '../budget-words.ts'
import { budgetOf } from '../record-model.ts'

/** The parts of a figure's ±, largest first: what each is, its u, its share of u², and what to do first for a surer figure. */
export function BudgetTable({ result, says }: { result: ResultValue; says: string }) {
  const lines = budgetOf(result)
  if (result.u === null || lines.length === 0) return null
  const largest = largestWords(lines)
  return (
    <>
      <table className="w-full border-collapse text-left">
        <caption className="away">{says}</caption>
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
      {largest && <p className="pt-1 text-2 leading-[27px] font-[600]">{largest}</p>}
    </>
  )
}
