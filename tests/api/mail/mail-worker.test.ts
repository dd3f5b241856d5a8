import { pino } from 'pino'
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { type MailWorker, startMailWorker } from '../../../server/mail/mail-worker'
import { type ApiServer, openApiServer } from '../../support/api-server'
import { buildGroup } from '../../support/group-builder'
import { mailRows, mailsOnce, queueMails } from '../../support/mail-queue'
import { openMailServer, type TestMailServer } from '../../support/smtp-server'

let server: ApiServer
let workers: MailWorker[] = []
let mailServers: TestMailServer[] = []

beforeAll(async () => {
  server = await openApiServer()
})

afterEach(async () => {
  await Promise.all(workers.map((worker) => worker.stop()))
  await Promise.all(mailServers.map((each) => each.close()))
  ;[workers, mailServers] = [[], []]
  await server.dataSource.query('delete from "mail"')
  await server.dataSource.query('delete from graphile_worker._private_jobs')
})

afterAll(() => server.close())

async function mailServer(options: Parameters<typeof openMailServer>[0] = {}): Promise<TestMailServer> {
  const opened = await openMailServer(options)
  mailServers.push(opened)
  return opened
}

function work(smtpUrl: string): void {
  const logger = pino({ level: 'silent' })
  const mailFrom = 'Beadwright <beads@beads.example>'
  workers.push(
    startMailWorker({ databaseUrl: server.databaseUrl, smtpUrl, mailFrom, staysHere: false, logger }),
  )
}

const jobs = (): Promise<{ attempts: number; seconds: number }[]> =>
  server.dataSource.query(
    `select "attempts", extract(epoch from "run_at" - now())::float as seconds from graphile_worker.jobs`,
  )

describe('the mail worker', () => {
  it('hands a mail to the mail server under an id of its own, marks it and forgets its text', async () => {
    const { url, taken } = await mailServer()
    await queueMails(server.dataSource, ['ada@example.org'])
    work(url)
    const [mail] = await mailsOnce(server.dataSource, ({ sentAt }) => sentAt !== null)
    expect(mail).toMatchObject({ text: '', failedAt: null, lastError: null })
    expect(taken).toEqual([
      {
        to: 'ada@example.org',
        subject: 'For ada@example.org',
        text: 'Words\n',
        messageId: expect.stringMatching(/^<[0-9a-f-]{36}@beads\.example>$/) as string,
      },
    ])
  })

  it('sends each mail once where several workers run on one database', async () => {
    const { url, taken } = await mailServer()
    const addresses = Array.from({ length: 40 }, (_, index) => `person${index}@example.org`)
    for (let count = 0; count < 3; count++) work(url)
    await queueMails(server.dataSource, addresses)
    await mailsOnce(server.dataSource, ({ sentAt }) => sentAt !== null)
    expect(taken.map(({ to }) => to).sort()).toEqual([...addresses].sort())
  })

  it('keeps a mail while the mail server is down, later each time, and sends it when it is up', async () => {
    const down = await openMailServer()
    await down.close()
    await queueMails(server.dataSource, ['ada@example.org'])
    work(down.url)
    const [waiting] = await mailsOnce(server.dataSource, ({ lastError }) => lastError !== null)
    expect(waiting).toMatchObject({ sentAt: null, failedAt: null, text: 'Words' })
    expect(waiting.lastError).toContain('ECONNREFUSED')

    // An hour of this: eight tries are over, and the next would come in about 50 minutes.
    await server.dataSource.query(
      `update graphile_worker._private_jobs set "attempts" = 7, "run_at" = now(), "locked_at" = null, "locked_by" = null`,
    )
    await server.dataSource.query(`update "mail" set "last_error" = null`)
    await mailsOnce(server.dataSource, ({ lastError }) => lastError !== null)
    await expect
      .poll(async () => (await jobs())[0], { timeout: 10_000 })
      .toMatchObject({ attempts: 8, seconds: expect.closeTo(Math.exp(8), -2) as number })

    const up = await mailServer({ port: down.port })
    await server.dataSource.query('update graphile_worker._private_jobs set "run_at" = now()')
    await mailsOnce(server.dataSource, ({ sentAt }) => sentAt !== null)
    expect(up.taken).toHaveLength(1)
  })

  it('records a refusal for good with the words of the mail server, and does not try again', async () => {
    const { url, taken } = await mailServer({ refuse: (address) => address.startsWith('nobody') })
    await queueMails(server.dataSource, ['ada@example.org', 'nobody@example.org'])
    work(url)
    const mails = await mailsOnce(server.dataSource, ({ sentAt, failedAt }) => (sentAt ?? failedAt) !== null)
    expect(mails[1]).toMatchObject({ sentAt: null, text: '' })
    expect(mails[1].lastError).toContain('No such person here')
    expect(taken.map(({ to }) => to)).toEqual(['ada@example.org'])
    await expect.poll(jobs).toEqual([])
  })

  it('sends no mail of an invented group out of this machine', async () => {
    const { url, taken } = await mailServer()
    const { groupId } = await buildGroup(server, { demo: true })
    await queueMails(server.dataSource, ['ada@example.org'])
    await server.dataSource.query('update "mail" set "group_id" = $1', [groupId])
    work(url)
    const [mail] = await mailsOnce(server.dataSource, ({ failedAt }) => failedAt !== null)
    expect(mail).toMatchObject({ sentAt: null, text: '' })
    expect(taken).toEqual([])
  })

  it('gives a mail up after the last try, and says so', async () => {
    const down = await openMailServer()
    await down.close()
    await queueMails(server.dataSource, ['ada@example.org'])
    await server.dataSource.query('update graphile_worker._private_jobs set "attempts" = "max_attempts" - 1')
    work(down.url)
    const [mail] = await mailsOnce(server.dataSource, ({ failedAt }) => failedAt !== null)
    expect(mail).toMatchObject({ sentAt: null, text: '' })
    expect(mail.lastError).toContain('ECONNREFUSED')
  })

  it('goes on when the database has cut its connections', async () => {
    const { url } = await mailServer()
    work(url)
    await queueMails(server.dataSource, ['ada@example.org'])
    await mailsOnce(server.dataSource, ({ sentAt }) => sentAt !== null)
    await server.dataSource.query(
      `select pg_terminate_backend("pid") from pg_stat_activity
        where "datname" = current_database() and "application_name" <> 'beadwright' and "pid" <> pg_backend_pid()`,
    )
    await queueMails(server.dataSource, ['bo@example.org'])
    await mailsOnce(server.dataSource, ({ sentAt }) => sentAt !== null)
    expect(await mailRows(server.dataSource)).toHaveLength(2)
  })
})
