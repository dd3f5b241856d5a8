import { randomBytes } from 'node:crypto'
import type { Request } from 'express'

declare module 'express-session' {
  interface SessionData {
    userId?: string
    csrfToken?: string
  }
}

/** The browser behind a request, signed in or not. */
export interface Visitor {
  readonly userId: string | null
  /** The token its writes must carry; made on first use. */
  csrfToken(): string
  /** Starts a new session under a new id, so that one planted before signing in is worth nothing. */
  signIn(userId: string): Promise<void>
  signOut(): Promise<void>
}

/** How long a visitor who is not signed in is remembered. */
const VISIT = 24 * 60 * 60 * 1000

/** How long someone stays signed in after the last request. */
export const SIGNED_IN = 14 * 24 * 60 * 60 * 1000

/** The visitor of a request that has passed the session middleware. */
export function visitorOf(request: Request): Visitor {
  return {
    get userId() {
      return request.session.userId ?? null
    },
    csrfToken() {
      if (request.session.csrfToken === undefined) {
        request.session.csrfToken = randomBytes(32).toString('base64url')
        request.session.cookie.maxAge = VISIT
      }
      return request.session.csrfToken
    },
    async signIn(userId) {
      await settled((done) => request.session.regenerate(done))
      request.session.userId = userId
      request.session.csrfToken = randomBytes(32).toString('base64url')
      await settled((done) => request.session.save(done))
    },
    signOut: () => settled((done) => request.session.destroy(done)),
  }
}

function settled(start: (done: (error?: unknown) => void) => void): Promise<void> {
  return new Promise((resolve, reject) => {
    start((error) => {
      if (error === undefined || error === null) resolve()
      else reject(error instanceof Error ? error : new Error('The session store failed.', { cause: error }))
    })
  })
}
