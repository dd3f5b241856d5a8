import type { Pool, PoolClient } from 'pg'
import { isRefusedForGood, type Mailer, type OutgoingMail } from './mailer'

/** How a mail server's words are kept: enough to understand, not a page. */
const ERROR_LENGTH = 500

/** A connection that fell silent in mid-transaction (its machine is gone) lets go of the mail after this. */
const SILENCE = '120s'

const INVENTED = 'The group is invented: no mail of it leaves this machine.'

const OPEN = `"id" = $1 and "sent_at" is null and "failed_at" is null`

/** How a mail is sent. */
export interface SendingTerms {
  /** Nothing leaves this machine. Where mails do, those of an invented group are not sent: anyone may act in it. */
  readonly staysHere: boolean
  /** A failure is recorded as the end: nobody tries again. */
  readonly lastTry: boolean
}

/**
 * Sends one queued mail and marks it. The row stays locked from before sending until it is marked, so that no two workers
 * send it at the same time.
 *
 * At least once: SMTP knows no transactions. A process killed after the mail server took the mail and before the mark is
 * committed sends it again, under the same Message-Id. Marking first would turn the same kill into a mail that is lost, and an
 * invitation lost is worse than one that comes twice. Nothing but the mark stands between acceptance and commit.
 *
 * @throws what went wrong, when the mail is to be tried again
 */
export async function sendQueued(
  pool: Pool,
  mailer: Mailer,
  mailId: string,
  terms: SendingTerms,
): Promise<void> {
  const client = await pool.connect()
  let failure: Error | null
  try {
    await client.query('begin')
    await client.query(`set local idle_in_transaction_session_timeout = '${SILENCE}'`)
    failure = await sendLocked(client, mailer, mailId, terms)
    await client.query('commit')
  } catch (error) {
    // A connection that failed in mid-transaction goes; the database takes back what it had begun.
    client.release(true)
    throw error
  }
  client.release()
  if (failure !== null) throw failure
}

async function sendLocked(
  client: PoolClient,
  mailer: Mailer,
  mailId: string,
  terms: SendingTerms,
): Promise<Error | null> {
  const { rows } = await client.query<OutgoingMail & { readonly invented: boolean }>(
    `select "id", "to", "subject", "text", "created_at" as "createdAt",
            exists (select 1 from "group" g where g."id" = "group_id" and g."demo") as "invented"
       from "mail" where ${OPEN} for update skip locked`,
    [mailId],
  )
  if (!rows[0]) {
    return (await isOpen(client, mailId)) ? new Error('Another worker is sending this mail.') : null
  }
  if (rows[0].invented && !terms.staysHere) {
    await giveUp(client, mailId, INVENTED)
    return null
  }
  try {
    await mailer.send(rows[0])
  } catch (error) {
    return recordFailure(client, mailId, error, terms)
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
  { lastTry }: SendingTerms,
): Promise<Error | null> {
  const failure = error instanceof Error ? error : new Error(String(error))
  const words = failure.message.slice(0, ERROR_LENGTH)
  const refused = isRefusedForGood(error)
  if (refused || lastTry) await giveUp(client, mailId, words)
  else await client.query(`update "mail" set "last_error" = $2 where "id" = $1`, [mailId, words])
  return refused ? null : failure
}

async function giveUp(client: PoolClient, mailId: string, words: string): Promise<void> {
  await client.query(
    `update "mail" set "last_error" = $2, "failed_at" = clock_timestamp(), "text" = '' where "id" = $1`,
    [mailId, words],
  )
}
