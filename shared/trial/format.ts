/** Figures for people: rounded by their uncertainty, never before. */

/** Decimals that show U with two figures when its first is 1 or 2, else with one. Negative: tens, hundreds. */
function decimalsFor(U: number): number {
  const power = Math.floor(Math.log10(U))
  const first = Math.floor(U / 10 ** power + 1e-9)
  return (first <= 2 ? 1 : 0) - power
}

function fixed(value: number, decimals: number): string {
  const shown = decimals >= 0 ? value.toFixed(decimals) : String(Math.round(value / 10 ** -decimals) * 10 ** -decimals)
  return Number(shown) === 0 ? shown.replace('-', '') : shown
}

/** Value and U as texts with equal decimals; U null where none is known (the value then keeps four figures). */
export function roundByUncertainty(value: number, U: number | null): { value: string; U: string | null } {
  if (U === null || !(U > 0) || !Number.isFinite(U)) {
    const power = value === 0 ? 0 : Math.floor(Math.log10(Math.abs(value)))
    return { value: fixed(value, Math.min(6, Math.max(0, 3 - power))), U: null }
  }
  const decimals = Math.min(20, decimalsFor(U))
  return { value: fixed(value, decimals), U: fixed(U, decimals) }
}

/** "14.1 ± 0.7"; "14.07" where no uncertainty is known; "–" for no figure. Without the unit. */
export function formatResult(value: number | null, U: number | null): string {
  if (value === null) return '–'
  const shown = roundByUncertainty(value, U)
  return shown.U === null ? shown.value : `${shown.value} ± ${shown.U}`
}
