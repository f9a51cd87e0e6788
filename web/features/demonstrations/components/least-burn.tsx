import { listed } from '../../../lib/words.ts'
import { burnTables, type UsedKit } from '../plan-model.ts'

/** On the phone during the run: how much must be burned before the figure says something, in marks of the kit's own jar. */
export function LeastBurn({ used }: { used: readonly UsedKit[] }) {
  if (used.length === 0) return null
  const tables = burnTables(used)
  return (
    <section aria-labelledby="least-burn" className="pt-3">
      <h2 id="least-burn" className="pb-0.5 text-2">
        Burn at least
      </h2>
      {tables.map(({ kits, jarMark_ml, lines }) => (
        <table key={kits[0]} className="mb-1 w-full max-w-[560px] border-collapse text-left">
          <caption className="label py-0.5 text-left">
            {kits.length === 1 ? 'kit' : 'kits'} {listed(kits.map(String))}, jar marked each {jarMark_ml} mL, one top-up
          </caption>
          <thead>
            <tr className="label border-b-[1.5px] border-ink">
              <th scope="col" className="font-normal">
                for
              </th>
              <th scope="col" className="text-right font-normal">
                mL
              </th>
              <th scope="col" className="text-right font-normal">
                jar marks
              </th>
            </tr>
          </thead>
          <tbody>
            {lines.map(({ says, least_ml, marks }) => (
              <tr key={says} className="border-b border-feint">
                <th scope="row" className="py-0.5 font-normal">
                  {says}
                </th>
                <td className="figures text-right">{least_ml ?? 'never'}</td>
                <td className="figures text-right">{marks ?? '–'}</td>
              </tr>
            ))}
          </tbody>
        </table>
      ))}
      <p className="label">
        {tables.some((table) => table.perArea) && 'L/ha: with the area known to 0.6 %, as a plot of 60 × 45 m is. '}
        Never: no amount is enough.
      </p>
    </section>
  )
}
