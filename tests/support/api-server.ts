import { Writable } from 'node:stream'
import type { Express } from 'express'
import { Pool } from 'pg'
import { pino } from 'pino'
import type { DataSource } from 'typeorm'
import { createApp } from '../../server/app'
import { createDataSource } from '../../server/data-source'
import { linksFrom } from '../../server/mail/links'
import { LOG_OPTIONS } from '../../server/logger'
import { createServices, type Services } from '../../server/services'
import { createTestDatabase } from './test-database'

/** The application on a database of its own, without a port. */
export interface ApiServer {
  readonly app: Express
  readonly services: Services
  readonly dataSource: DataSource
  readonly databaseUrl: string
  /** Everything logged so far. */
  readonly log: () => string
  /** Removes the database under the running server. */
  readonly dropDatabase: () => Promise<void>
  readonly close: () => Promise<void>
}

export interface ApiServerOptions {
  readonly demo?: boolean
  readonly trustedProxies?: number
  /** The tray of caught mails may be looked into. */
  readonly tray?: boolean
  readonly clientFolder?: string
  /** Of a server that is open already: this one is a second process beside it. */
  readonly databaseUrl?: string
}

/** Opens a server for one test file; close it when the file is done. */
export async function openApiServer(options: ApiServerOptions = {}): Promise<ApiServer> {
  const database = options.databaseUrl
    ? { url: options.databaseUrl, drop: () => Promise.resolve() }
    : await createTestDatabase()
  const dataSource = await createDataSource(database.url).initialize()
  const sessionPool = new Pool({ connectionString: database.url, max: 5 })
  const lines: string[] = []
  const sink = new Writable({
    write: (chunk: Buffer, _encoding, done) => {
      lines.push(chunk.toString())
      done()
    },
  })
  sessionPool.on('error', (error) => lines.push(error.message))
  const services = createServices(dataSource, {
    demo: options.demo ?? false,
    version: '0.0.0',
    tray: options.tray ?? false,
    linkTo: linksFrom(() => 'https://beads.example'),
  })
  const app = createApp({
    services,
    sessionPool,
    sessionSecret: 'a secret of the tests, long enough to sign',
    logger: pino(LOG_OPTIONS, sink),
    trustedProxies: options.trustedProxies ?? 0,
    clientFolder: options.clientFolder ?? null,
  })
  let dropped = false
  const dropDatabase = async (): Promise<void> => {
    if (!dropped) await database.drop()
    dropped = true
  }
  return {
    app: app.express,
    services,
    dataSource,
    databaseUrl: database.url,
    log: () => lines.join(''),
    dropDatabase,
    close: async () => {
      await app.close()
      await sessionPool.end()
      await dataSource.destroy()
      await dropDatabase()
    },
  }
}
