/** From typed digits to the boxes of a comb: one in each box as form fields set them, or set as a word with its point. */
import { boxesOf } from '../../../shared/layouts/geometry.ts'
import type { CombCell } from '../../../shared/layouts/layout.ts'
import { BLANK, type BoxDist, CLASS_COUNT } from '../../../shared/reading/classes.ts'
import type { Glyphs } from './typed-glyphs.ts'
import type { TypedDigit } from './typed-line.ts'
import type { Strip } from './typed-strip.ts'

/** How the sheet's digits are set, in pixels of a strip. */
export interface Setting {
  height_px: number
  /** Their lower end. */
  low_px: number
  /** From digit to digit. */
  pitch_px: number
}

/** Digits further apart than this are set a box each, mm: boxes stand 5.6 mm apart, words closer. */
const BOXED_FROM_MM = 5
/** A boxed digit stands this near the middle of its box, mm. */
const NEAR_MIDDLE_MM = 1.8
/** A typed point widens the step between its neighbours by this much at least. */
const WIDE_STEP = 1.25

/** How often the text engine names the right digit, by its confidence. Measured on 1,800 typed digits: always; kept lower. */
const RIGHT_FROM = [
  { confidence: 85, right: 0.997 },
  { confidence: 60, right: 0.96 },
  { confidence: 0, right: 0.8 },
] as const
/** The net was trained on hands: this share of its word is spread over all digits. */
const NET_DOUBT = 0.03
const NOT_A_DIGIT = 1e-6

/** A digit that a printed mark has cut into: both readers may take what is left for another one. */
const CUT = 0.3

/** Chances of 0 to 9 from both readers; the text engine may have said nothing. */
export function digitChances(byText: TypedDigit | null, byNet: readonly number[], isCut: boolean): number[] {
  const right = byText ? RIGHT_FROM.find((step) => byText.confidence >= step.confidence)!.right : 0.1
  const both = byNet.map((p, digit) => {
    const said = !byText || byText.digit === digit ? right : (1 - right) / 9
    return ((1 - NET_DOUBT) * p + NET_DOUBT / 10) * said
  })
  const sum = both.reduce((a, b) => a + b, 0)
  return both.map((p) => (isCut ? CUT / 10 + ((1 - CUT) * p) / sum : p / sum))
}

const boxOf = (digits: readonly number[] | null): BoxDist =>
  Float32Array.from({ length: CLASS_COUNT }, (_, k) =>
    digits ? (k < 10 ? digits[k]! * (1 - 2 * NOT_A_DIGIT) : NOT_A_DIGIT) : k === BLANK ? 1 - 11 * NOT_A_DIGIT : NOT_A_DIGIT,
  )

export const blankBoxes = (cell: CombCell): BoxDist[] => boxesOf(cell).map(() => boxOf(null))

/** A distribution a box; null where it is not sure which digit belongs to which box. */
export function boxesTyped(
  cell: CombCell,
  strip: Strip,
  glyphs: Glyphs,
  chances: ReadonlyArray<readonly number[]>,
  setting: Setting,
): BoxDist[] | null {
  const boxed = setting.pitch_px >= BOXED_FROM_MM * strip.px_per_mm
  const at = boxed ? inBoxes(cell, strip, glyphs) : fromRight(cell, glyphs, setting)
  return at && boxesOf(cell).map((_, box) => boxOf(chances[at.indexOf(box)] ?? null))
}

/** The box of each digit. */
function inBoxes(cell: CombCell, strip: Strip, { digits }: Glyphs): number[] | null {
  const boxes = boxesOf(cell)
  const at = digits.map((g) => {
    const middle = strip.x + (g.left + g.right) / 2 / strip.px_per_mm
    return boxes.findIndex((b) => Math.abs(b.x + b.width / 2 - middle) <= NEAR_MIDDLE_MM)
  })
  return at.includes(-1) || new Set(at).size < at.length ? null : at
}

/** A word is taken only where its point stands where the comb has one: 15 in a comb of one decimal may be 15.0 or 1.5. */
function fromRight(cell: CombCell, glyphs: Glyphs, setting: Setting): number[] | null {
  const boxes = boxesOf(cell).length
  const { digits } = glyphs
  if (digits.length > boxes) return null
  const places = cell.format.includes('.') ? cell.format.length - cell.format.indexOf('.') - 1 : 0
  const point = pointOf(glyphs, setting)
  const fits =
    cell.kind === 'digits'
      ? point === (places === 0 ? null : places)
      : (digits.length >= boxes - 1 && cell.kind === 'time') || digits.length === boxes
  return fits ? digits.map((_, i) => boxes - digits.length + i) : null
}

/** How many digits stand behind the typed point: null without one, -1 where there seems to be more than one. */
function pointOf({ digits, marks }: Glyphs, { pitch_px }: Setting): number | null {
  const behind = new Set<number>()
  const middle = (i: number) => (digits[i]!.left + digits[i]!.right) / 2
  for (let i = 1; i < digits.length; i++) {
    const seen = marks.some((m) => m.left >= middle(i - 1) && m.right <= middle(i))
    if (seen || middle(i) - middle(i - 1) > WIDE_STEP * pitch_px) behind.add(digits.length - i)
  }
  return behind.size > 1 ? -1 : ([...behind][0] ?? null)
}
