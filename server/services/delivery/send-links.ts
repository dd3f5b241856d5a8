import type { EntityManager } from 'typeorm'
import type { RecipientName } from '../../../shared/contracts/delivery'
import { Recipient } from '../../entities/recipient.entity'
import { User } from '../../entities/user.entity'
import { HttpError, notFound } from '../../errors/http-error'
import type { LinkTo } from '../../mail/links'
import { findReleased } from '../hand-over/find-released'
import type { ReleasedHandOver } from '../hand-over/archive'
import type { Member } from '../member'
import { makeToken } from '../tokens'
import { mailHandOver } from './delivery-mails'

const DAY = 86_400_000

/** When a link that is made now ends. */
export function linkExpiry(days: number): Date {
  return new Date(Date.now() + days * DAY)
}

/**
 * A hand-over that may be sent; it cannot be withdrawn until the end of the transaction.
 *
 * @throws {HttpError} NOT_FOUND before its release; HAND_OVER_WITHDRAWN
 */
export async function lockSendable(
  manager: EntityManager,
  groupId: string,
  handOverId: string,
): Promise<ReleasedHandOver> {
  await manager.query('select 1 from "hand_over" where "id" = $1 for share', [handOverId])
  const handOver = await findReleased(manager, groupId, handOverId)
  if (handOver.withdrawnAt !== null) {
    throw new HttpError('HAND_OVER_WITHDRAWN', 'This hand-over was withdrawn: it is not sent any more.')
  }
  return handOver
}

/** Locks a recipient of the group. @throws {HttpError} NOT_FOUND */
export async function lockRecipient(
  manager: EntityManager,
  groupId: string,
  recipientId: string,
): Promise<Recipient> {
  const recipient = await manager.findOne(Recipient, {
    where: { id: recipientId, groupId },
    lock: { mode: 'pessimistic_write' },
  })
  if (!recipient) throw notFound('recipient')
  return recipient
}

/** How a link goes out. */
export interface LinkTerms {
  readonly days: number
  readonly message: string
  readonly linkTo: LinkTo
}

/** Makes a recipient and sends the first link. @throws {HttpError} MAIL_ADDRESS_INVALID */
export async function sendFirst(
  manager: EntityManager,
  member: Member,
  handOver: ReleasedHandOver,
  { name, email }: RecipientName,
  terms: LinkTerms,
): Promise<Recipient> {
  const { token, tokenSha256 } = makeToken()
  const user = await manager.findOneBy(User, { email })
  const recipient = await manager.save(Recipient, {
    groupId: handOver.groupId,
    handOverId: handOver.id,
    name,
    email,
    userId: user?.id ?? null,
    tokenSha256,
    pastTokensSha256: [],
    sent: 1,
    sentAt: new Date(),
    sentById: member.userId,
    expiresAt: linkExpiry(terms.days),
    revokedAt: null,
    openedAt: null,
    acknowledgedAt: null,
    acknowledgedBy: null,
  })
  await mail(manager, member, handOver, recipient, token, terms)
  return recipient
}

/** Sends another link; those before lead nowhere from now on. */
export async function sendAnother(
  manager: EntityManager,
  member: Member,
  handOver: ReleasedHandOver,
  recipient: Recipient,
  terms: LinkTerms,
): Promise<void> {
  const { token, tokenSha256 } = makeToken()
  Object.assign(recipient, {
    pastTokensSha256: [...recipient.pastTokensSha256, recipient.tokenSha256],
    tokenSha256,
    sent: recipient.sent + 1,
    sentAt: new Date(),
    sentById: member.userId,
    expiresAt: linkExpiry(terms.days),
    revokedAt: null,
  })
  await manager.save(Recipient, recipient)
  await mail(manager, member, handOver, recipient, token, terms)
}

async function mail(
  manager: EntityManager,
  { userId }: Member,
  handOver: ReleasedHandOver,
  recipient: Recipient,
  token: string,
  { message, linkTo }: LinkTerms,
): Promise<void> {
  const sender = await manager.findOneBy(User, { id: userId })
  const before = await numberBefore(manager, handOver, recipient.email)
  await mailHandOver(manager, {
    handOver,
    recipient,
    sender: sender?.name ?? handOver.frozen.group,
    message,
    link: linkTo(`/received/${token}`),
    replaces: before,
  })
}

/** The newest hand-over that this one takes the place of and that went to the same address; null for none. */
async function numberBefore(
  manager: EntityManager,
  handOver: ReleasedHandOver,
  email: string,
): Promise<number | null> {
  const rows: { number: number }[] = await manager.query(
    `${BEFORE} select h."number" from before h join "recipient" r on r."hand_over_id" = h."id"
      where r."email" = $2 order by h."number" desc limit 1`,
    [handOver.previousId, email],
  )
  return rows[0]?.number ?? null
}

/** The hand-overs that one takes the place of, from the one in $1 on. */
export const BEFORE = `with recursive before as (
    select "id", "number", "previous_id" from "hand_over" where "id" = $1
    union all
    select h."id", h."number", h."previous_id" from "hand_over" h join before b on h."id" = b."previous_id")`
