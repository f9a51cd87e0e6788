import { randomUUID } from 'node:crypto'
import { type DestinationStream, type Logger, pino } from 'pino'
import { pinoHttp } from 'pino-http'

/** @param to where lines go; standard output unless told */
export function createLogger(level: string, to?: DestinationStream): Logger {
  const options = { level, serializers: { err: describeError } }
  return to ? pino(options, to) : pino(options)
}

/** Name, text, code and stack only: a database error also carries the values it failed on. */
function describeError(error: unknown): unknown {
  if (!(error instanceof Error)) return { message: String(error) }
  const { name, message, stack, cause, code } = error as Error & { code?: unknown }
  return { name, message, code, stack, ...(cause === undefined ? {} : { cause: describeError(cause) }) }
}

/** One line a request: method, path, status, time. No query, header or body: they carry names, tokens and passwords. */
export function logRequests(logger: Logger) {
  return pinoHttp({
    logger,
    genReqId: () => randomUUID(),
    customLogLevel: (_req, res) => (res.statusCode >= 500 ? 'warn' : 'info'),
    serializers: {
      req: ({ id, method, url }: { id: string; method: string; url: string }) => ({ id, method, path: hideTokens(url) }),
      // The wrapped form spreads every property of the error; `raw` is the error itself.
      err: ({ raw }: { raw: unknown }) => describeError(raw),
      res: ({ statusCode }: { statusCode: number }) => ({ status: statusCode }),
    },
    quietReqLogger: true,
  })
}

/** One-time links stand in the path. */
const hideTokens = (url: string) => url.replace(/\?.*$/, '').replace(/(\/links?\/).+$/, '$1…')
