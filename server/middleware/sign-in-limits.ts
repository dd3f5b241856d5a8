import type { Request, RequestHandler, Response } from 'express'
import { ipKeyGenerator, rateLimit } from 'express-rate-limit'
import { HttpError } from '../errors/http-error'

const WINDOW_MINUTES = 15

/** Failed attempts in a window, for one e-mail address and for one address of the network. */
export const SIGN_IN_LIMITS = { perEmail: 10, perAddress: 50 } as const

/** Slows down whoever tries passwords. Only failures count, in memory. */
export function createSignInLimits(): RequestHandler[] {
  return [
    limit(SIGN_IN_LIMITS.perAddress, (request) => ipKeyGenerator(request.ip ?? '')),
    limit(SIGN_IN_LIMITS.perEmail, emailOf),
  ]
}

function limit(failures: number, keyGenerator: (request: Request) => string): RequestHandler {
  return rateLimit({
    windowMs: WINDOW_MINUTES * 60_000,
    limit: failures,
    keyGenerator,
    skipSuccessfulRequests: true,
    standardHeaders: false,
    legacyHeaders: false,
    handler: (request: Request & { rateLimit?: { resetTime?: Date } }, response: Response) => {
      const left = (request.rateLimit?.resetTime?.getTime() ?? 0) - Date.now()
      response.set('Retry-After', String(Math.max(1, Math.ceil(left / 1000))))
      throw new HttpError(
        'TOO_MANY_ATTEMPTS',
        `Too many attempts to sign in. Wait ${Math.max(1, Math.ceil(left / 60_000))} minutes and try again.`,
      )
    },
  })
}

function emailOf(request: Request): string {
  const { email } = (request.body ?? {}) as { email?: unknown }
  return typeof email === 'string' ? email.trim().toLowerCase().slice(0, 254) : ''
}
