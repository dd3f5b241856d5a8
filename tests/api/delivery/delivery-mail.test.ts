import { pino } from 'pino'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Recipient } from '@shared/contracts/delivery'
import { type MailWorker, startMailWorker } from '../../../server/mail/mail-worker'
import { waitUntil } from '../../../server/start/wait-until.mjs'
import { type ApiServer, openApiServer } from '../../support/api-server'
import { buildDelivery, type Delivery, sendTo } from '../../support/delivery-builder'
import { buildGroup, type TestGroup } from '../../support/group-builder'
import { newAddress } from '../../support/mail-texts'
import { openMailServer, type TestMailServer } from '../../support/smtp-server'

let server: ApiServer
let group: TestGroup
let delivery: Delivery
const workers: MailWorker[] = []
const mailServers: TestMailServer[] = []

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
  delivery = await buildDelivery(server, group)
}, 60_000)

afterAll(async () => {
  await Promise.all(workers.map((worker) => worker.stop()))
  await Promise.all(mailServers.map((each) => each.close()))
  await server.close()
})

function work(smtpUrl: string): MailWorker {
  const { databaseUrl } = server
  const worker = startMailWorker({
    databaseUrl,
    smtpUrl,
    mailFrom: 'Beadwright <beads@beads.example>',
    staysHere: false,
    logger: pino({ level: 'silent' }),
  })
  workers.push(worker)
  return worker
}

async function stateOf(email: string): Promise<Recipient['state'] | undefined> {
  const { recipients } = await server.services.recipients.list(group.owner.member, delivery.handOver.id)
  return recipients.find((each) => each.email === email)?.state
}

const becomes = (email: string, state: Recipient['state']): Promise<true | null> =>
  waitUntil(async () => ((await stateOf(email)) === state ? true : null), { limit: 60_000, interval: 40 })

describe('the e-mail with a link', () => {
  it('waits while the mail server is down, goes out once when it is up, and is forgotten then', async () => {
    const down = await openMailServer()
    await down.close()
    const failing = work(down.url)
    const tried = await waitUntil(
      async () => {
        const rows: unknown[] = await server.dataSource.query(
          `select 1 from "mail" where "to" = $1 and "last_error" is not null`,
          [delivery.email],
        )
        return rows.length > 0 ? true : null
      },
      { limit: 60_000, interval: 40 },
    )
    expect(tried).toBe(true)
    expect(await stateOf(delivery.email)).toBe('waiting')
    await failing.stop()
    workers.splice(workers.indexOf(failing), 1)
    const up = await openMailServer({ refuse: (address) => address.startsWith('refused') })
    mailServers.push(up)
    await server.dataSource.query('update graphile_worker._private_jobs set "run_at" = now()')
    work(up.url)
    expect(await becomes(delivery.email, 'sent')).toBe(true)
    const got = up.taken.filter(({ to }) => to === delivery.email)
    expect(got).toHaveLength(1)
    expect(got[0].text).toContain(`https://beads.example/received/${delivery.token}`)
    const kept: { text: string }[] = await server.dataSource.query(
      `select "text" from "mail" where "to" = $1`,
      [delivery.email],
    )
    expect(kept).toEqual([{ text: '' }])
  })

  it('is shown as refused when the mail server knows no such address', async () => {
    const email = `refused.${newAddress()}`
    await sendTo(server, group, delivery.handOver.id, email)
    expect(await becomes(email, 'not delivered')).toBe(true)
  })
})
