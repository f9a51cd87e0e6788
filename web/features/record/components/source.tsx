import { Ink } from '../../../ui/ink.tsx'
import { originWords, pictureOf, type Sources, valueWords } from '../record-model.ts'

/** One reading behind a figure: its ink where there is a picture, its value, and who stands behind it. */
export function Source({ sources, reading: key }: { sources: Sources; reading: string }) {
  const reading = sources.readings.get(key)
  const cell = sources.cells.get(key)
  if (!reading || !cell) return null
  const picture = pictureOf(sources, key)
  const person = reading.settlement !== null || reading.origin === 'person'
  return (
    <li className="flex flex-wrap items-center gap-x-2 border-b border-feint py-1">
      {picture && (
        <a href={picture} target="_blank" rel="noreferrer" aria-label={`The page with ${cell.label}`}>
          <Ink layout={sources.layout} cell={cell} picture={picture} />
        </a>
      )}
      <span>{cell.label}</span>
      <span className={`figures ${person ? 'text-pen' : ''}`}>{valueWords(sources, reading)}</span>
      <span className="label">{originWords(sources, reading)}</span>
    </li>
  )
}
