import { resolve } from 'node:path'
import { StartError } from './start-error.mjs'

const DEFAULT_PORT = 4300

/**
 * The environment, checked.
 *
 * @returns {{ port: { number: number, given: boolean }, host: string, databaseUrl: string | null,
 *   dataFolder: string | null, demo: 'on' | 'off', mailCatcher: 'on' | 'off' }}
 */
export function readSettings(environment) {
  const databaseUrl = environment.DATABASE_URL || null
  return {
    port: readPort(environment.PORT),
    host: environment.HOST || '127.0.0.1',
    databaseUrl,
    dataFolder: environment.DATA_DIR ? resolve(environment.DATA_DIR) : null,
    demo: readDemo(environment.DEMO, databaseUrl),
    mailCatcher: chooseCatcher(environment, databaseUrl),
  }
}

/** Where a browser on this machine finds a server that listens on `host`. */
export function localUrl(host, port) {
  if (host === '0.0.0.0' || host === '::') return `http://127.0.0.1:${port}`
  return `http://${host.includes(':') ? `[${host}]` : host}:${port}`
}

function readPort(text) {
  if (!text) return { number: DEFAULT_PORT, given: false }
  const number = Number(text)
  if (!/^\d+$/.test(text) || number > 65535) {
    throw new StartError(`PORT must be a whole number from 0 to 65535, not "${text}".`)
  }
  return { number, given: true }
}

/**
 * Mails go into a tray on this machine only beside our own database, without a mail server, and where nobody comes in from
 * elsewhere: the tray shows links that let people in.
 */
function chooseCatcher({ HOST, SMTP_URL, PUBLIC_URL, TRUST_PROXY }, databaseUrl) {
  const alone = !HOST || HOST === 'localhost' || HOST === '::1' || HOST.startsWith('127.')
  const proxied = TRUST_PROXY && TRUST_PROXY !== 'off' && TRUST_PROXY !== '0'
  return databaseUrl || SMTP_URL || PUBLIC_URL || proxied || !alone ? 'off' : 'on'
}

/** The invented group goes into our own new database unless told otherwise, and never unasked into a given one. */
function readDemo(text, databaseUrl) {
  if (!text) return databaseUrl ? 'off' : 'on'
  if (text !== 'on' && text !== 'off') throw new StartError(`DEMO must be "on" or "off", not "${text}".`)
  return text
}
