import type { ReactNode } from 'react'
import type { Told, ToldFigure } from '../../../../shared/trial/told.ts'
import { Knot } from './knot.tsx'

interface ReadOutProps {
  told: Told
  /** Tractor and implement. */
  what: string
  /** Place, day, run. */
  where: string
  /** Whether anything may still change the figure, in words. */
  standing: { firm: boolean; words: string }
  back: ReactNode
}

/** One screen for whoever speaks to the audience: the figure first, to be read from across a field; then what to say. */
export function ReadOut({ told, what, where, standing, back }: ReadOutProps) {
  return (
    <main id="work" tabIndex={-1} className="flex grow flex-col">
      <header className="flex flex-wrap items-baseline gap-x-4 gap-y-0.5 border-b-[3px] border-ink px-margin py-2 text-[clamp(18px,1.7vw,26px)] leading-[1.3]">
        <h1 className="font-[720]">{what}</h1>
        <p>{where}</p>
        <p className="sm:ml-auto">
          <span className={standing.firm ? 'border-b-[4px] border-double border-ink' : 'hatch-straw px-0.5'}>
            <span className={standing.firm ? '' : 'bg-straw-pale px-0.5'}>{standing.words}</span>
          </span>
        </p>
        {back}
      </header>
      {told.main ? <Figure main={told.main} firm={standing.firm} /> : <Refused why={told.refused} />}
      {told.sentence && (
        <p className="max-w-[26em] px-margin pb-4 text-[clamp(21.5px,3.2vw,56px)] leading-[1.25] font-[560]">“{told.sentence}”</p>
      )}
      <dl className="mt-auto grid grid-cols-2 border-t-[3px] border-ink bg-board text-[clamp(15px,1.4vw,22px)] sm:flex sm:flex-wrap">
        {told.beside.map((figure) => (
          <Beside key={figure.key} figure={figure} />
        ))}
        <div className="grow border-line px-margin py-1.5 max-sm:col-span-2 sm:border-r">
          <dt className="leading-[1.4]">not tested</dt>
          <dd className="text-[1.3em] leading-[1.3] font-[720]">{told.notTested.join(', ')}</dd>
        </div>
        <div className="bg-ink px-margin py-1.5 font-[720] text-white max-sm:col-span-2">
          <dt className="leading-[1.4]">Stay behind the line till the engine stops.</dt>
          <dd className="font-[430]">The maker’s manual and local rules come first.</dd>
        </div>
      </dl>
    </main>
  )
}

function Figure({ main, firm }: { main: NonNullable<Told['main']>; firm: boolean }) {
  return (
    <section aria-label="The figure" className="px-margin">
      <div className="flex flex-wrap items-center gap-x-[4vw]">
        <p className="text-[clamp(120px,27vw,420px)] leading-[0.98] font-[800] tracking-tight">{main.shown}</p>
        <div className="pb-3 text-[clamp(31px,5.6vw,110px)] leading-[1.12]">
          <p className="max-w-[7.5em] font-[760]">{main.words}</p>
          {main.shownU && (
            <p
              className={`mt-1 inline-block border-[3px] border-ink px-2 text-[0.62em] leading-[1.5] font-[720] ${firm ? 'bg-straw' : 'hatch-straw'}`}
            >
              <span className={firm ? '' : 'bg-straw-pale px-1'}>give or take {main.shownU}</span>
            </p>
          )}
        </div>
      </div>
      <Knot value={main.value} U={main.U} unit={main.unit} firm={firm} />
    </section>
  )
}

const Refused = ({ why }: { why: string | null }) => (
  <section aria-label="No figure" className="px-margin py-6">
    <p className="text-[clamp(44px,8vw,160px)] leading-[1.05] font-[800]">No figure yet</p>
    <p className="mt-3 max-w-[30em] border-l-[6px] border-ink pl-2 text-[clamp(21.5px,2.6vw,44px)] leading-[1.3]">{why}</p>
    <p className="mt-2 max-w-[34em] text-[clamp(18px,1.7vw,26px)] leading-[1.35]">
      Nothing is said about fuel until this is settled at the desk. What stands below was taped and timed.
    </p>
  </section>
)

const Beside = ({ figure: { label, value, U, unit } }: { figure: ToldFigure }) => (
  <div className="border-line px-margin py-1.5 max-sm:border-b max-sm:odd:border-r sm:border-r">
    <dt className="leading-[1.4]">{label}</dt>
    <dd className="text-[1.3em] leading-[1.3] font-[720] whitespace-nowrap">
      {value}
      {U && ` ± ${U}`} {unit}
    </dd>
  </div>
)
