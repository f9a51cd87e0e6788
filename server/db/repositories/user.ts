import type { Role, User } from '../../../shared/schemas/user.ts'
import type { Db } from '../database.ts'
import { orConflict } from '../driver-errors.ts'
import { UserEntity } from '../entities/user.ts'

/** What the outside may know of a row. */
export function toUser(row: UserEntity): User {
  const { id, number, name, email, role, active } = row
  return { id, number, name, email, role, active, hasPassword: row.passwordHash !== null }
}

/** Somebody who may sign in now; null when there is none or they are disabled. */
export async function findActiveUser(db: Db, id: string): Promise<User | null> {
  const row = await db.findOneBy(UserEntity, { id, active: true })
  return row && toUser(row)
}

/** With the hash, for signing in only. */
export async function findCredentials(db: Db, email: string): Promise<{ user: User; passwordHash: string } | null> {
  const row = await db.findOneBy(UserEntity, { email, active: true })
  return row?.passwordHash ? { user: toUser(row), passwordHash: row.passwordHash } : null
}

export async function findUser(db: Db, id: string): Promise<User | null> {
  const row = await db.findOneBy(UserEntity, { id })
  return row && toUser(row)
}

export async function findUserByEmail(db: Db, email: string): Promise<User | null> {
  const row = await db.findOneBy(UserEntity, { email })
  return row && toUser(row)
}

export async function listUsers(db: Db): Promise<User[]> {
  return (await db.find(UserEntity, { order: { number: 'ASC' } })).map(toUser)
}

export async function listDemonstrators(db: Db): Promise<{ id: string; number: number; name: string }[]> {
  return db.find(UserEntity, {
    select: { id: true, number: true, name: true },
    where: { role: 'demonstrator', active: true },
    order: { number: 'ASC' },
  })
}

export interface NewUser {
  number: number
  name: string
  email: string
  role: Role
  passwordHash?: string | null
}

const TAKEN = {
  users_number_key: { path: 'number', message: 'Somebody has this number already.' },
  users_email_key: { path: 'email', message: 'Somebody has this address already.' },
}

/** @throws UserError `conflict` when number or address is taken */
export async function addUser(db: Db, user: NewUser): Promise<User> {
  const row = db.create(UserEntity, { active: true, ...user, passwordHash: user.passwordHash ?? null })
  return toUser(await orConflict(db.save(row), TAKEN))
}

/** Active admins, locked until the transaction ends: two of them cannot disable each other at the same moment. */
export async function lockActiveAdmins(db: Db): Promise<string[]> {
  const rows = await db.query<{ id: string }[]>(`SELECT id FROM users WHERE role = 'admin' AND active ORDER BY id FOR UPDATE`)
  return rows.map(({ id }) => id)
}

export async function changeUser(db: Db, id: string, change: { name?: string; role?: Role; active?: boolean }): Promise<void> {
  if (Object.values(change).some((value) => value !== undefined)) await db.update(UserEntity, { id }, change)
}

export async function setPasswordHash(db: Db, id: string, passwordHash: string): Promise<void> {
  await db.update(UserEntity, { id }, { passwordHash })
}

/** Ends every session of a person: their next request is anonymous. */
export async function endSessions(db: Db, userId: string): Promise<void> {
  await db.query(`DELETE FROM session WHERE sess -> 'passport' ->> 'user' = $1`, [userId])
}

/** The lowest number nobody has. */
export async function nextUserNumber(db: Db): Promise<number> {
  const [row] = await db.query<{ next: number }[]>('SELECT coalesce(max(number), 0) + 1 AS next FROM users')
  return row?.next ?? 1
}
