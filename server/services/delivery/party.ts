import type { EntityManager } from 'typeorm'
import { Recipient } from '../../entities/recipient.entity'
import { sha256 } from '../hashes'
import { linkInvalid } from '../link-invalid'
import type { Actor } from '../record-event'

/** A recipient who looks at what was handed to them: by the link of the e-mail, or by an account with the address. */
export interface ReceivingParty {
  readonly recipientId: string
  readonly groupId: string
  readonly handOverId: string
  readonly name: string
  readonly email: string
  readonly via: 'link' | 'account'
  /** null by link: whoever holds it need not be the account. */
  readonly userId: string | null
}

/** Whose link it is. @throws {HttpError} LINK_INVALID with the reason */
export async function partyByToken(manager: EntityManager, token: string): Promise<ReceivingParty> {
  const hash = sha256(token)
  const recipient = await manager
    .createQueryBuilder(Recipient, 'recipient')
    .where('recipient.token_sha256 = :hash or :hash = any(recipient.past_tokens_sha256)', { hash })
    .getOne()
  if (!recipient) throw linkInvalid('unknown')
  if (recipient.revokedAt !== null || recipient.tokenSha256 !== hash) throw linkInvalid('revoked')
  if (recipient.expiresAt <= new Date()) throw linkInvalid('expired')
  return partyOf(recipient, 'link', null)
}

/**
 * The delivery of a hand-over to somebody with an account, at their address or to the account that the address had then. It holds
 * until it is revoked: days are counted for links.
 *
 * @returns null when it was not sent to them
 */
export async function partyByAccount(
  manager: EntityManager,
  handOverId: string,
  userId: string,
): Promise<ReceivingParty | null> {
  const recipient = await manager
    .createQueryBuilder(Recipient, 'recipient')
    .where('recipient.hand_over_id = :handOverId and recipient.revoked_at is null', { handOverId })
    .andWhere(
      '(recipient.user_id = :userId or recipient.email = (select u.email from "user" u where u.id = :userId))',
      { userId },
    )
    .orderBy('recipient.sent_at', 'DESC')
    .getOne()
  return recipient && partyOf(recipient, 'account', userId)
}

/** Who stands in the group's history for what a recipient did. */
export function actorOf({ groupId, userId, name }: ReceivingParty): Actor {
  return { groupId, userId, by: name }
}

function partyOf(
  { id, groupId, handOverId, name, email }: Recipient,
  via: ReceivingParty['via'],
  userId: string | null,
): ReceivingParty {
  return { recipientId: id, groupId, handOverId, name, email, via, userId }
}
