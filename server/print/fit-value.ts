/** A value of the typed block in the room its column has: in its own face, else in a narrower one, else cut in its middle. */
import type { Face } from './page.ts'
import type { PlanLine } from './sheet-pdf.ts'

export interface Setting {
  face: Face
  /** Points. */
  size: number
}

/** Mono reads best; what is too long for it is set as the labels are, in bold. */
export const VALUE_SETTINGS: readonly [Setting, Setting] = [
  { face: 'mono-bold', size: 7 },
  { face: 'bold', size: 6.6 },
]

/** @param widthOf width of a text in a setting, mm */
export function fitValue(
  { value, ends = { before: '', after: '' } }: Pick<PlanLine, 'value' | 'ends'>,
  room_mm: number,
  widthOf: (text: string, setting: Setting) => number,
): { text: string; setting: Setting } {
  const whole = VALUE_SETTINGS.find((setting) => widthOf(value, setting) <= room_mm)
  if (whole) return { text: value, setting: whole }
  const setting = VALUE_SETTINGS[1]
  const { before, after } = ends
  const middle = Array.from(value.slice(before.length, value.length - after.length))
  const cutTo = (kept: number) => `${before}${middle.slice(0, kept).join('').trimEnd()}…${after}`
  let kept = middle.length - 1
  while (kept > 0 && widthOf(cutTo(kept), setting) > room_mm) kept--
  return { text: cutTo(Math.max(0, kept)), setting }
}
