/** The web server as a function of what it needs; main.ts and the tests let it listen. */
import express, { type Express, Router } from 'express'
import type { DestinationStream } from 'pino'
import { signedInPeople } from './features/session/sign-in.ts'
import { readToken, unlessToken } from './http/bearer.ts'
import { refuseForeignWrites } from './http/csrf.ts'
import { createLogger, logRequests } from './http/log.ts'
import { mount } from './http/mount.ts'
import type { Deps } from './http/route.ts'
import { allRoutes } from './http/routes.ts'
import { securityHeaders } from './http/security-headers.ts'
import { answerFailure, answerNoRoute } from './http/serialise.ts'
import { sessions } from './http/session.ts'
import { webApp } from './http/web-app.ts'

interface AppOptions {
  /** Fails a request whose answer differs from its schema: for tests. */
  checkResponses?: boolean
  /** Where log lines go; standard output unless told. */
  logTo?: DestinationStream
}

const BODY_LIMIT = '1mb'

export function createApp(deps: Deps, options: AppOptions = {}): Express {
  const { settings } = deps
  const logger = createLogger(settings.logLevel, options.logTo)
  const app = express()
  app.disable('x-powered-by')
  app.set('trust proxy', settings.trustedProxies)
  app.use(logRequests(logger), ...securityHeaders(settings.publicUrl))
  const sessionTrouble = (error: unknown) => logger.warn({ err: error }, 'session store')
  const api = Router()
  api.use((_req, res, next) => {
    res.set('Cache-Control', 'no-store')
    next()
  })
  // A page of another site cannot send a token it does not have: only calls that rely on a cookie need the protection.
  const forBrowsers = [refuseForeignWrites(settings.publicUrl), sessions(deps, sessionTrouble), ...signedInPeople(deps)]
  api.use(readToken(deps), ...forBrowsers.map(unlessToken), express.json({ limit: BODY_LIMIT }))
  api.use(mount(allRoutes, deps, options), answerNoRoute)
  app.use('/api', api)
  app.use(webApp(settings.webDir), answerNoRoute, answerFailure)
  return app
}
