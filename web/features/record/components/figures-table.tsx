import { useState } from 'react'
import type { ResultValue } from '../../../../shared/schemas/record.ts'
import { howOf, sourceWords } from '../../../../shared/trial/how.ts'
import { RESULT_KEYS } from '../../../../shared/trial/result.ts'
import { counted, listed } from '../../../lib/words.ts'
import { Ink } from '../../../ui/ink.tsx'
import { PlusMinus } from '../../../ui/plus-minus.tsx'
import { FIGURE_GROUPS, missingByReason, shownFigure } from '../figure-groups.ts'
import { byHandCount, pictureOf, type Sources } from '../record-model.ts'
import { BudgetTable } from './budget-table.tsx'
import { Source } from './source.tsx'

const HEAD = 'label h-[30px] px-1 text-left font-normal'

/** Every figure of the run with its ±, how it is computed, and the readings it leads back to. */
export function FiguresTable({ sources }: { sources: Sources }) {
  const { results } = sources.record
  const missing = missingByReason(RESULT_KEYS.flatMap((key) => results[key] ?? []))
  const groups = FIGURE_GROUPS.map(({ says, keys }) => ({
    says,
    known: keys.flatMap((key) => results[key] ?? []).filter((r) => r.value !== null),
  })).filter((group) => group.known.length > 0)
  return (
    <section aria-labelledby="every-figure">
      <h2 id="every-figure" className="px-margin pt-3 pb-0.5 text-2">
        Every figure of this run
      </h2>
      <table className="w-full border-collapse text-left max-sm:block">
        <caption className="away">Results with U, k = 2</caption>
        <thead className="max-sm:hidden">
          <tr className="border-b-[1.5px] border-ink">
            <th scope="col" className={`${HEAD} pl-margin`}>
              figure, and how
            </th>
            <th scope="col" className={`${HEAD} text-right`}>
              value
            </th>
            <th scope="col" className={HEAD}>
              ±
            </th>
            <th scope="col" className={HEAD}>
              unit
            </th>
            <th scope="col" className={`${HEAD} pr-margin`}>
              leads back to
            </th>
          </tr>
        </thead>
        {groups.map(({ says, known }) => (
          <tbody key={says} className="max-sm:block">
            <tr className="border-b border-line max-sm:block">
              <th scope="rowgroup" colSpan={5} className="px-1 pt-1.5 pb-0.5 pl-margin font-[700] max-sm:block">
                {says}
              </th>
            </tr>
            {known.map((result) => (
              <FigureRow key={result.key} sources={sources} result={result} />
            ))}
          </tbody>
        ))}
      </table>
      {missing.length > 0 && (
        <div className="px-margin pt-2">
          <h3 className="pb-0.5 text-0">Not computed</h3>
          <dl className="border-t border-line">
            {missing.map(({ reason, labels }) => (
              <div key={reason} className="border-b border-feint py-0.5">
                <dt>{listed(labels)}</dt>
                <dd className="border-l-[3px] border-ink pl-1 text-graphite">{reason}</dd>
              </div>
            ))}
          </dl>
        </div>
      )}
    </section>
  )
}

function FigureRow({ sources, result }: { sources: Sources; result: ResultValue }) {
  const [open, setOpen] = useState(false)
  const { value, U } = shownFigure(result)
  const keys = result.from.filter((key) => sources.readings.has(key))
  const byHand = byHandCount(sources, keys)
  return (
    <>
      <tr
        className={`border-b border-feint max-sm:flex max-sm:flex-wrap max-sm:items-baseline max-sm:gap-x-1 max-sm:px-margin max-sm:py-1`}
      >
        <th
          scope="row"
          className="h-[30px] px-1 py-0.5 pl-margin leading-[20px] font-[600] max-sm:h-auto max-sm:basis-full max-sm:p-0"
        >
          {result.label}
          <span className="label block leading-[18px] font-normal" title={formulaWords(result)}>
            {howOf(result)}
          </span>
        </th>
        <td className="figures px-1 text-right whitespace-nowrap max-sm:p-0">{value}</td>
        <td className="px-1 whitespace-nowrap max-sm:p-0">
          <PlusMinus U={U} />
        </td>
        <td className="px-1 whitespace-nowrap max-sm:p-0">{result.unit}</td>
        <td className="px-1 pr-margin whitespace-nowrap max-sm:ml-auto max-sm:p-0">
          <span className="flex flex-wrap items-center gap-x-2 gap-y-0.5">
            <button
              type="button"
              className="word min-h-[24px] max-sm:min-h-[44px]"
              aria-expanded={open}
              aria-label={`${counted(keys.length, 'reading')} behind ${result.label}`}
              onClick={() => setOpen(!open)}
            >
              {counted(keys.length, 'reading')}
            </button>
            {byHand > 0 && <span className="label text-pen">{byHand} by a person</span>}
            <FirstInk sources={sources} keys={keys} />
          </span>
        </td>
      </tr>
      {open && (
        <tr className="border-b-[1.5px] border-ink bg-straw-pale max-sm:block">
          <td colSpan={5} className="px-margin py-1 max-sm:block">
            <Behind sources={sources} result={result} keys={keys} />
          </td>
        </tr>
      )}
    </>
  )
}

const formulaWords = ({ formula }: ResultValue): string => `formula ${formula}, from: ${sourceWords(formula)}`

/** How the figure was computed, and each reading it stands on. */
function Behind({ sources, result, keys }: { sources: Sources; result: ResultValue; keys: readonly string[] }) {
  return (
    <>
      <p>
        <strong>{result.label}</strong>: {howOf(result)}{' '}
        <span className="label">
          ({formulaWords(result)}; formulas {sources.record.formulaVersion})
        </span>
      </p>
      <ul className="grid grid-cols-2 gap-x-3 max-xl:grid-cols-1">
        {keys.map((key) => (
          <Source key={key} sources={sources} reading={key} />
        ))}
      </ul>
      <BudgetTable result={result} says={`Uncertainty budget of ${result.label}, k = ${result.k}`} />
      {result.assumes.length > 0 && <p className="label pt-0.5">Taken for granted: {result.assumes.join('; ')}.</p>}
    </>
  )
}

const CROPS = 3

/** The first ink of a figure stands in its row. */
function FirstInk({ sources, keys }: { sources: Sources; keys: readonly string[] }) {
  const shown = keys.flatMap((key) => {
    const cell = sources.cells.get(key)
    const picture = pictureOf(sources, key)
    return cell && picture ? [{ cell, picture }] : []
  })
  if (shown.length === 0) return null
  return (
    <span className="ml-auto flex shrink-0 gap-0.5 max-xl:hidden" aria-hidden="true">
      {shown.slice(0, CROPS).map(({ cell, picture }) => (
        <Ink key={cell.key} layout={sources.layout} cell={cell} picture={picture} scale={2.2} around_mm={0.6} />
      ))}
    </span>
  )
}
