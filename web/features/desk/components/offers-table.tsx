import { formatValue } from '../../../../shared/layouts/cell-value.ts'
import { KeyCap } from '../../../ui/foot.tsx'
import { judgeWith } from '../model/desk-view.ts'
import type { Offer, Proposal } from '../model/proposal.ts'
import { figureText, toldBy } from '../model/strip.ts'
import type { Desk } from '../use-desk.ts'

/** What may be taken: each with what the ink says, what the sums say, and what it makes of the result. */
export function OffersTable({ desk, proposal, onTake }: { desk: Desk; proposal: Proposal; onTake: (offer: Offer) => void }) {
  const { key, layout, view } = desk
  const cell = layout.cells.find((c) => c.key === key)
  if (!cell || !key || proposal.offers.length === 0) return null
  const told = toldBy(view.results, key)
  const rated = proposal.offers.some((o) => o.byInk !== null || o.withSums !== null)
  return (
    <table className="w-full border-collapse text-left">
      <caption className="away">Values that may be taken</caption>
      <thead>
        <tr className="label border-b-[1.5px] border-ink">
          <th className="w-[42px] font-normal" scope="col">
            <span className="away">key</span>
          </th>
          <th className="font-normal" scope="col">
            reading
          </th>
          {rated && (
            <>
              <th className="font-normal" scope="col">
                by the ink
              </th>
              <th className="font-normal" scope="col">
                with the sums
              </th>
            </>
          )}
          {told && (
            <th className="text-right font-normal" scope="col">
              {view.results[told].unit}
            </th>
          )}
        </tr>
      </thead>
      <tbody>
        {proposal.offers.map((offer, i) => (
          <tr key={String(offer.value)} className={`border-b border-feint ${offer === proposal.taken ? 'font-[700]' : ''}`}>
            <td className="py-0.5">{!desk.readOnly && <KeyCap>{i + 1}</KeyCap>}</td>
            <td>
              {desk.readOnly ? (
                <span className="figures text-3">{offer.words ?? formatValue(cell, offer.value)}</span>
              ) : (
                <button type="button" className="figures min-h-[36px] pr-1 text-3" onClick={() => onTake(offer)}>
                  {offer.words ?? formatValue(cell, offer.value)}
                </button>
              )}
            </td>
            {rated && (
              <>
                <td>
                  <Share share={offer.byInk} />
                </td>
                <td>
                  <Share share={offer.withSums} straw />
                </td>
              </>
            )}
            {told && (
              <td className="figures text-right">{figureText(judgeWith(view, layout, key, offer.value).results[told])}</td>
            )}
          </tr>
        ))}
      </tbody>
    </table>
  )
}

const BAR_PX = 54

function Share({ share, straw = false }: { share: Offer['byInk']; straw?: boolean }) {
  if (share === null) return <span className="text-graphite">–</span>
  const percent = Math.round(share * 100)
  return (
    <span className="figures inline-flex items-center gap-1 text-[14px] whitespace-nowrap">
      <svg aria-hidden="true" width={BAR_PX} height="12" stroke="var(--ink)">
        <path d={`M0 11.5H${BAR_PX}`} stroke="var(--line)" />
        <rect
          x="0.6"
          y="1"
          width={Math.max(1, share * (BAR_PX - 2))}
          height="10"
          fill={straw ? 'var(--straw)' : 'none'}
          strokeWidth="1.2"
        />
      </svg>
      {percent} %
    </span>
  )
}
