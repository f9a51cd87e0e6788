import { randomBytes } from 'node:crypto'
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs'
import { dirname } from 'node:path'
import { z } from 'zod'

const secretsSchema = z.object({
  /** Passwords of the private cluster's superuser, owner and application role. */
  admin: z.string().min(32),
  owner: z.string().min(32),
  app: z.string().min(32),
  /** Signs the session cookies. */
  session: z.string().min(32),
})

/** What a private installation must keep to itself between two starts. */
export type Secrets = z.infer<typeof secretsSchema>

/** New secrets of 256 random bits each. */
export function drawSecrets(): Secrets {
  const draw = () => randomBytes(32).toString('base64url')
  return { admin: draw(), owner: draw(), app: draw(), session: draw() }
}

/** The secrets in `file`, drawn and written (mode 0600) the first time. */
export function keepSecrets(file: string): Secrets {
  if (existsSync(file)) return secretsSchema.parse(JSON.parse(readFileSync(file, 'utf8')))
  const secrets = drawSecrets()
  mkdirSync(dirname(file), { recursive: true })
  writeFileSync(file, `${JSON.stringify(secrets, null, 2)}\n`, { mode: 0o600 })
  return secrets
}
