import { EventEmitter } from 'node:events'
import { setTimeout as delay } from 'node:timers/promises'
import { Logger as QueueLogger, run, type Runner, type TaskList, type WorkerEvents } from 'graphile-worker'
import { Pool } from 'pg'
import type { Logger } from 'pino'
import { z } from 'zod'
import { createMailer } from './mailer'
import { SEND_MAIL } from './queue-mail'
import { sendQueued } from './send-queued'
import { freeJobsOfTheDead, openWorkerMarks } from './worker-marks'

/** Mails under way at the same time. */
const CONCURRENCY = 3

/** How often jobs of killed workers are looked for, and how soon a worker that lost the database starts again; ms. */
const LOOK_FOR_DEAD = 10_000
const START_AGAIN = 2_000

/** How long mails under way may take when the worker stops, ms. One cut off then is sent again, under the same Message-Id. */
const GRACE = 5_000

const payloadSchema = z.object({ mailId: z.uuid() })

/** What a worker needs. */
export interface MailWorkerOptions {
  readonly databaseUrl: string
  readonly smtpUrl: string
  /** Sender, as in "Beadwright <beads@example.org>". */
  readonly mailFrom: string
  /** The mails reach a tray on this machine only: those of an invented group go there too. */
  readonly staysHere: boolean
  readonly logger: Logger
}

/** A worker that sends queued mails until it is stopped. */
export interface MailWorker {
  stop(): Promise<void>
}

/**
 * Starts to send. Any number of workers may run on one database, in the server's process or in others. When the database goes
 * away the worker waits for it.
 */
export function startMailWorker({
  databaseUrl,
  smtpUrl,
  mailFrom,
  staysHere,
  logger,
}: MailWorkerOptions): MailWorker {
  const pool = new Pool({
    connectionString: databaseUrl,
    // Each mail holds one connection while it goes out; the queue itself listens on one and asks on others.
    max: 2 * CONCURRENCY + 2,
    application_name: 'beadwright worker',
  })
  const lost = (error: Error): void => logger.warn({ err: error }, 'mail worker: connection lost')
  pool.on('error', lost)
  pool.on('connect', (client) => client.on('error', lost))
  const stopping = new AbortController()
  const { signal } = stopping
  const mailer = createMailer(smtpUrl, mailFrom)
  const taskList: TaskList = {
    [SEND_MAIL]: async (payload, { job }) => {
      const { mailId } = payloadSchema.parse(payload)
      await sendQueued(pool, mailer, mailId, { staysHere, lastTry: job.attempts >= job.max_attempts })
    },
  }

  /** Runs until stopped, or until the database is lost. */
  async function runOnce(): Promise<void> {
    const events: WorkerEvents = new EventEmitter()
    let runner: Runner | null = null
    const end = (): void => void runner?.stop().catch(() => undefined)
    const marks = await openWorkerMarks(databaseUrl, end)
    events.on('worker:create', ({ worker }) => void marks.add(worker.workerId).catch(end))
    const look = setInterval(() => void freeJobs(), LOOK_FOR_DEAD)
    try {
      await freeJobs()
      runner = await run({
        // One of ours: of a pool that the queue makes for itself, a broken connection ends the process once the queue has stopped.
        pgPool: pool,
        concurrency: CONCURRENCY,
        noHandleSignals: true,
        crontab: '# none',
        events,
        taskList,
        logger: queueLogger(logger),
      })
      signal.addEventListener('abort', end, { once: true })
      if (signal.aborted) end()
      await runner.promise
    } finally {
      clearInterval(look)
      signal.removeEventListener('abort', end)
      await marks.close().catch(() => undefined)
    }
  }

  async function freeJobs(): Promise<void> {
    try {
      const workers = await freeJobsOfTheDead(pool)
      if (workers > 0)
        logger.warn({ workers }, 'mail worker: took over from workers that ended without a word')
    } catch (error) {
      logger.warn({ err: error }, 'mail worker: the database cannot be asked')
    }
  }

  async function runOn(): Promise<void> {
    while (!signal.aborted) {
      try {
        await runOnce()
      } catch (error) {
        logger.error({ err: error }, 'mail worker: starts again')
      }
      await delay(START_AGAIN, undefined, { signal }).catch(() => undefined)
    }
  }

  const ended = runOn()
  return {
    stop: async () => {
      stopping.abort()
      await Promise.race([ended, delay(GRACE, undefined, { ref: false })])
      await pool.end()
    },
  }
}

/** What the queue says, in our log; what a failed mail says is in the mail's own row too. */
function queueLogger(logger: Logger): QueueLogger {
  return new QueueLogger(() => (level, message) => {
    if (String(level) === 'error') logger.warn({ queue: message }, 'mail worker')
    else logger.debug({ queue: message }, 'mail worker')
  })
}
