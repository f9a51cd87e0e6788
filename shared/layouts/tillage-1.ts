/**
 * The tillage sheet, version 1: one run on one A4 page. Frozen: sheets are in people's hands, so any change of geometry is a
 * new version in new files.
 */
import { numbered } from './cell-builders.ts'
import type { Layout } from './layout.ts'
import { tillageCells } from './tillage-1.cells.ts'
import { tillageTies } from './tillage-1.ties.ts'

export const tillage1: Layout = {
  key: 'tillage',
  version: 1,
  code: 'TI',
  title: 'Field sheet: tillage',
  subtitle: 'one run, one sheet · ball pen, no pencil · photograph it before you leave',
  page: { width: 210, height: 297 },
  codes: [
    { x: 7, y: 7, size: 18 },
    { x: 185, y: 7, size: 18 },
    { x: 185, y: 272, size: 18 },
    { x: 7, y: 272, size: 18 },
  ],
  squares: numbered(5, (_, i) => [
    { x: 5.5, y: 57.6 + 44.2 * i, size: 5 },
    { x: 199.5, y: 57.6 + 44.2 * i, size: 5 },
  ]).flat(),
  sections: [
    {
      number: 1,
      title: 'Before the first jar reading',
      hint: 'a tick means: seen and right · fuel-line work only by a trained person, engine cold',
      y: 40.4,
    },
    { number: 2, title: 'Tractor today', hint: 'tyres cold · bar and kgf/cm² in hundredths: 1.90 is written 190', y: 67 },
    {
      number: 3,
      title: 'Fuel and clock',
      hint: 'jar on its marked spot, eye level, bottom of the curve · stop above 65 °C',
      y: 96.4,
    },
    { number: 4, title: 'Plot', hint: 'tape tight, peg to peg · a rectangle needs A–B and B–C only', y: 158.8 },
    {
      number: 5,
      title: 'Work: depth, width, engine',
      hint: 'implement down, engine off, key out before you kneel · spread over the passes',
      y: 188.4,
    },
    {
      number: 6,
      title: 'Speed and wheel slip',
      hint: 'same gear and engine speed · walk beside, never behind or in front',
      y: 228.2,
    },
    { number: 7, title: 'Close', hint: '', y: 256.6 },
  ],
  cells: tillageCells,
  texts: [
    { x: 104, y: 64.5, text: 'fuel by', size: 7.4, tone: 'grey' },
    { x: 42.6, y: 104.1, text: 'hour : min', size: 6.8, tone: 'grey' },
    { x: 73.6, y: 104.1, text: '°C in jar', size: 6.8, tone: 'grey' },
    { x: 114.8, y: 104.1, text: 'mL', size: 7.4, weight: 'bold', align: 'right' },
    { x: 14, y: 110, text: 'Jar, start', size: 8.2, weight: 'bold' },
    ...numbered(3, (n) => ({ x: 14, y: 110 + 8.4 * n, text: `+  top-up ${n}`, size: 8.2 })),
    { x: 14, y: 143.6, text: '–  Jar, end', size: 8.2, weight: 'bold' as const },
    { x: 14, y: 152.2, text: '=  Fuel used, by hand', size: 8.2, weight: 'bold' as const },
    { x: 19, y: 155.4, text: 'start + top-ups – end', size: 6.6, tone: 'grey' as const },
    { x: 128.6, y: 118.6, text: 'stop, from', size: 6.8, tone: 'grey' as const },
    { x: 160.6, y: 118.6, text: 'stop, to', size: 6.8, tone: 'grey' as const },
    { x: 196, y: 118.6, text: 'engine off', size: 6.8, tone: 'grey' as const, align: 'right' as const },
    ...numbered(3, (n) => ({ x: 122.6, y: 116.2 + 8.4 * n, text: String(n), size: 8.2, weight: 'bold' as const })),
    { x: 100, y: 261.8, text: 'farmer agrees to', size: 7.4, tone: 'grey' as const },
    {
      x: 31,
      y: 293.6,
      text: 'This sheet is a record, not a permit. The makers’ manuals, local rules and trained people come first. No smoking; wipe spills; children held; nobody past the line.',
      size: 5.6,
      tone: 'grey' as const,
    },
  ],
  rules: [
    { x1: 91, y1: 147.3, x2: 115.4, y2: 147.3, width: 0.4 },
    { x1: 91, y1: 157, x2: 115.4, y2: 157, width: 0.25 },
    { x1: 91, y1: 157.6, x2: 115.4, y2: 157.6, width: 0.25 },
    { x1: 119.6, y1: 101.5, x2: 119.6, y2: 157.2, width: 0.15 },
  ],
  figure: { x: 14, y: 166, width: 27, height: 20 },
  writing: { x: 78, y: 29.4, width: 118, height: 9.4 },
  planBlock: { x: 31, y: 16.2, columnWidth: 50, columns: 3, rows: 4, rowHeight: 3.2 },
  codeText: { x: 180, y: 13, size: 13 },
  ties: tillageTies,
}
