import { pino } from 'pino'
import request from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Tray } from '@shared/contracts/tray'
import { type Catcher, startCatcher } from '../../../server/mail/catcher'
import { type MailWorker, startMailWorker } from '../../../server/mail/mail-worker'
import { createMailer } from '../../../server/mail/mailer'
import { type ApiServer, openApiServer } from '../../support/api-server'
import { buildGroup } from '../../support/group-builder'
import { newAddress } from '../../support/mail-texts'

const FROM = 'Beadwright <beadwright@localhost>'

let server: ApiServer
let catcher: Catcher
let worker: MailWorker

beforeAll(async () => {
  server = await openApiServer({ tray: true })
  catcher = await startCatcher((mail) => server.services.tray.keep(mail))
  worker = startMailWorker({
    databaseUrl: server.databaseUrl,
    smtpUrl: catcher.smtpUrl,
    mailFrom: FROM,
    staysHere: true,
    logger: pino({ level: 'silent' }),
  })
})

afterAll(async () => {
  await worker.stop()
  await catcher.close()
  await server.close()
})

const tray = async (): Promise<Tray> => (await request(server.app).get('/api/tray')).body as Tray

describe('the tray', () => {
  it('shows a mail on this machine with its text and its link, from invitation to tray', async () => {
    const group = await buildGroup(server)
    const email = newAddress()
    await server.services.invitations.invite(group.owner.member, { email, role: 'reviewer' })
    await expect.poll(async () => (await tray()).mails.length, { timeout: 15_000 }).toBe(1)
    const [mail] = (await tray()).mails
    expect(mail).toMatchObject({ to: email, subject: expect.stringMatching(/^Invitation to /) as string })
    expect(mail.text).toMatch(/^https:\/\/beads\.example\/join\/\S+$/m)
  })

  it('folds a mail that came twice under one Message-Id', async () => {
    const mail = {
      id: '1b4e28ba-2fa1-4d12-883f-0016d3cca427',
      to: 'ada@example.org',
      subject: 'Twice: θ, ≤ and π',
      text: 'Line one\n\nLine two with θ',
      createdAt: new Date(),
    }
    const mailer = createMailer(catcher.smtpUrl, FROM)
    await mailer.send(mail)
    await mailer.send(mail)
    const found = (await tray()).mails.filter(({ subject }) => subject === mail.subject)
    expect(found).toHaveLength(1)
    expect(found[0].text.trimEnd()).toBe(mail.text)
  })

  it('is not there where no catcher runs', async () => {
    const other = await openApiServer()
    try {
      const response = await request(other.app).get('/api/tray')
      expect([response.status, response.body]).toMatchObject([404, { code: 'NOT_FOUND' }])
    } finally {
      await other.close()
    }
  })
})
