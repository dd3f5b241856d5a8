import compression from 'compression'
import express, { type Express } from 'express'
import type { Pool } from 'pg'
import type { Logger } from 'pino'
import { serveClient } from './middleware/client'
import { serveApiDocs } from './docs/api-docs'
import { createErrorAnswer, nothingHere } from './middleware/error-answer'
import { createRequestLog } from './middleware/request-log'
import { createLimits } from './middleware/limits'
import { securityHeaders } from './middleware/security-headers'
import { createSessions } from './middleware/session'
import { routes } from './routes'
import { mountRoutes } from './routes/mount-routes'
import type { Services } from './services'

/** What the application stands on. */
export interface AppDependencies {
  readonly services: Services
  /** Connections for the sessions. */
  readonly sessionPool: Pool
  readonly sessionSecret: string
  readonly logger: Logger
  readonly trustedProxies: number
  /** The built browser application; null serves the API alone. */
  readonly clientFolder: string | null
}

/** The application and what of it runs on by itself. */
export interface App {
  readonly express: Express
  /** Ends the housekeeping of the sessions; the pool stays open. */
  close(): Promise<void>
}

/** Puts the server together without listening. */
export function createApp(dependencies: AppDependencies): App {
  const { services, sessionPool, sessionSecret, logger, trustedProxies, clientFolder } = dependencies
  const app = express()
  const sessions = createSessions(sessionPool, sessionSecret, logger)
  app.disable('x-powered-by')
  app.set('trust proxy', trustedProxies)
  app.set('query parser', 'simple')
  app.use(createRequestLog(logger))
  app.use(securityHeaders)
  app.use(compression())
  const limits = createLimits(services.attempts, logger)
  mountRoutes(app, routes, { services, sessions: sessions.handler, limits })
  app.use('/api/docs', serveApiDocs())
  app.use('/api', nothingHere)
  if (clientFolder !== null) app.use(serveClient(clientFolder))
  app.use(nothingHere)
  app.use(createErrorAnswer(logger))
  return { express: app, close: () => sessions.close() }
}
