import { Client } from 'pg'
import type { Secrets } from './secrets.ts'

/** Owns the tables and the queue's schema; only migrations sign in as this role. */
export const OWNER_ROLE = 'sheafbook_owner'
/** What the server and the workers sign in as: no schema changes, and the audit trail only grows. */
export const APP_ROLE = 'sheafbook_app'

/** Makes the two roles, or gives them the passwords in `secrets`. Needs a superuser's connection. */
export async function prepareRoles(admin: Client, secrets: Pick<Secrets, 'owner' | 'app'>): Promise<void> {
  await prepareRole(admin, OWNER_ROLE, secrets.owner)
  await prepareRole(admin, APP_ROLE, secrets.app)
}

/**
 * Makes the database when it is missing: UTF-8, sorted by code point, owned by the owner. Before PostgreSQL 15 any
 * role may create tables in a new database, so that right is withdrawn.
 */
export async function prepareDatabase(admin: Client, name: string, databaseUrl: string): Promise<boolean> {
  const known = await admin.query('SELECT 1 FROM pg_database WHERE datname = $1', [name])
  if (known.rowCount === 1) return false
  await admin.query(
    `CREATE DATABASE ${admin.escapeIdentifier(name)} OWNER ${OWNER_ROLE} TEMPLATE template0 ENCODING 'UTF8' LC_COLLATE 'C.UTF-8' LC_CTYPE 'C.UTF-8'`,
  )
  await withClient(databaseUrl, async (inside) => {
    await inside.query(`ALTER SCHEMA public OWNER TO ${OWNER_ROLE}`)
    await inside.query('REVOKE CREATE ON SCHEMA public FROM PUBLIC')
    await inside.query(`GRANT USAGE ON SCHEMA public TO ${APP_ROLE}`)
  })
  return true
}

/** Runs `work` with one connection and closes it whatever happens. */
export async function withClient<T>(url: string, work: (client: Client) => Promise<T>): Promise<T> {
  const client = new Client({ connectionString: url, connectionTimeoutMillis: 10_000 })
  // A connection that breaks also rejects the query in hand; without a listener it would end the process as well.
  client.on('error', () => undefined)
  await client.connect()
  try {
    return await work(client)
  } finally {
    await client.end()
  }
}

async function prepareRole(admin: Client, role: string, password: string): Promise<void> {
  const known = await admin.query('SELECT 1 FROM pg_roles WHERE rolname = $1', [role])
  const verb = known.rowCount === 1 ? 'ALTER' : 'CREATE'
  await admin.query(`${verb} ROLE ${role} LOGIN NOSUPERUSER NOCREATEDB NOCREATEROLE PASSWORD ${admin.escapeLiteral(password)}`)
}
