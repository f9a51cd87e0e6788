/** Why a picture cannot be read, and what to do better: said to the person who holds the phone. */
export const TAKE_AGAIN_CODES = [
  'no sheet',
  'corner missing',
  'too blurred',
  'too dark',
  'glare',
  'too small',
  'two sheets',
  'unknown layout',
  'covered',
  'black and white',
  'cannot place',
] as const

export type TakeAgainCode = (typeof TAKE_AGAIN_CODES)[number]

export interface TakeAgain {
  code: TakeAgainCode
  advice: string
}

export const CORNER_NAMES = ['upper left', 'upper right', 'lower right', 'lower left'] as const

const ADVICE: Record<Exclude<TakeAgainCode, 'corner missing' | 'covered'>, string> = {
  'no sheet':
    'No sheet was found in the picture. Lay the sheet flat and let it fill the picture, with all four corner codes inside it.',
  'too blurred': 'The picture is blurred. Hold the phone still with both hands and touch the sheet on the screen to focus.',
  'too dark': 'The picture is too dark. Turn the sheet to the light, or switch the lamp on.',
  glare: 'Light is mirrored on the paper. Tilt the phone or turn the sheet until the bright patch is gone.',
  'too small': 'The sheet is too small in the picture. Move closer until it fills the picture.',
  'two sheets': 'Two sheets are in the picture. Take one picture of each sheet.',
  'unknown layout': 'This kind of sheet is not known here. Check that it was printed by this trial book.',
  'black and white':
    'The page was scanned or copied in black and white only, and the pale boxes are lost. Scan it in grey or in colour.',
  'cannot place': 'The printed boxes could not be found. Lay the sheet flat, without folds, and take it from straight above.',
}

/** The same for a clerk, as the end of a sentence. */
const SHORT: Record<TakeAgainCode, string> = {
  'no sheet': 'no sheet was found in the picture',
  'corner missing': 'a corner of the sheet is missing or covered',
  'too blurred': 'the picture is blurred',
  'too dark': 'the picture is too dark',
  glare: 'light is mirrored on the paper',
  'too small': 'the sheet is too small in the picture',
  'two sheets': 'two sheets are in the picture',
  'unknown layout': 'this kind of sheet is not known',
  covered: 'a part of the sheet is covered or folded over',
  'black and white': 'the page was scanned in black and white only',
  'cannot place': 'the printed boxes are not where they must be',
}

/** null for a code that is not one of the reader's own. */
export const shortReasonOf = (code: string): string | null => (SHORT as Partial<Record<string, string>>)[code] ?? null

export const takeAgain = (code: keyof typeof ADVICE): TakeAgain => ({ code, advice: ADVICE[code] })

/** `corners`: 0 to 3 clockwise from the upper left; `outside`: whether they lie outside the picture, or are covered. */
export function cornersMissing(corners: readonly number[], outside: boolean): TakeAgain {
  const names = corners.map((corner) => CORNER_NAMES[corner]!)
  const one = names.length === 1
  const which = one ? `The ${names[0]} corner` : `The ${names.slice(0, -1).join(', ')} and ${names.at(-1)} corners`
  const verb = one ? 'is' : 'are'
  const advice = outside
    ? `${which} ${verb} outside the picture. Move the phone a hand ${directionTo(corners)}, or a little higher.`
    : `${which} cannot be read. Keep fingers, folds and shadows off the corner codes and take it again.`
  return { code: 'corner missing', advice }
}

/** Where something lies on the page, as shares of its width and height from the upper left. */
const thirdOf = (share: number): 0 | 1 | 2 => (share < 1 / 3 ? 0 : share < 2 / 3 ? 1 : 2)
const PLACES = [
  ['upper left', 'top', 'upper right'],
  ['left', 'middle', 'right'],
  ['lower left', 'bottom', 'lower right'],
] as const

/** Fields that lie together were not found: something lies on them, or the paper is folded over there. */
export function covered(across: number, down: number): TakeAgain {
  const place = PLACES[thirdOf(down)][thirdOf(across)]
  const advice = `The printed boxes at the ${place} of the sheet are covered. Take fingers and other things off, and fold the paper open.`
  return { code: 'covered', advice }
}

function directionTo(corners: readonly number[]): string {
  if (corners.every((c) => c === 0 || c === 3)) return 'to the left'
  if (corners.every((c) => c === 1 || c === 2)) return 'to the right'
  if (corners.every((c) => c < 2)) return 'towards the top of the sheet'
  return corners.every((c) => c > 1) ? 'towards the bottom of the sheet' : 'back'
}
