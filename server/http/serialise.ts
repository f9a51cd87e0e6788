import type { NextFunction, Request, Response } from 'express'
import { UserError } from '../../shared/errors.ts'
import { classify } from './classify.ts'

/** Answers every failure in the one shape {error: {code, message, issues?, requestId}}; the texts of bugs never leave. */
export function answerFailure(error: unknown, req: Request, res: Response, _next: NextFunction): void {
  const failure = classify(error)
  if (failure.level !== 'silent') req.log[failure.level]({ err: error }, 'request failed')
  if (res.headersSent) {
    res.destroy()
    return
  }
  const { status, code, message, issues, retryAfter_s } = failure
  if (retryAfter_s !== undefined) res.set('Retry-After', String(Math.max(1, Math.ceil(retryAfter_s))))
  const requestId = String(req.id)
  res.status(status).json({ error: issues.length > 0 ? { code, message, issues, requestId } : { code, message, requestId } })
}

/** Whatever no route answered. */
export function answerNoRoute(req: Request): never {
  throw new UserError('not_found', `There is nothing at ${req.method} ${req.path}.`)
}
