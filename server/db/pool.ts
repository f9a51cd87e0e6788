import type { Pool } from 'pg'
import type { DataSource } from 'typeorm'

/** The connections themselves, for the two libraries that bring their own SQL (sessions, counters of attempts). */
export function poolOf(source: DataSource): Pool {
  return (source.driver as unknown as { master: Pool }).master
}
