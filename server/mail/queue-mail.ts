import type { EntityManager } from 'typeorm'
import { HttpError } from '../errors/http-error'

/** The job that sends one mail. */
export const SEND_MAIL = 'send-mail'

/**
 * Tries before a mail is given up. The queue waits e¹, e², … seconds between them, from the tenth on 6.1 hours: 26 tries
 * span 4.2 days, in line with the four to five days of RFC 5321, 4.5.4.1.
 */
export const MAIL_TRIES = 26

/** A mail to one recipient. */
export interface QueuedMail {
  /** Names the event and the recipient, as in "invitation 4711, first". A second mail of the same key is not queued. */
  readonly eventKey: string
  readonly groupId: string | null
  readonly to: string
  readonly subject: string
  /** Plain text. */
  readonly text: string
}

/**
 * Queues a mail, once for its event.
 *
 * @param manager the transaction of the event: the mail goes out exactly when the event stands
 * @throws {HttpError} MAIL_ADDRESS_INVALID, MAIL_SUBJECT_INVALID for what would break out of its line of the header
 */
export async function queueMail(manager: EntityManager, mail: QueuedMail): Promise<void> {
  const { eventKey, groupId, to, subject, text } = mail
  if (!isOneAddress(to)) {
    throw new HttpError('MAIL_ADDRESS_INVALID', 'This is not one e-mail address on one line.', {
      field: 'email',
    })
  }
  if (hasControls(subject)) {
    throw new HttpError('MAIL_SUBJECT_INVALID', 'The subject of an e-mail stands on one line.', {
      field: 'subject',
    })
  }
  await manager.query(
    `with queued as (
       insert into "mail" ("event_key", "group_id", "to", "subject", "text") values ($1, $2, $3, $4, $5)
       on conflict ("event_key") do nothing returning "id")
     select graphile_worker.add_job($6, json_build_object('mailId', "id"), max_attempts => $7) from queued`,
    [eventKey, groupId, to, subject, text, SEND_MAIL, MAIL_TRIES],
  )
}

function hasControls(text: string): boolean {
  return Array.from(text).some(
    (sign) => sign < ' ' || sign === '\u007f' || sign === '\u0085' || /[\u2028\u2029]/.test(sign),
  )
}

/** One address: no list, no display name, nothing that a mail server would read as more than one. */
function isOneAddress(text: string): boolean {
  return text.length <= 254 && !hasControls(text) && /^[^\s<>,;:"()[\]\\@]+@[^\s<>,;:"()[\]\\@]+$/.test(text)
}
