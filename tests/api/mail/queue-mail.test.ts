import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { MAIL_TRIES, type QueuedMail, queueMail } from '../../../server/mail/queue-mail'
import { type ApiServer, openApiServer } from '../../support/api-server'

let server: ApiServer

beforeAll(async () => {
  server = await openApiServer()
})

beforeEach(async () => {
  await server.dataSource.query('delete from "mail"')
  await server.dataSource.query('delete from graphile_worker._private_jobs')
})

afterAll(() => server.close())

const MAIL: QueuedMail = {
  eventKey: 'event 1, ada@example.org',
  groupId: null,
  to: 'ada@example.org',
  subject: 'Hello',
  text: 'Text',
}

const counts = async () => {
  const [{ mails, jobs }]: { mails: number; jobs: number }[] = await server.dataSource.query(
    `select (select count(*)::int from "mail") as mails, (select count(*)::int from graphile_worker.jobs) as jobs`,
  )
  return { mails, jobs }
}

describe('queueMail', () => {
  it('queues a mail with its job when the transaction of the event stands', async () => {
    await server.dataSource.transaction((manager) => queueMail(manager, MAIL))
    expect(await counts()).toEqual({ mails: 1, jobs: 1 })
  })

  it('leaves no mail and no job when the transaction of the event is taken back', async () => {
    const broken = server.dataSource.transaction(async (manager) => {
      await queueMail(manager, MAIL)
      throw new Error('the event did not happen')
    })
    await expect(broken).rejects.toThrow('the event did not happen')
    expect(await counts()).toEqual({ mails: 0, jobs: 0 })
  })

  it('tells nobody twice of one event, not even from two processes at once', async () => {
    await Promise.all(
      [1, 2, 3, 4].map(() => server.dataSource.transaction((manager) => queueMail(manager, MAIL))),
    )
    expect(await counts()).toEqual({ mails: 1, jobs: 1 })
  })

  it.each([
    'ada@example.org\r\nBcc: eve@example.org',
    'ada@example.org\neve@example.org',
    'ada@example.org, eve@example.org',
    'Ada <ada@example.org>',
    'ada',
    '@example.org',
    'ada@',
    '',
    'ada@example.org\u2028',
    `${'a'.repeat(250)}@example.org`,
  ])('refuses %j as an address, and writes nothing', async (to) => {
    const queued = server.dataSource.transaction((manager) => queueMail(manager, { ...MAIL, to }))
    await expect(queued).rejects.toMatchObject({ code: 'MAIL_ADDRESS_INVALID' })
    expect(await counts()).toEqual({ mails: 0, jobs: 0 })
  })

  it.each(['Hello\r\nBcc: eve@example.org', 'Hello\nthere', 'Hello\u0000'])(
    'refuses %j as a subject, and writes nothing',
    async (subject) => {
      const queued = server.dataSource.transaction((manager) => queueMail(manager, { ...MAIL, subject }))
      await expect(queued).rejects.toMatchObject({ code: 'MAIL_SUBJECT_INVALID' })
      expect(await counts()).toEqual({ mails: 0, jobs: 0 })
    },
  )

  it('tries often enough for a mail server that is away for a day, and gives up within a week', () => {
    const waits = Array.from({ length: MAIL_TRIES - 1 }, (_, index) => Math.exp(Math.min(10, index + 1)))
    const seconds = waits.reduce((sum, each) => sum + each, 0)
    expect(seconds).toBeGreaterThan(86_400)
    expect(seconds).toBeLessThan(7 * 86_400)
  })
})
