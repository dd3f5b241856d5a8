import connectPgSimple from 'connect-pg-simple'
import type { RequestHandler } from 'express'
import session from 'express-session'
import type { Pool } from 'pg'
import type { Logger } from 'pino'
import { SIGNED_IN } from './visitor'

export const SESSION_COOKIE = 'beadwright.sid'

const PgStore = connectPgSimple(session)

/** The part of the session middleware that runs on by itself. */
export interface SessionMiddleware {
  readonly handler: RequestHandler
  /** Ends its housekeeping. */
  close(): Promise<void>
}

/** Sessions, kept in the database; the browser holds a signed id in a cookie that scripts cannot read. */
export function createSessions(pool: Pool, secret: string, logger: Logger): SessionMiddleware {
  const store = new PgStore({
    pool,
    tableName: 'session',
    errorLog: (...details: unknown[]) => logger.error({ err: details.at(-1) }, 'session store'),
  })
  const handler = session({
    name: SESSION_COOKIE,
    secret,
    store,
    resave: false,
    saveUninitialized: false,
    rolling: true,
    // Secure follows the scheme of the request: TRUST_PROXY says who may tell it.
    cookie: { httpOnly: true, sameSite: 'lax', secure: 'auto', path: '/', maxAge: SIGNED_IN },
  })
  return { handler, close: () => Promise.resolve(store.close()) }
}
