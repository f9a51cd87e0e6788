/** One hand and one pen, kept through a whole sheet. */
import type { Pen } from './ink.ts'
import type { Chance } from './random.ts'

export interface Writer {
  pen: Pen
  /** Ink colour as seen on white paper, 0 to 255. */
  colour: readonly [number, number, number]
  pencil: boolean
  /** traced: pen of one width along the middle line. grey: the digit's own thick and thin, `weight` above 0 is thicker. */
  stroke: 'traced' | 'grey'
  weight: number
  /** Shear of the hand, and how much it varies from digit to digit. */
  slant: number
  slantSpread: number
  /** Digit height as a share of the box height, and its spread. */
  size: number
  sizeSpread: number
  /** Widest digit as a share of the box width. */
  reach: number
  /** Width of the digits against their natural width. */
  stretch: number
  /** Where digits sit in the box, mm from its middle, and how far they stray. */
  shift: readonly [number, number]
  stray_mm: number
  /** Writes 0 in leading boxes, leaves them empty, or now this, now that. */
  leading: 'zero' | 'blank' | 'mixed'
  /** Puts a bar through a 7. */
  crossesSevens: boolean
  tick: 'check' | 'cross' | 'slash' | 'flourish'
  /** Chance that a digit or tick leaves its box. */
  slips: number
}

const INKS = {
  blue: [38, 58, 150],
  darkBlue: [28, 34, 92],
  black: [34, 34, 38],
  pencil: [92, 92, 96],
} as const

/** Draws up a hand. `careful` writers (0 to 1) keep to their boxes. */
export function makeWriter(chance: Chance, careful: number, pencil = chance.odds(0.06)): Writer {
  const colour = pencil ? INKS.pencil : chance.pick([INKS.blue, INKS.blue, INKS.darkBlue, INKS.black, INKS.black])
  return {
    pen: {
      width_mm: chance.between(0.34, 0.68),
      strength: pencil ? chance.between(0.62, 0.9) : chance.between(0.86, 1),
      dry: !pencil && chance.odds(0.12) ? 0.05 : 0,
    },
    colour: colour.map((v) => v + chance.between(-8, 8)) as unknown as Writer['colour'],
    pencil,
    stroke: chance.odds(0.7) ? 'traced' : 'grey',
    weight: chance.between(-0.16, 0.16),
    slant: chance.normal(-0.12, 0.14),
    slantSpread: 0.03 + 0.07 * (1 - careful) * chance.unit(),
    size: chance.between(0.58, 0.8),
    sizeSpread: 0.02 + 0.06 * (1 - careful),
    reach: 0.72 + 0.16 * (1 - careful) + chance.between(-0.03, 0.03),
    stretch: chance.between(0.82, 1.12),
    shift: [chance.normal(0, 0.2), chance.normal(0.05, 0.3)],
    stray_mm: 0.12 + 0.28 * (1 - careful),
    leading: chance.pick(['zero', 'blank', 'blank', 'mixed'] as const),
    crossesSevens: chance.odds(0.1),
    tick: chance.pick(['check', 'check', 'check', 'cross', 'slash', 'flourish'] as const),
    slips: 0.03 * (1 - careful),
  }
}
