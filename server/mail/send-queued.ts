import type { Pool, PoolClient } from 'pg'
import { isRefusedForGood, type Mailer, type OutgoingMail } from './mailer'

/** How a mail server's words are kept: enough to understand, not a page. */
const ERROR_LENGTH = 500

/** A connection that fell silent in mid-transaction (its machine is gone) lets go of the mail after this. */
const SILENCE = '120s'

const OPEN = `"id" = $1 and "sent_at" is null and "failed_at" is null`

/**
 * Sends one queued mail and marks it. The row stays locked from before sending until it is marked, so that no two workers
 * send it at the same time.
 *
 * At least once: SMTP knows no transactions. A process killed after the mail server took the mail and before the mark is
 * committed sends it again, under the same Message-Id. Marking first would turn the same kill into a mail that is lost, and an
 * invitation lost is worse than one that comes twice. Nothing but the mark stands between acceptance and commit.
 *
 * @param lastTry a failure is recorded as the end: nobody tries again
 * @throws what went wrong, when the mail is to be tried again
 */
export async function sendQueued(
  pool: Pool,
  mailer: Mailer,
  mailId: string,
  lastTry: boolean,
): Promise<void> {
  const client = await pool.connect()
  try {
    await client.query('begin')
    await client.query(`set local idle_in_transaction_session_timeout = '${SILENCE}'`)
    const failure = await sendLocked(client, mailer, mailId, lastTry)
    await client.query('commit')
    client.release()
    if (failure !== null) throw failure
  } catch (error) {
    // A connection that failed in mid-transaction goes; the database takes back what it had begun.
    client.release(true)
    throw error
  }
}

async function sendLocked(
  client: PoolClient,
  mailer: Mailer,
  mailId: string,
  lastTry: boolean,
): Promise<Error | null> {
  const { rows } = await client.query<OutgoingMail>(
    `select "id", "to", "subject", "text", "created_at" as "createdAt" from "mail" where ${OPEN} for update skip locked`,
    [mailId],
  )
  if (!rows[0])
    return (await isOpen(client, mailId)) ? new Error('Another worker is sending this mail.') : null
  try {
    await mailer.send(rows[0])
  } catch (error) {
    return recordFailure(client, mailId, error, lastTry)
  }
  await client.query(
    `update "mail" set "sent_at" = clock_timestamp(), "last_error" = null, "text" = '' where "id" = $1`,
    [mailId],
  )
  return null
}

async function isOpen(client: PoolClient, mailId: string): Promise<boolean> {
  const { rows } = await client.query(`select 1 from "mail" where ${OPEN}`, [mailId])
  return rows.length > 0
}

async function recordFailure(
  client: PoolClient,
  mailId: string,
  error: unknown,
  lastTry: boolean,
): Promise<Error | null> {
  const failure = error instanceof Error ? error : new Error(String(error))
  const words = failure.message.slice(0, ERROR_LENGTH)
  const refused = isRefusedForGood(error)
  const change = refused || lastTry ? `, "failed_at" = clock_timestamp(), "text" = ''` : ''
  await client.query(`update "mail" set "last_error" = $2${change} where "id" = $1`, [mailId, words])
  return refused ? null : failure
}
