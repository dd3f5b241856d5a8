import { ConfigError, readConfig, type Config } from './config'
import { createLogger } from './logger'
import { serve, type RunningServer } from './serve'

/** Standard output carries two lines for whoever started us: `set-up PATH` if there is one, and `listening PORT`. */
async function main(): Promise<void> {
  const config = readConfig(process.env)
  const logger = createLogger(config.logLevel)
  const server = await serve(config, logger).catch((error: unknown) => {
    logger.fatal({ err: error }, 'not started')
    throw new StartRefused(sentenceFor(error, config))
  })
  if (server.setUpPath !== null) process.stdout.write(`set-up ${server.setUpPath}\n`)
  process.stdout.write(`listening ${server.port}\n`)
  logger.info({ port: server.port }, 'listening')
  for (const signal of ['SIGINT', 'SIGTERM'] as const) process.once(signal, () => void stop(server))

  async function stop(running: RunningServer): Promise<void> {
    logger.info('stopping')
    await running.stop()
    logger.info('stopped')
  }
}

/** Why the server does not run, as a sentence for whoever started it. */
class StartRefused extends Error {}

function sentenceFor(error: unknown, { port, databaseUrl }: Config): string {
  const { code, message } = error as Error & { code?: unknown }
  const { hostname, port: databasePort, pathname } = new URL(databaseUrl)
  const database = `${hostname}:${databasePort || '5432'}${pathname}`
  if (code === 'EADDRINUSE') return `Port ${port} is taken by another program: choose another with PORT.`
  if (code === 'EACCES') return `Port ${port} may not be used by this account: choose another with PORT.`
  if (code === 'ECONNREFUSED' || code === 'ENOTFOUND' || code === 'ETIMEDOUT') {
    return `No database answers at ${database}: check DATABASE_URL, and that PostgreSQL runs.`
  }
  if (code === '28P01' || code === '28000')
    return `The database at ${database} refuses the name or password of DATABASE_URL.`
  if (code === '3D000') return `There is no such database: ${database}. Create it, or correct DATABASE_URL.`
  return `The server could not start: ${message}`
}

main().catch((error: unknown) => {
  const known = error instanceof ConfigError || error instanceof StartRefused
  process.stderr.write(`${known ? error.message : `The server could not start: ${String(error)}`}\n`)
  process.exitCode = 1
})
