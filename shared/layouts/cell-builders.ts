/** Short ways to write a layout's cells as data: section first, then key, label and place in millimetres. */
import type { AreaCell, ChoiceCell, CombCell, Need, TickCell } from './layout.ts'

export type CombOptions = Partial<Omit<CombCell, 'key' | 'label' | 'x' | 'y' | 'format' | 'section' | 'kind'>>

export const comb =
  (section: number, kind: CombCell['kind'] = 'digits') =>
  (key: string, label: string, x: number, y: number, format: string, options: CombOptions = {}): CombCell => ({
    kind,
    key,
    label,
    x,
    y,
    format,
    section,
    need: 'mandatory',
    unit: null,
    ...options,
  })

export const tick = (
  section: number,
  key: string,
  label: string,
  x: number,
  y: number,
  need: Need = 'mandatory',
  shown = true,
): TickCell => ({
  kind: 'tick',
  key,
  label,
  x,
  y,
  need,
  section,
  ...(shown ? {} : { labelShown: false as const }),
})

export const choice = (
  section: number,
  key: string,
  label: string,
  said: string,
  need: Need,
  labelAt: ChoiceCell['labelAt'],
  y: number,
  options: Array<[string, string, number]>,
): ChoiceCell => ({
  kind: 'choice',
  key,
  label,
  said,
  need,
  labelAt,
  section,
  options: options.map(([option, text, x]) => ({ option, label: text, x, y })),
})

export const area = (
  kind: AreaCell['kind'],
  key: string,
  label: string,
  x: number,
  y: number,
  width: number,
  height: number,
  need: Need,
  personal = false,
  said?: string,
): AreaCell => ({
  kind,
  key,
  label,
  ...(said ? { said } : {}),
  x,
  y,
  width,
  height,
  need,
  section: 7,
  ...(personal ? { personal: true as const } : {}),
})

export const conditional = { need: 'conditional' as const }
export const optional = { need: 'optional' as const }
export const time = (section: number) => comb(section, 'time')
export const numbered = <T>(count: number, make: (n: number, i: number) => T): T[] =>
  Array.from({ length: count }, (_, i) => make(i + 1, i))
