import type { RequestHandler } from 'express'
import helmet from 'helmet'

const SELF = ["'self'"]
const NONE = ["'none'"]
const YEAR_S = 365 * 24 * 3600

/** Only what this origin serves may run or load; 'wasm-unsafe-eval' lets the phone run the code reader. */
export function securityHeaders(publicUrl: string): RequestHandler[] {
  const https = publicUrl.startsWith('https:')
  const csp = {
    'default-src': NONE,
    'script-src': ["'self'", "'wasm-unsafe-eval'"],
    'style-src': SELF,
    'font-src': SELF,
    'connect-src': SELF,
    'worker-src': SELF,
    'manifest-src': SELF,
    'form-action': SELF,
    'img-src': ["'self'", 'blob:'],
    'base-uri': NONE,
    'object-src': NONE,
    'frame-ancestors': NONE,
  }
  return [
    helmet({
      contentSecurityPolicy: { useDefaults: false, directives: csp },
      referrerPolicy: { policy: 'no-referrer' },
      strictTransportSecurity: https ? { maxAge: YEAR_S } : false,
      xFrameOptions: { action: 'deny' },
    }),
    (_req, res, next) => {
      res.set('Permissions-Policy', 'camera=(self), geolocation=(), microphone=(), payment=()')
      next()
    },
  ]
}
