/** How the paper lies, and where the phone is held. */
import type { Condition } from './condition.ts'

const FLATTEN = ['cannot place'] as const
const UNCOVER = ['corner missing', 'covered'] as const
const CLOSER = ['too small'] as const

export const PAPER_CONDITIONS: readonly Condition[] = [
  { name: 'waves', form: { kind: 'waves', height_mm: [1.5, 4], length_mm: [70, 150] }, fits: FLATTEN },
  { name: 'fold-middle', form: { kind: 'folds', across: true, lengthways: false, slope: [0.08, 0.3] }, fits: FLATTEN },
  { name: 'fold-lengthways', form: { kind: 'folds', across: false, lengthways: true, slope: [0.08, 0.3] }, fits: FLATTEN },
  { name: 'fold-in-four', form: { kind: 'folds', across: true, lengthways: true, slope: [0.08, 0.22] }, fits: FLATTEN },
  { name: 'rolled', form: { kind: 'rolled', radius_mm: [350, 800] }, fits: FLATTEN },
  { name: 'crumpled', form: { kind: 'crumpled', creases: [8, 18], slope: [0.02, 0.07] }, fits: FLATTEN },
  { name: 'corner-folded', lost: { folded: true, legs_mm: [16, 34] }, fits: UNCOVER },
  { name: 'corner-torn', lost: { folded: false, legs_mm: [14, 40] }, fits: UNCOVER },
  { name: 'thumb', thumb: true, fits: UNCOVER },
  { name: 'strong-tilt', shot: { tilt: [0.32, 0.55], fill: [0.85, 0.95] }, fits: FLATTEN },
  // Two fifths of the picture's area, then two fifths of its width.
  { name: 'small-page', shot: { fill: [0.62, 0.68] } },
  { name: 'tiny-page', shot: { fill: [0.38, 0.42] }, fits: CLOSER },
]
