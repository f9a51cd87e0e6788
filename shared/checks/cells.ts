/** What the rules know of a cell. A sheet's cells are its layout's alone; here stands only what no layout has. */

/** hard: outside is impossible; plausible: outside is unlikely; both inclusive, in `unit`. */
export interface CellInfo {
  /** Its name in a sentence. */
  label: string
  unit?: string
  /** Its last written place. */
  decimals?: number
  /** A blank is told. */
  mandatory?: boolean
  hard?: readonly [number, number]
  plausible?: readonly [number, number]
}

/** Readings that are in no box of a sheet: registers, the plan or the desk know them. Limits as in the table of readings. */
const OFF_SHEET: Readonly<Record<string, CellInfo>> = {
  l_per_acre_written: { label: 'litres per acre by hand', unit: 'L/acre', decimals: 2 },
  l_per_h_written: { label: 'litres per hour by hand', unit: 'L/h', decimals: 2 },
  speed_written_kmh: { label: 'speed by hand', unit: 'km/h', decimals: 1 },
  efc_written: { label: 'field capacity by hand', unit: 'ha/h', decimals: 2 },
  slip_written_pct: { label: 'slip by hand', unit: '%', decimals: 1 },
  pass_length_m: { label: 'pass length', unit: 'm', hard: [2, 2000], plausible: [20, 300] },
  pto_rpm: { label: 'PTO speed', unit: 'r/min', hard: [100, 1200] },
  density_15: { label: 'density at 15 °C', unit: 'kg/m³' },
}

/** `depth_cm[3]` → stem `depth_cm`, number 3. */
export function stemOf(key: string): { stem: string; n: number | null } {
  const found = /^(.+)\[(\d+)\]$/.exec(key)
  return found ? { stem: found[1] ?? key, n: Number(found[2]) } : { stem: key, n: null }
}

/** A cell the layout at hand does not have: as it stands off the sheet, else named by its key alone ("depth cm 3"). */
export function cellWithoutLayout(key: string): CellInfo {
  const { stem, n } = stemOf(key)
  return OFF_SHEET[stem] ?? { label: `${stem.replaceAll('_', ' ')}${n === null ? '' : ` ${n}`}` }
}
