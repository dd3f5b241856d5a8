import type { RequestHandler } from 'express'
import helmet from 'helmet'

const SELF = ["'self'"]

/** Nothing from other hosts, no inline script, no framing. Styles may be inline: theme and drawing need it. */
export const securityHeaders: RequestHandler = helmet({
  contentSecurityPolicy: {
    useDefaults: false,
    directives: {
      defaultSrc: SELF,
      baseUri: SELF,
      scriptSrc: SELF,
      scriptSrcAttr: ["'none'"],
      styleSrc: ["'self'", "'unsafe-inline'"],
      imgSrc: ["'self'", 'data:'],
      fontSrc: SELF,
      connectSrc: SELF,
      workerSrc: SELF,
      objectSrc: ["'none'"],
      formAction: SELF,
      frameAncestors: ["'none'"],
    },
  },
  frameguard: { action: 'deny' },
  referrerPolicy: { policy: 'same-origin' },
  // Set by whoever ends TLS: the server itself also serves plain http on a private machine.
  strictTransportSecurity: false,
})
