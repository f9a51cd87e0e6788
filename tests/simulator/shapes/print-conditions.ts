/** Printers, copiers and scanners. */
import type { Condition } from './condition.ts'

const A4 = { width: 210, height: 297 }
const LETTER = { width: 215.9, height: 279.4 }
const TRUE_SIZE = [1, 1] as const

const fitted = (percent: number): Condition => ({ name: `fit-${percent}`, print: { ...A4, scale: percent / 100 } })

export const PRINT_CONDITIONS: readonly Condition[] = [
  {
    name: 'photocopy',
    scanner: {
      dpi: 300,
      grey: true,
      scale: [0.97, 1.02],
      copier: { contrast: [1.15, 1.6], specks: [100, 900], blackAndWhite: false },
    },
  },
  {
    name: 'black-and-white-copy',
    scanner: { dpi: 300, grey: true, scale: [0.97, 1.02], copier: { contrast: [1, 1], specks: [50, 700], blackAndWhite: true } },
    fits: ['black and white'],
  },
  { name: 'scan-150-grey', scanner: { dpi: 150, grey: true, scale: TRUE_SIZE } },
  { name: 'scan-200-colour', scanner: { dpi: 200, grey: false, scale: TRUE_SIZE } },
  { name: 'scan-300-grey', scanner: { dpi: 300, grey: true, scale: TRUE_SIZE } },
  { name: 'scan-300-colour', scanner: { dpi: 300, grey: false, scale: TRUE_SIZE } },
  { name: 'letter-fitted', print: { ...LETTER, scale: 0.94 } },
  { name: 'letter-cut', print: { ...LETTER, scale: 1 }, fits: ['no sheet', 'corner missing'] },
  fitted(90),
  fitted(94),
  fitted(97),
  fitted(103),
  { name: 'faint-toner', paper: { toner: [0.35, 0.6] } },
  { name: 'streaked-toner', paper: { streaks: [0.5, 0.8] } },
]
