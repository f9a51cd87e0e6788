import type { ReactNode } from 'react'
import type { Demonstration } from '../../../../shared/schemas/demonstration.ts'

/** Who holds the day, where and for whom. */
export function DayFacts({ day, mayKnowFarmer, children }: { day: Demonstration; mayKnowFarmer: boolean; children?: ReactNode }) {
  return (
    <section aria-labelledby="day" className="px-margin pt-3">
      <h2 id="day" className="pb-1 text-2">
        The day
      </h2>
      <dl className="border-t-[1.5px] border-ink">
        <Fact term="place" says={`${day.place.name} (${day.place.number}), ${day.place.district}`} />
        <Fact term="demonstrator" says={`${day.demonstrator.name} (${day.demonstrator.number})`} />
        <Fact term="driver" says={day.driver || 'not settled yet'} quiet={!day.driver} />
        {mayKnowFarmer && day.farmer && (
          <Fact term="farmer" says={[day.farmer.name, day.farmer.phone].filter(Boolean).join(', ')} />
        )}
        {mayKnowFarmer && !day.farmer && <Fact term="farmer" says="erased: consent was withdrawn" quiet />}
      </dl>
      {children}
    </section>
  )
}

const Fact = ({ term, says, quiet = false }: { term: string; says: string; quiet?: boolean }) => (
  <div className="grid grid-cols-[110px_1fr] border-b border-feint py-0.5">
    <dt className="label">{term}</dt>
    <dd className={quiet ? 'text-graphite' : ''}>{says}</dd>
  </div>
)
