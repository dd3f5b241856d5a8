import type { AddressInfo } from 'node:net'
import { type AddressObject, simpleParser } from 'mailparser'
import { SMTPServer } from 'smtp-server'

/** Longer mails are refused, in bytes. */
const LARGEST = 5_000_000

/** A mail as it arrived. */
export interface ReceivedMail {
  readonly messageId: string
  readonly from: string
  readonly to: string
  readonly subject: string
  readonly text: string
}

/** A mail server on this machine that sends nothing on. */
export interface Catcher {
  readonly smtpUrl: string
  close(): Promise<void>
}

/**
 * Starts the catcher on the loopback address, at a free port.
 *
 * @param keep is told each mail; the sender hears that it was taken once it has been kept
 */
export async function startCatcher(keep: (mail: ReceivedMail) => Promise<void>): Promise<Catcher> {
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    disableReverseLookup: true,
    size: LARGEST,
    logger: false,
    onData: (stream, _session, done) => {
      simpleParser(stream)
        .then(({ messageId = '', from, to, subject = '', text = '' }) =>
          keep({ messageId, from: addresses(from), to: addresses(to), subject, text }),
        )
        .then(() => done(), done)
    },
  })
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject)
    server.listen(0, '127.0.0.1', () => {
      server.off('error', reject)
      resolve()
    })
  })
  // A sender that breaks off in mid-mail is no reason to end.
  server.on('error', () => undefined)
  const { port } = server.server.address() as AddressInfo
  return {
    smtpUrl: `smtp://127.0.0.1:${port}`,
    close: () => new Promise((resolve) => server.close(resolve)),
  }
}

function addresses(field: AddressObject | AddressObject[] | undefined): string {
  return [field ?? []]
    .flat()
    .map(({ text }) => text)
    .join(', ')
}
