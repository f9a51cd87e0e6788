import type { Kit } from '../../../../shared/schemas/register.ts'
import { burnLines } from '../plan-model.ts'

/** On the phone during the run: how much must be burned before the figure says something, in marks of the kit's own jar. */
export function LeastBurn({ kits }: { kits: readonly Kit[] }) {
  if (kits.length === 0) return null
  return (
    <section aria-labelledby="least-burn" className="pt-3">
      <h2 id="least-burn" className="pb-0.5 text-2">
        Burn at least
      </h2>
      {kits.map((kit) => (
        <table key={kit.id} className="mb-1 w-full max-w-[560px] border-collapse text-left">
          <caption className="label py-0.5 text-left">
            kit {kit.number}, jar marked each {kit.jarMark_ml} mL, one top-up
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
            {burnLines(kit).map(({ says, least_ml, marks }) => (
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
      <p className="label">L/ha: with the area known to 0.6 %, as a plot of 60 × 45 m is. Never: no amount is enough.</p>
    </section>
  )
}
