import { resolve } from 'node:path'
import { z } from 'zod'
import { BadSettings, readSettings } from '../../config.ts'

const port = z.coerce
  .number('must be a port number')
  .int('must be a port number')
  .min(0, 'must be a port number')
  .max(65_535, 'must be a port number')

/** What only the start command needs; the rest of the environment is the server's and the worker's. */
const schema = z.object({
  /** Everything the private installation writes. */
  DATA_DIR: z.string().default('.data'),
  /** Where the private cluster's files go; absent: `pg` in the data folder. */
  POSTGRES_DIR: z.string().optional(),
  /** Wanted loopback ports; absent or busy: another one. */
  POSTGRES_PORT: port.default(0),
  SMTP_PORT: port.default(0),
  /** A database of your own; then no private cluster is started. */
  DATABASE_URL: z.string().optional(),
  MIGRATE_DATABASE_URL: z.string().optional(),
  SMTP_URL: z.string().optional(),
  PORT: z.coerce.number().optional(),
})

export interface StartSettings extends z.output<typeof schema> {
  /** Start without the demo season. */
  empty: boolean
}

/**
 * @param args after `npm start --`
 * @throws BadSettings naming every bad variable or argument
 */
export function readStartSettings(env: NodeJS.ProcessEnv, args: string[]): StartSettings {
  const present = Object.fromEntries(Object.entries(env).filter(([, value]) => value !== undefined && value.trim() !== ''))
  const parsed = schema.safeParse(present)
  const problems = [
    ...(parsed.error?.issues ?? []).map((issue) => `${String(issue.path[0])} ${issue.message}`),
    ...problemsOfServer(present),
    ...args.filter((arg) => arg !== '--empty').map((arg) => `"${arg}" is no argument of "npm start"; there is only --empty`),
  ]
  if (!parsed.success || problems.length > 0) throw new BadSettings(onePerName(problems))
  return { ...parsed.data, DATA_DIR: resolve(parsed.data.DATA_DIR), empty: args.includes('--empty') }
}

/** What the server would refuse, asked before anything is started; what the start command provides is filled in. */
function problemsOfServer(present: Record<string, string | undefined>): string[] {
  try {
    readSettings({
      DATABASE_URL: 'postgresql://private/private',
      SESSION_SECRET: 'drawn when the installation is made',
      ...present,
    })
    return []
  } catch (cause) {
    if (cause instanceof BadSettings) return cause.problems
    throw cause
  }
}

/** Both schemas know PORT and the database; the server's words about them come last and count. */
function onePerName(problems: string[]): string[] {
  return [...new Map(problems.map((problem) => [problem.split(' ')[0], problem])).values()]
}
