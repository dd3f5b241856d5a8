import { destination, type Logger, type LoggerOptions, pino } from 'pino'

/** Properties of a database error that say what failed without repeating the values that were sent. */
const ERROR_FIELDS = ['code', 'constraint', 'table', 'column', 'routine'] as const

/**
 * An error for the log: what, where and why, down to its cause. The values of a failed statement stay out, since they may
 * be a password hash or the content of a file.
 */
export function errorForLog(error: unknown): unknown {
  if (!(error instanceof Error)) return { message: String(error) }
  const inner = (error as Error & { driverError?: unknown }).driverError
  const fields = Object.fromEntries(
    ERROR_FIELDS.map((name) => [name, ((inner ?? error) as Record<string, unknown>)[name]]),
  )
  const cause = error.cause === undefined ? undefined : errorForLog(error.cause)
  return { type: error.name, message: error.message, stack: error.stack, ...fields, cause }
}

/** How a line of the log looks, and what never stands in it. */
export const LOG_OPTIONS = {
  base: undefined,
  timestamp: () => `,"time":"${new Date().toISOString()}"`,
  formatters: { level: (label: string) => ({ level: label }) },
  serializers: { err: errorForLog },
  redact: {
    paths: ['password', 'token', 'csrfToken', 'cookie', 'headers'].flatMap((name) => [name, `*.${name}`]),
    censor: '[redacted]',
  },
} satisfies LoggerOptions

/** Logs are lines of JSON on standard error: standard output is for the lines that the start script reads. */
export function createLogger(level: string): Logger {
  return pino({ ...LOG_OPTIONS, level }, destination({ dest: 2, sync: true }))
}
