import type { AddressInfo } from 'node:net'
import { simpleParser } from 'mailparser'
import { SMTPServer } from 'smtp-server'

/** What a test may do at each step of a mail's way in. */
export type SmtpStep = 'connect' | 'from' | 'to' | 'data' | 'taken'

/** A mail as the test's mail server took it. */
export interface TakenMail {
  readonly to: string
  readonly messageId: string
  readonly subject: string
  readonly text: string
}

/** A mail server on the loopback address that keeps what it takes. */
export interface TestMailServer {
  readonly url: string
  readonly port: number
  readonly taken: readonly TakenMail[]
  readonly close: () => Promise<void>
}

/**
 * @param options.port a port of before, to come up again at the same place; else any
 * @param options.onStep told before each step is answered; 'taken' after the mail is kept and before the sender hears so
 * @param options.refuse addresses refused for good (550)
 */
export async function openMailServer(
  options: {
    readonly port?: number
    readonly onStep?: (step: SmtpStep) => void
    readonly refuse?: (address: string) => boolean
  } = {},
): Promise<TestMailServer> {
  const { onStep = () => undefined, refuse = () => false } = options
  const taken: TakenMail[] = []
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    disableReverseLookup: true,
    logger: false,
    onConnect: (_session, done) => {
      onStep('connect')
      done()
    },
    onMailFrom: (_address, _session, done) => {
      onStep('from')
      done()
    },
    onRcptTo: ({ address }, _session, done) => {
      onStep('to')
      if (!refuse(address)) return done()
      done(Object.assign(new Error('No such person here'), { responseCode: 550 }))
    },
    onData: (stream, session, done) => {
      onStep('data')
      simpleParser(stream).then(({ messageId = '', subject = '', text = '' }) => {
        const to = session.envelope.rcptTo[0]?.address ?? ''
        taken.push({ to, messageId, subject, text })
        onStep('taken')
        done()
      }, done)
    },
  })
  // A sender that is killed breaks off; that is what is being tested.
  server.on('error', () => undefined)
  await new Promise<void>((resolve) => server.listen(options.port ?? 0, '127.0.0.1', resolve))
  const { port } = server.server.address() as AddressInfo
  return {
    url: `smtp://127.0.0.1:${port}`,
    port,
    taken,
    close: () => new Promise((resolve) => server.close(resolve)),
  }
}
