/** From a value to what stands in each box: right-aligned, leading boxes blank or zero, decimals filled. */
import type { CombCell } from '../../shared/layouts/layout.ts'
import type { Written } from './scenario.ts'

/** One entry a box, null for an empty box. Throws where the value does not fit the format. */
export function boxDigits(cell: CombCell, value: Written, scale: number, leadingZero: boolean): Array<number | null> {
  const boxes = cell.format.replace(/[^9]/g, '').length
  if (value === null) return Array.from({ length: boxes }, () => null)
  if (typeof value === 'string') {
    const text = cell.kind === 'date' ? value.split('-').reverse().join('') : value.replace(':', '')
    if (text.length !== boxes) throw new RangeError(`${cell.key}: ${value} does not fit ${cell.format}`)
    return [...text].map(Number)
  }
  const places = cell.format.includes('.') ? cell.format.length - cell.format.indexOf('.') - 1 : 0
  const text = (Number(value) / scale).toFixed(places).replace('.', '')
  const padding = boxes - text.length
  if (padding < 0) throw new RangeError(`${cell.key}: ${value} does not fit ${cell.format}`)
  return [...Array.from({ length: padding }, () => (leadingZero ? 0 : null)), ...[...text].map(Number)]
}
