import type { DataSource } from 'typeorm'
import { queueMail } from '../../server/mail/queue-mail'
import { waitUntil } from '../../server/start/wait-until.mjs'

/** What the queue holds of one mail. */
export interface QueueRow {
  readonly to: string
  readonly text: string
  readonly sentAt: Date | null
  readonly failedAt: Date | null
  readonly lastError: string | null
}

/** Queues a mail of its own to each address, in one transaction. */
export async function queueMails(dataSource: DataSource, addresses: readonly string[]): Promise<void> {
  await dataSource.transaction(async (manager) => {
    for (const to of addresses) {
      const mail = { eventKey: `test, ${to}`, groupId: null, to, subject: `For ${to}`, text: 'Words' }
      await queueMail(manager, mail)
    }
  })
}

/** The mails of the queue, by address. */
export function mailRows(dataSource: DataSource): Promise<QueueRow[]> {
  return dataSource.query(
    `select "to", "text", "sent_at" as "sentAt", "failed_at" as "failedAt", "last_error" as "lastError"
       from "mail" order by "to"`,
  )
}

/** Waits until all mails are as asked, and returns them. */
export async function mailsOnce(
  dataSource: DataSource,
  condition: (mail: QueueRow) => boolean,
): Promise<QueueRow[]> {
  const found = await waitUntil(
    async () => {
      const mails = await mailRows(dataSource)
      return mails.length > 0 && mails.every(condition) ? mails : null
    },
    { limit: 60_000, interval: 40 },
  )
  if (!found) throw new Error(`The queue did not get there: ${JSON.stringify(await mailRows(dataSource))}`)
  return found
}
