import type { Layout } from '../../../../shared/layouts/layout.ts'
import { workOf } from '../../../../shared/layouts/registry.ts'

/** The section of the sheet whose ticks are the kit and safety checks. */
const BEFORE = 1

/** Cautions in short: what may hurt somebody, with the makers' manuals first. */
const CAUTIONS = [
  'The makers’ manuals, local rules and licensed practice come first; this list replaces none of them.',
  'Fuel lines are for somebody the maker or dealer has trained: engine off and cold, low-pressure side only. Never open an injection line.',
  'No smoke, no sparks; drain into a closed can; an extinguisher for fuel fires within reach. Returning fuel above 65 °C ends the run.',
  'Before anybody measures depth or clears soil: engine off, key out, implement on the ground.',
  'Everybody behind a marked line, nobody ahead of, behind or beside the working tractor. Whoever crosses it ends the run.',
  'Tyres are checked cold, against the maker’s load table; stand to the side while filling them.',
  'Before the road: tank lines back, jar off and capped, leaks checked again, and the sheet says who did it and when.',
] as const

/** What must be seen and ticked on each sheet before the first jar reading. `among`: how many kinds of sheet the day has. */
export function CheckList({ layout, among }: { layout: Layout; among: number }) {
  const heading = `checks-${layout.key}`
  const checks = layout.cells.filter((cell) => cell.section === BEFORE && cell.kind === 'tick')
  return (
    <section aria-labelledby={heading} className="px-margin py-3">
      <h2 id={heading} className="text-2">
        Before the first jar reading{among > 1 && `: ${workOf(layout)}`}
      </h2>
      <p className="label pb-1">Each sheet asks for these {checks.length} ticks; a figure without them does not count.</p>
      <ul className="grid grid-cols-2 gap-x-3 border-t-[1.5px] border-ink max-sm:grid-cols-1">
        {checks.map((cell) => (
          <li key={cell.key} className="flex items-center gap-1.5 border-b border-feint py-0.5 max-sm:text-2">
            <span aria-hidden="true" className="size-[14px] shrink-0 border-[1.5px] border-ink bg-leaf" />
            {cell.label}
          </li>
        ))}
      </ul>
    </section>
  )
}

/** What may hurt somebody: read aloud before the day begins. */
export function Cautions() {
  return (
    <section aria-labelledby="cautions" className="px-margin py-3">
      <h2 id="cautions" className="pb-1 text-2">
        What may hurt somebody
      </h2>
      <ul className="border-t-[1.5px] border-ink">
        {CAUTIONS.map((caution) => (
          <li key={caution} className="border-b border-feint py-0.5">
            {caution}
          </li>
        ))}
      </ul>
    </section>
  )
}
