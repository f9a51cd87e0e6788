/** Light, grain and blur. */
import type { Condition } from './condition.ts'

export const LIGHT_CONDITIONS: readonly Condition[] = [
  {
    name: 'low-light',
    light: { level: [70, 115] },
    optics: { grain: [11, 20], defocus_px: [0.8, 1.3], jpegQuality: [70, 85] },
    fits: ['too dark', 'too blurred'],
  },
  { name: 'motion-blur', light: { level: [150, 200] }, optics: { shake_px: [3.5, 8] }, fits: ['too blurred'] },
  { name: 'out-of-focus', optics: { defocus_px: [2, 4.5] }, fits: ['too blurred'] },
  { name: 'mixed-light', light: { mixed: [0.15, 0.4], gradient: [0.15, 0.45] } },
  {
    name: 'coloured-paper',
    paper: {
      whites: [
        [248, 236, 140],
        [168, 222, 176],
        [158, 200, 238],
        [244, 176, 188],
        [236, 196, 120],
      ],
    },
  },
  { name: 'phone-shadow', light: { phone: [0.25, 0.6] } },
  { name: 'glare', light: { glare: [0.6, 0.97] }, fits: ['glare'] },
  { name: 'steep-light', light: { gradient: [0.55, 0.75], level: [180, 235] } },
  { name: 'strong-jpeg', optics: { jpegQuality: [32, 50] } },
]
