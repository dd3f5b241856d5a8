import type { Recipient, ReturnStanding } from '@shared/contracts/delivery'
import { formatDay } from '@/format/dates'

/** A table by its name, or the whole: "E–H with B–E–H". */
export function tableWords(name: string | null): string {
  return name === null ? 'the whole hand-over' : name.replace(' · ', ' with ')
}

/** What became of a file that was sent back. */
export const RETURN_WORDS: Readonly<Record<ReturnStanding, string>> = {
  new: 'not looked at yet',
  taken: 'taken',
  'set aside': 'set aside',
}

/** How far a hand-over is with a recipient, with the day. */
export function recipientWords(recipient: Recipient): string {
  const { state, sentAt, openedAt, acknowledgedAt, acknowledgedBy, revokedAt, expiresAt } = recipient
  const on = (day: string | null): string => (day === null ? '' : ` ${formatDay(day)}`)
  const words: Readonly<Record<Recipient['state'], string>> = {
    waiting: 'waits for the mail server',
    'not delivered': 'refused by the mail server',
    sent: `sent${on(sentAt)}`,
    opened: `opened${on(openedAt)}`,
    acknowledged: `received${on(acknowledgedAt)}${acknowledgedBy === null ? '' : `, says ${acknowledgedBy}`}`,
    expired: `link ended${on(expiresAt)}`,
    revoked: `revoked${on(revokedAt)}`,
  }
  return words[state]
}
