import type { Register } from '../../../shared/layouts/layout.ts'
import type { Db } from '../database.ts'

const TABLES: Record<Register, string> = {
  people: "SELECT number FROM users WHERE role = 'demonstrator'",
  places: 'SELECT number FROM places',
  tractors: 'SELECT number FROM tractors',
  implements: 'SELECT number FROM implements',
  kits: 'SELECT number FROM kits',
}

export interface KnownNumbers {
  known: Record<Register, Set<number>>
  /** YYYY-MM-DD by the database's clock. */
  today: string
}

/** The numbers that may stand on a sheet: what is no number of a register was misread or miswritten. */
export async function listKnownNumbers(db: Db): Promise<KnownNumbers> {
  const registers = Object.keys(TABLES) as Register[]
  const sql = registers.map((register) => `SELECT '${register}' AS register, number FROM (${TABLES[register]}) AS numbers`)
  const rows: Array<{ register: Register; number: number }> = await db.query(sql.join(' UNION ALL '))
  const [{ today }]: [{ today: string }] = await db.query('SELECT current_date AS today')
  const numbersOf = (register: Register) => new Set(rows.filter((row) => row.register === register).map((row) => row.number))
  return { today, known: Object.fromEntries(registers.map((r) => [r, numbersOf(r)])) as KnownNumbers['known'] }
}
