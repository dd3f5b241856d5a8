import type { Request, RequestHandler, Response } from 'express'
import { ipKeyGenerator, type RateLimitInfo, rateLimit } from 'express-rate-limit'
import type { Logger } from 'pino'
import { HttpError } from '../errors/http-error'
import type { AttemptService } from '../services/attempt.service'
import { AttemptStore } from './attempt-store'

const WINDOW_MINUTES = 15

/** Failed attempts to sign in within a window, for one e-mail address and for one address of the network. */
export const SIGN_IN_LIMITS = { perEmail: 10, perAddress: 50 } as const

/** Links that were not good, within a window, from one address of the network. */
export const LINK_LIMITS = { perAddress: 30 } as const

/** Requests that send an e-mail to whoever is named, within a window; here every one counts. */
export const MAIL_LIMITS = { perEmail: 3, perAddress: 20 } as const

/** What a route may be limited in. */
export type LimitKind = 'sign-in' | 'link' | 'mail'

/** The steps that limit a route, by kind. */
export type Limits = Readonly<Record<LimitKind, readonly RequestHandler[]>>

/**
 * Slows down whoever tries passwords or links, or sends mails to others. Counted in the database, so that it holds across
 * server processes. When the database does not answer nobody passes: the request ends as UNAVAILABLE.
 */
export function createLimits(attempts: AttemptService, logger: Logger): Limits {
  const limit = (name: string, most: number, options: LimitOptions): RequestHandler =>
    rateLimit({
      windowMs: WINDOW_MINUTES * 60_000,
      limit: most,
      store: new AttemptStore(attempts, name, logger),
      keyGenerator: options.by,
      skipSuccessfulRequests: options.isFailure !== undefined,
      requestWasSuccessful: (_request, response) => options.isFailure?.(response) === false,
      standardHeaders: false,
      legacyHeaders: false,
      handler: refuse(options.words),
    })
  const signIn = {
    isFailure: (response: Response) => response.statusCode >= 400,
    words: 'attempts to sign in',
  }
  const link = {
    isFailure: ({ statusCode }: Response) => statusCode === 404,
    words: 'links that do not work',
  }
  const mail = { words: 'requests for an e-mail' }
  return {
    'sign-in': [
      limit('sign-in from', SIGN_IN_LIMITS.perAddress, { ...signIn, by: networkAddress }),
      limit('sign-in as', SIGN_IN_LIMITS.perEmail, { ...signIn, by: emailOf }),
    ],
    link: [limit('link from', LINK_LIMITS.perAddress, { ...link, by: networkAddress })],
    mail: [
      limit('mail from', MAIL_LIMITS.perAddress, { ...mail, by: networkAddress }),
      limit('mail to', MAIL_LIMITS.perEmail, { ...mail, by: emailOf }),
    ],
  }
}

interface LimitOptions {
  readonly by: (request: Request) => string
  /** Only answers for which it holds count; left out: all. */
  readonly isFailure?: (response: Response) => boolean
  /** Of what there were too many. */
  readonly words: string
}

function refuse(words: string) {
  return (request: Request & { rateLimit?: RateLimitInfo }, response: Response): never => {
    const left = (request.rateLimit?.resetTime?.getTime() ?? 0) - Date.now()
    const minutes = Math.max(1, Math.ceil(left / 60_000))
    response.set('Retry-After', String(Math.max(1, Math.ceil(left / 1000))))
    throw new HttpError(
      'TOO_MANY_ATTEMPTS',
      `Too many ${words}. Wait ${minutes} ${minutes === 1 ? 'minute' : 'minutes'} and try again.`,
    )
  }
}

function networkAddress({ ip = '' }: Request): string {
  return ipKeyGenerator(ip)
}

/** The address that is tried; where none is named it is someone signed in who tries their own password. */
function emailOf(request: Request): string {
  const { email } = (request.body ?? {}) as { email?: unknown }
  if (typeof email !== 'string') return request.session.userId ?? ''
  return email.trim().toLowerCase().slice(0, 254)
}
