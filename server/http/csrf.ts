import type { NextFunction, Request, Response } from 'express'
import { UserError } from '../../shared/errors.ts'

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS'])
const LOOPBACK = new Set(['localhost', '127.0.0.1', '[::1]'])

/**
 * Refuses writes that another site's page started: no form can set the header, and a script of another origin may not without
 * our leave; where the browser says where a request comes from, that must be us.
 */
export function refuseForeignWrites(publicUrl: string) {
  const { origin, hostname } = new URL(publicUrl)
  const ours = (req: Request, from: string) =>
    // On loopback people type localhost or 127.0.0.1, and the port may have moved: the request's own host is meant.
    from === origin || (LOOPBACK.has(hostname) && from === `http://${req.headers.host}`)
  return (req: Request, _res: Response, next: NextFunction) => {
    if (SAFE.has(req.method)) return next()
    const site = req.get('sec-fetch-site')
    const from = req.get('origin')
    const foreign = (site !== undefined && site !== 'same-origin') || (from !== undefined && !ours(req, from))
    if (foreign) throw new UserError('not_allowed', 'A page of another site sent this. Nothing was changed.')
    if (!req.get('x-sheafbook')) throw new UserError('not_allowed', 'Writes need the header X-Sheafbook. Nothing was changed.')
    next()
  }
}
