import { formatValue } from '../../../../shared/layouts/cell-value.ts'
import { Ink } from '../../../ui/ink.tsx'
import { originWords, pictureOf, type Sources, valueWords } from '../record-model.ts'

/** One reading behind a figure: its ink where there is a picture, its value, and who stands behind it. */
export function Source({ sources, reading: key }: { sources: Sources; reading: string }) {
  const reading = sources.readings.get(key)
  const cell = sources.cells.get(key)
  if (!reading || !cell) return null
  const picture = pictureOf(sources, key)
  const person = reading.settlement !== null || reading.origin === 'person'
  const corrected = reading.settlement === 'corrected'
  return (
    <li className="flex flex-wrap items-center gap-x-2 border-b border-line py-0.5">
      {picture && (
        <a href={picture} target="_blank" rel="noreferrer" aria-label={`The page with ${cell.label}`}>
          <Ink layout={sources.layout} cell={cell} picture={picture} scale={2.6} />
        </a>
      )}
      <span>{cell.label}</span>
      <span className="figures whitespace-nowrap">
        {corrected && <s className="mr-1 font-normal text-graphite">{formatValue(cell, reading.readValue)}</s>}
        <span className={person ? 'text-pen' : ''}>{valueWords(sources, reading)}</span>
      </span>
      <span className="label">{originWords(sources, reading)}</span>
    </li>
  )
}
