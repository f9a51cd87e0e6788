/** A table as text into observations: three of its columns, each value held to being what it says. */
import Papa from 'papaparse'
import type { Observation } from '../../../shared/compare/observations.ts'
import { UserError } from '../../../shared/errors.ts'
import type { LeftOut } from '../../../shared/schemas/comparison.ts'

export interface Columns {
  response: string
  treatment: string
  block: string | null
}

const NUMBER = /^[+-]?(\d+(\.\d*)?|\.\d+)(e[+-]?\d+)?$/i
/** How tables write that there is nothing: blank, or R's mark. */
const isMissing = (text: string) => text === '' || text === 'NA'
const MOST_SHOWN = 5

/**
 * Observations in the order of the file, named by their line; a line without value, treatment or block is listed and left out.
 * @throws UserError `invalid` for a column that is not there or there twice, a line that is cut short, or text among the numbers
 */
export function observationsOf(csv: string, columns: Columns): { observations: Observation[]; leftOut: LeftOut[] } {
  const { data } = Papa.parse<string[]>(csv.replace(/^\uFEFF/, ''), { skipEmptyLines: false })
  const header = (data[0] ?? []).map((name) => name.trim())
  const at = {
    response: placeOf(header, columns.response),
    treatment: placeOf(header, columns.treatment),
    block: columns.block === null ? null : placeOf(header, columns.block),
  }
  const observations: Observation[] = []
  const leftOut: LeftOut[] = []
  const texts: string[] = []
  data.slice(1).forEach((cells, i) => {
    if (cells.every((cell) => cell.trim() === '')) return
    const line = `line ${i + 2}`
    if (cells.length !== header.length)
      throw new UserError(
        'invalid',
        `${line[0]!.toUpperCase()}${line.slice(1)} has ${cells.length} columns, the header ${header.length}.`,
      )
    const read = (place: number) => cells[place]!.trim()
    const given = { response: read(at.response), treatment: read(at.treatment), block: at.block === null ? null : read(at.block) }
    const missing = (['response', 'treatment', 'block'] as const).find((name) => given[name] !== null && isMissing(given[name]))
    if (missing) leftOut.push({ id: line, reason: `no ${columns[missing]}` })
    else if (!NUMBER.test(given.response)) texts.push(`${line}: “${given.response}”`)
    else observations.push({ id: line, treatment: given.treatment, block: given.block, value: Number(given.response) })
  })
  if (texts.length > 0) throw notNumbers(columns.response, texts)
  return { observations, leftOut }
}

function placeOf(header: readonly string[], column: string): number {
  const places = header.flatMap((name, i) => (name === column ? [i] : []))
  if (places.length === 1) return places[0]!
  const why = places.length === 0 ? `There is no column “${column}”.` : `There are ${places.length} columns “${column}”.`
  throw new UserError('invalid', `${why} The file has: ${header.join(', ')}.`)
}

function notNumbers(column: string, texts: readonly string[]): UserError {
  const shown = texts.slice(0, MOST_SHOWN).join(', ')
  const more = texts.length > MOST_SHOWN ? `, and ${texts.length - MOST_SHOWN} more` : ''
  const comma = texts.some((text) => /“[+-]?\d+,\d+”/.test(text)) ? ' Write decimals with a point.' : ''
  return new UserError(
    'invalid',
    `Column “${column}” holds what is no number: ${shown}${more}.${comma} Leave a cell blank where there is no value.`,
  )
}
