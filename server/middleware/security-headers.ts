import helmet from 'helmet'
import type { RequestHandler } from 'express'

/**
 * P27: the page runs only its own scripts, and nothing is loaded from elsewhere. Styles allow inline because PrimeVue
 * writes style elements while it runs and its nonce does not reach all of them.
 */
export function securityHeaders(): RequestHandler {
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        scriptSrc: ["'self'"],
        styleSrc: ["'self'", "'unsafe-inline'"],
        imgSrc: ["'self'", 'data:', 'blob:'],
        fontSrc: ["'self'"],
        connectSrc: ["'self'"],
        objectSrc: ["'none'"],
        baseUri: ["'none'"],
        frameAncestors: ["'none'"],
        formAction: ["'self'"],
        requireTrustedTypesFor: ["'script'"],
        trustedTypes: ['vue', 'halyard-worker'],
      },
    },
    strictTransportSecurity: { maxAge: 63_072_000, includeSubDomains: true },
    referrerPolicy: { policy: 'same-origin' },
    crossOriginEmbedderPolicy: false,
  })
}
