/** The same sheet photographed more than once: of each cell the surest reading, and a doubt where sure readings differ. */
import type { Candidate, Value } from '../../../shared/schemas/sheet.ts'
import type { ReadReading } from './page-outcome.ts'

export interface PictureReadings {
  pageId: string
  fileName: string
  readings: readonly ReadReading[]
}

export interface BestReading extends ReadReading {
  /** The page whose picture it is taken from. */
  pageId: string
}

interface Seen {
  reading: ReadReading
  picture: PictureReadings
}

/** The reader's rule for a box that looks crossed out or written over. */
const CROSSED_OUT = 'R01'
export const PICTURES_DIFFER = 'R09'

/** By key, from all pictures of one ink, oldest first. Pictures of the same ink are no independent witnesses: doubts never add up to a clear reading. */
export function bestOfPictures(pictures: readonly PictureReadings[]): Map<string, BestReading> {
  const byKey = new Map<string, Seen[]>()
  for (const picture of pictures) {
    for (const reading of picture.readings) byKey.set(reading.key, [...(byKey.get(reading.key) ?? []), { reading, picture }])
  }
  return new Map([...byKey].map(([key, seen]) => [key, bestOf(seen)]))
}

function bestOf(seen: readonly Seen[]): BestReading {
  const clear = seen.filter(({ reading }) => reading.state === 'clear')
  const values = new Map(clear.map((one) => [one.reading.value, one]))
  if (values.size > 1) return differing([...values.values()])
  const crossedOut = seen.find(({ reading }) => reading.reasons.some(({ rule }) => rule === CROSSED_OUT))
  const best = surest(crossedOut ? [crossedOut] : clear.length > 0 ? clear : seen)
  const { reading, picture } = best
  if (reading.state === 'clear') return { ...reading, pageId: picture.pageId }
  return { ...reading, candidates: mergeCandidates(seen), pageId: picture.pageId }
}

function differing(seen: readonly Seen[]): BestReading {
  const { reading, picture } = surest(seen)
  const said = seen.map(({ reading: { value }, picture: { fileName } }) => `${words(value)} in ${fileName}`)
  const text = `The pictures of this sheet show different values: ${said.join(', ')}.`
  const reasons = [{ rule: PICTURES_DIFFER, text, cells: [reading.key] }]
  return { ...reading, state: 'in doubt', candidates: mergeCandidates(seen), reasons, pageId: picture.pageId }
}

const words = (value: Value) =>
  value === null ? 'blank' : value === true ? 'ticked' : value === false ? 'not ticked' : String(value)

const sureness = ({ reading: { candidates, value } }: Seen) => candidates.find((c) => c.value === value)?.p ?? 0
/** The later one where two are equally sure. */
const surest = (seen: readonly Seen[]): Seen => seen.reduce((best, one) => (sureness(one) >= sureness(best) ? one : best))

/** Every value some picture offers, with the best chance any picture gives it. */
function mergeCandidates(seen: readonly Seen[]): Candidate[] {
  const best = new Map<Value, Candidate>()
  for (const candidate of seen.flatMap(({ reading }) => reading.candidates)) {
    const before = best.get(candidate.value)
    if (!before || candidate.p > before.p) best.set(candidate.value, candidate)
  }
  return [...best.values()].sort((a, b) => b.p - a.p)
}
