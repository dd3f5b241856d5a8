import { type ChildProcess, spawn } from 'node:child_process'
import { once } from 'node:events'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createRandom } from '@shared/numeric'
import { type ApiServer, openApiServer } from '../../support/api-server'
import { mailsOnce, queueMails } from '../../support/mail-queue'
import { cleanEnvironment } from '../../support/server-environment'
import { openMailServer } from '../../support/smtp-server'

const MAILS = 200
const KILLS = 10
const STEPS_OF_A_MAIL = 5
const WORKERS = 3

let server: ApiServer

beforeAll(async () => {
  server = await openApiServer()
})

afterAll(() => server.close())

/** Moments of the killing: after so many steps of mails on their way in, drawn from a seed. */
function moments(seed: number): number[] {
  const random = createRandom(seed)
  const drawn = new Set<number>()
  while (drawn.size < KILLS) drawn.add(1 + random.integer(MAILS * STEPS_OF_A_MAIL))
  return [...drawn].sort((a, b) => a - b)
}

function startWorker(smtpUrl: string): ChildProcess {
  return spawn(process.execPath, ['--import', 'tsx', 'server/worker.ts'], {
    env: cleanEnvironment({ DATABASE_URL: server.databaseUrl, SMTP_URL: smtpUrl, LOG_LEVEL: 'silent' }),
    stdio: 'ignore',
  })
}

describe('a worker process that is killed ten times while 200 mails go out', () => {
  it('loses none, and repeats some at most under the same Message-Id', { timeout: 120_000 }, async () => {
    const due = moments(20261201)
    let steps = 0
    let kills = 0
    let worker: ChildProcess
    const mailServer = await openMailServer({
      onStep: () => {
        steps++
        if (kills < KILLS && steps >= due[kills] && worker.exitCode === null && !worker.killed) {
          kills++
          worker.kill('SIGKILL')
        }
      },
    })
    const addresses = Array.from({ length: MAILS }, (_, index) => `person${index}@example.org`)
    await queueMails(server.dataSource, addresses)
    worker = startWorker(mailServer.url)
    const done = mailsOnce(server.dataSource, ({ sentAt }) => sentAt !== null)
    let finished = false
    void done.then(
      () => (finished = true),
      () => (finished = true),
    )
    while (!finished) {
      const ended = once(worker, 'exit')
      await Promise.race([ended, done])
      if (worker.killed) worker = startWorker(mailServer.url)
    }
    await done
    worker.kill('SIGTERM')
    await once(worker, 'exit')
    await mailServer.close()

    expect(kills).toBe(KILLS)
    const ids = new Map(addresses.map((address) => [address, [] as string[]]))
    for (const { to, messageId } of mailServer.taken) ids.get(to)?.push(messageId)
    const all = [...ids.values()]
    expect(all.every((each) => each.length >= 1)).toBe(true)
    expect(all.every((each) => new Set(each).size === 1)).toBe(true)
    expect(new Set(all.map(([first]) => first)).size).toBe(MAILS)
    // A kill can leave accepted but unmarked what that process had under way, and no more.
    expect(mailServer.taken.length - MAILS).toBeLessThanOrEqual(KILLS * WORKERS)
  })
})
