import type { RequestHandler } from 'express'
import helmet from 'helmet'
import type { Config } from '../config.ts'

/**
 * Security headers of every answer. Scripts come from this site alone and never from the page's own text; styles may be inline, which the
 * map library and measured layouts need.
 */
export function securityHeaders(config: Config): RequestHandler {
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        'default-src': ["'self'"],
        'script-src': ["'self'"],
        'style-src': ["'self'", "'unsafe-inline'"],
        'img-src': ["'self'", 'data:', 'blob:'],
        'font-src': ["'self'", 'data:'],
        'connect-src': ["'self'"],
        'worker-src': ["'self'"],
        'object-src': ["'none'"],
        'base-uri': ["'none'"],
        'form-action': ["'self'"],
        'frame-ancestors': ["'none'"],
      },
    },
    crossOriginEmbedderPolicy: false,
    referrerPolicy: { policy: 'strict-origin-when-cross-origin' },
    strictTransportSecurity: config.cookieSecure ? { maxAge: 365 * 24 * 3600, includeSubDomains: true } : false,
  })
}
