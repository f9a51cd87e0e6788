/**
 * The haulage sheet, version 1: one run of transport or PTO work on one A4 page. Once printed it is frozen: any change of
 * geometry is a new version in new files.
 */
import { consentText, cornerCodes, edgeSquares, fuelRules, fuelTexts } from './common-cells.ts'
import { FUEL_Y, haulageCells } from './haulage-1.cells.ts'
import { haulageTies } from './haulage-1.ties.ts'
import type { Layout } from './layout.ts'

export const haulage1: Layout = {
  key: 'haulage',
  version: 1,
  code: 'HA',
  title: 'Field sheet: haulage and PTO work',
  subtitle: 'one run, one sheet · ball pen, no pencil · photograph it before you leave',
  page: { width: 210, height: 297 },
  codes: cornerCodes,
  squares: edgeSquares,
  sections: [
    {
      number: 1,
      title: 'Before the first jar reading',
      hint: 'a tick means: seen and right · fuel-line work only by a trained person, engine cold',
      y: 40.4,
    },
    { number: 2, title: 'Tractor today', hint: 'tyres cold · bar and kgf/cm² in hundredths: 1.90 is written 190', y: 72.6 },
    {
      number: 3,
      title: 'Fuel and clock',
      hint: 'jar on its marked spot, eye level, bottom of the curve · stop above 65 °C',
      y: 102.2,
    },
    { number: 4, title: 'Work: load and way', hint: 'nobody rides on the load · never above the mass on the plate', y: 164.8 },
    { number: 5, title: 'Engine and PTO', hint: 'PTO off, engine off, key out before anybody reaches in', y: 194.4 },
    { number: 6, title: 'Speed over pegs', hint: 'pegs beside the lane · on a public road its rules come first', y: 212.4 },
    { number: 7, title: 'Close', hint: '', y: 230.4 },
  ],
  cells: haulageCells,
  texts: [
    { x: 104, y: 69.6, text: 'fuel by', size: 7.4, tone: 'grey' },
    ...fuelTexts(FUEL_Y),
    consentText(232.4),
    {
      x: 31,
      y: 293.6,
      text: 'This sheet is a record, not a permit. The makers’ manuals, road and local rules and licensed people come first. No smoking; wipe spills; children held.',
      size: 5.6,
      tone: 'grey',
    },
  ],
  rules: [...fuelRules(FUEL_Y), { x1: 14, y1: 251.5, x2: 196, y2: 251.5, width: 0.15 }],
  writing: { x: 78, y: 29.4, width: 118, height: 9.4 },
  planBlock: { x: 31, y: 16.2, columnWidth: 50, columns: 3, rows: 4, rowHeight: 3.2 },
  codeText: { x: 180, y: 13, size: 13 },
  ties: haulageTies,
}
