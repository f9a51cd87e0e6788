/** Pictures that nobody could read whole: each must be answered with the advice that fits, whoever made the mistake. */
import type { Condition } from './condition.ts'

const hopeless = (name: string, rest: Omit<Condition, 'name' | 'hopeless'>): Condition => ({ name, hopeless: true, ...rest })

export const HOPELESS_CONDITIONS: readonly Condition[] = [
  hopeless('dark', { light: { level: [14, 32] }, optics: { grain: [14, 22] }, fits: ['too dark'] }),
  hopeless('shaken', { optics: { shake_px: [16, 26] }, fits: ['too blurred'] }),
  hopeless('unfocused', { optics: { defocus_px: [7, 14] }, fits: ['too blurred'] }),
  hopeless('mirrored-window', { light: { window: [0.3, 0.45] }, fits: ['glare'] }),
  hopeless('half-outside', { shot: { fill: [0.9, 0.96], off: [0.25, 0.4] }, fits: ['corner missing'] }),
  hopeless('too-near', { shot: { fill: [1.2, 1.4] }, fits: ['corner missing', 'no sheet'] }),
  hopeless('far-away', { shot: { fill: [0.16, 0.24] }, fits: ['too small', 'no sheet'] }),
  hopeless('folded-over', { lost: { folded: true, legs_mm: [95, 150] }, fits: ['corner missing', 'covered'] }),
]
