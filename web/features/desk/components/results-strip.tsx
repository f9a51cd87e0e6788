import { PlusMinus } from '../../../ui/plus-minus.tsx'
import type { StripFigure } from '../model/strip.ts'

interface ResultsStripProps {
  figures: readonly StripFigure[]
  /** What another value would make of them, by key, and how that value is called. */
  other: { words: string; figures: readonly StripFigure[] } | null
}

/** The figures this sheet stands for, at the foot; hatched while a doubt stands on them. */
export function ResultsStrip({ figures, other }: ResultsStripProps) {
  return (
    <section
      aria-label="Results as they stand"
      className="grid grid-cols-2 border-t-[3px] border-ink sm:grid-cols-3 xl:grid-cols-6"
    >
      {figures.map((figure) => (
        <div key={figure.key} className="border-l border-line px-2 py-1 first:border-l-0 max-sm:border-b">
          <p className="label flex min-h-[36px] flex-wrap content-start justify-between gap-x-2 leading-[18px]">
            <span>
              {figure.words}
              {figure.value !== null && !figure.firm && ', not firm yet'}
            </span>
            <OtherFigure
              figure={figure}
              other={other?.figures.find(({ key }) => key === figure.key) ?? null}
              words={other?.words ?? ''}
            />
          </p>
          {figure.value === null ? (
            <p className="border-l-[3px] border-ink pl-1 text-1 leading-[17px]">{figure.reason ?? 'No figure.'}</p>
          ) : (
            <p className="flex flex-wrap items-baseline gap-x-1">
              <span className="figures text-4">{figure.value}</span>
              <span>{figure.unit}</span>
              <PlusMinus U={figure.U} firm={figure.firm} />
            </p>
          )}
        </div>
      ))}
    </section>
  )
}

function OtherFigure({ figure, other, words }: { figure: StripFigure; other: StripFigure | null; words: string }) {
  if (!other || other.value === figure.value) return null
  return (
    <span>
      with <span className="figures">{words}</span>: <span className="figures">{other.value ?? 'none'}</span>
    </span>
  )
}
