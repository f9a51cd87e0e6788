import { tillageCells } from '../../shared/layouts/tillage-1.cells.ts'

/** The ticks made before the first jar reading, in the order of the sheet. */
export const CHECKS: readonly string[] = tillageCells
  .filter((cell) => cell.kind === 'tick' && cell.section === 1)
  .map((cell) => cell.key)
