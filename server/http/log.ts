import { randomUUID } from 'node:crypto'
import { type Logger, pino } from 'pino'
import { pinoHttp } from 'pino-http'

export function createLogger(level: string): Logger {
  return pino({ level })
}

/** One line a request: method, path, status, time. No query, header or body: they carry names, tokens and passwords. */
export function logRequests(logger: Logger) {
  return pinoHttp({
    logger,
    genReqId: () => randomUUID(),
    customLogLevel: (_req, res) => (res.statusCode >= 500 ? 'warn' : 'info'),
    serializers: {
      req: ({ id, method, url }: { id: string; method: string; url: string }) => ({ id, method, path: hideTokens(url) }),
      res: ({ statusCode }: { statusCode: number }) => ({ status: statusCode }),
    },
    quietReqLogger: true,
  })
}

/** One-time links stand in the path. */
const hideTokens = (url: string) => url.replace(/\?.*$/, '').replace(/(\/links?\/).+$/, '$1…')
