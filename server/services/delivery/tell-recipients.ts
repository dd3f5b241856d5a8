import type { EntityManager } from 'typeorm'
import type { HandOver } from '../../entities/hand-over.entity'
import { Recipient } from '../../entities/recipient.entity'
import { findReleased } from '../hand-over/find-released'
import { mailWithdrawal } from './delivery-mails'

/**
 * Tells everyone who has the tables that they were withdrawn: all whose delivery stands, and those whose delivery was revoked
 * after they had taken a file.
 */
export async function tellRecipients(
  manager: EntityManager,
  { id, groupId }: Pick<HandOver, 'id' | 'groupId'>,
  reason: string,
): Promise<void> {
  const handOver = await findReleased(manager, groupId, id)
  const recipients = await manager
    .createQueryBuilder(Recipient, 'recipient')
    .where('recipient.hand_over_id = :id', { id })
    .andWhere(
      '(recipient.revoked_at is null or exists (select 1 from "delivery_download" d where d.recipient_id = recipient.id))',
    )
    .orderBy('recipient.id')
    .getMany()
  for (const recipient of recipients) await mailWithdrawal(manager, handOver, recipient, reason)
}
