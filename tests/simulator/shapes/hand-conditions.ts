/** Other hands and other pens. */
import type { Condition } from './condition.ts'

export const HAND_CONDITIONS: readonly Condition[] = [
  { name: 'small-digits', writer: { size: [0.42, 0.46], sizeSpread: [0.01, 0.02], stray_mm: [0.3, 0.6] } },
  { name: 'big-digits', writer: { size: [0.94, 0.98], reach: [1.05, 1.25], stray_mm: [0.3, 0.5], slips: [0.3, 0.6] } },
  { name: 'thin-pen', writer: { traced: true, penWidth_mm: [0.16, 0.24], penStrength: [0.8, 1] } },
  { name: 'marker', writer: { traced: true, penWidth_mm: [0.9, 1.3], penStrength: [0.9, 1] } },
  {
    name: 'pencil',
    writer: { pencil: true, colour: [118, 118, 122], traced: true, penWidth_mm: [0.3, 0.5], penStrength: [0.5, 0.8] },
  },
  {
    name: 'blue-ballpoint',
    writer: { colour: [52, 78, 178], traced: true, penWidth_mm: [0.24, 0.36], penStrength: [0.7, 0.95], penDry: [0.03, 0.12] },
  },
  { name: 'strong-slant', writer: { slant: [0.35, 0.55] } },
  { name: 'off-centre', writer: { offCentre_mm: [0.8, 1.5], size: [0.5, 0.66] } },
]
