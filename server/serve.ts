import { createServer, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import { existsSync } from 'node:fs'
import { join } from 'node:path'
import { Pool } from 'pg'
import type { Logger } from 'pino'
import { createApp } from './app'
import type { Config } from './config'
import { createDataSource, migrate } from './data-source'
import { seedDemo } from './demo/seed-demo'
import { startCatcher } from './mail/catcher'
import { linksFrom } from './mail/links'
import { startMailWorker } from './mail/mail-worker'
import { packageRoot, packageVersion } from './package-root'
import { createServices } from './services'

/** How long requests under way may take to end when the server stops. */
const GRACE = 8_000

/** A server that accepts requests. */
export interface RunningServer {
  readonly port: number
  /** Path of the link for the first owner; null when one is in. */
  readonly setUpPath: string | null
  /** Ends requests under way, then everything else. */
  stop(): Promise<void>
}

/**
 * Connects to the database, brings it up to date, and listens.
 *
 * @throws what the database or the port refuses; everything opened so far is closed then
 */
export async function serve(config: Config, logger: Logger): Promise<RunningServer> {
  const root = packageRoot(import.meta.dirname)
  const dataSource = createDataSource(config.databaseUrl)
  const sessionPool = new Pool({
    connectionString: config.databaseUrl,
    max: 5,
    application_name: 'beadwright',
  })
  // Without a listener an idle connection that breaks would end the process.
  sessionPool.on('error', (error) => logger.error({ err: error }, 'session connection lost'))
  const closing: (() => Promise<unknown>)[] = [() => sessionPool.end()]
  const close = async (): Promise<void> => {
    for (const end of closing.splice(0).reverse()) await end()
  }
  try {
    await dataSource.initialize()
    closing.push(() => dataSource.destroy())
    await migrate(dataSource)
    let publicUrl = config.publicUrl ?? `http://127.0.0.1:${config.port}`
    const services = createServices(dataSource, {
      demo: config.demo,
      version: packageVersion(root),
      tray: config.mailCatcher,
      linkTo: linksFrom(() => publicUrl),
    })
    if (config.demo) logger.info({ demo: await seedDemo(dataSource, services) }, 'demo')
    else await services.sessions.endDemoSessions()
    const catcher = config.mailCatcher ? await startCatcher((mail) => services.tray.keep(mail)) : null
    if (catcher) closing.push(() => catcher.close())
    const token = await services.setUp.offer()
    const clientFolder = join(root, 'dist', 'client')
    const app = createApp({
      services,
      sessionPool,
      sessionSecret: config.sessionSecret ?? (await services.settings.sessionSecret()),
      logger,
      trustedProxies: config.trustedProxies,
      clientFolder: existsSync(clientFolder) ? clientFolder : null,
    })
    closing.push(() => app.close())
    const smtpUrl = config.smtpUrl ?? catcher?.smtpUrl ?? null
    if (config.worker && smtpUrl !== null) {
      const { databaseUrl, mailFrom } = config
      const worker = startMailWorker({
        databaseUrl,
        smtpUrl,
        mailFrom,
        staysHere: config.mailCatcher,
        logger,
      })
      closing.push(() => worker.stop())
    }
    const server = createServer(app.express)
    await listen(server, config)
    closing.push(() => stopListening(server))
    const { port } = server.address() as AddressInfo
    publicUrl = config.publicUrl ?? `http://127.0.0.1:${port}`
    return { port, setUpPath: token === null ? null : `/set-up/${token}`, stop: close }
  } catch (error) {
    await close()
    throw error
  }
}

function listen(server: Server, { port, host }: Config): Promise<void> {
  return new Promise((resolve, reject) => {
    server.once('error', reject)
    server.listen(port, host, () => {
      server.off('error', reject)
      resolve()
    })
  })
}

/** Lets requests under way end, for a while; idle connections are closed at once. */
function stopListening(server: Server): Promise<void> {
  return new Promise((resolve) => {
    const impatience = setTimeout(() => server.closeAllConnections(), GRACE)
    server.close(() => {
      clearTimeout(impatience)
      resolve()
    })
    server.closeIdleConnections()
  })
}
