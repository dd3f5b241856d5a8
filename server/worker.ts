import { ConfigError, readConfig } from './config'
import { createLogger } from './logger'
import { startMailWorker } from './mail/mail-worker'

/** Sends queued mail in a process of its own, beside servers started with WORKER=off. Ends on SIGINT or SIGTERM. */
function main(): void {
  const config = readConfig(process.env)
  if (config.smtpUrl === null)
    throw new ConfigError(['SMTP_URL must name the mail server that takes the mails.'])
  const logger = createLogger(config.logLevel)
  const { databaseUrl, smtpUrl, mailFrom } = config
  const worker = startMailWorker({ databaseUrl, smtpUrl, mailFrom, staysHere: false, logger })
  logger.info('mail worker: running')
  for (const signal of ['SIGINT', 'SIGTERM'] as const) {
    process.once(signal, () => void worker.stop().then(() => logger.info('mail worker: stopped')))
  }
}

try {
  main()
} catch (error) {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`)
  process.exitCode = 1
}
