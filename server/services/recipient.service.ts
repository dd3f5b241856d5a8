import { type DataSource, type EntityManager, In } from 'typeorm'
import type { z } from 'zod'
import {
  type Deliveries,
  type deliverySendSchema,
  MAX_RECIPIENTS,
  type RecipientName,
} from '../../shared/contracts/delivery'
import type { HistoryAction, HistoryDetails } from '../../shared/contracts/history'
import { Recipient } from '../entities/recipient.entity'
import { HttpError } from '../errors/http-error'
import type { LinkTo } from '../mail/links'
import { deliveriesBody, earlierRecipients } from './delivery/deliveries-body'
import {
  linkExpiry,
  type LinkTerms,
  lockRecipient,
  lockSendable,
  sendAnother,
  sendFirst,
} from './delivery/send-links'
import type { ReleasedHandOver } from './hand-over/archive'
import { findReleased } from './hand-over/find-released'
import { handOverSubject } from './hand-over/hand-over-name'
import type { Member } from './member'
import { recordEvent } from './record-event'

/** To whom released hand-overs go, as the group handles it. */
export class RecipientService {
  constructor(
    private readonly dataSource: DataSource,
    private readonly linkTo: LinkTo,
  ) {}

  /** Recipients, what they took, asked and sent back. @throws {HttpError} NOT_FOUND before the release */
  async list(member: Member, handOverId: string): Promise<Deliveries> {
    const { manager } = this.dataSource
    return deliveriesBody(manager, await findReleased(manager, member.groupId, handOverId))
  }

  /**
   * Sends a released hand-over: to those named, and with `earlier` to the recipients of the one it replaces. All go, or none.
   *
   * @throws {HttpError} NOT_FOUND; HAND_OVER_WITHDRAWN; IN_USE for an address that has it; VALIDATION_FAILED for nobody or too
   *   many; MAIL_ADDRESS_INVALID
   */
  async send(
    member: Member,
    handOverId: string,
    { recipients, earlier, days, message }: z.output<typeof deliverySendSchema>,
  ): Promise<Deliveries> {
    await this.dataSource.transaction(async (manager) => {
      const handOver = await lockSendable(manager, member.groupId, handOverId)
      const all = [...recipients, ...(earlier ? await earlierRecipients(manager, handOver) : [])]
      await this.checkNew(manager, handOver, once(all))
      const terms = { days, message, linkTo: this.linkTo }
      for (const to of once(all)) {
        const recipient = await sendFirst(manager, member, handOver, to, terms)
        await record(manager, member, handOver, 'hand-over sent', recipient)
      }
    })
    return this.list(member, handOverId)
  }

  /** Sends a new link; the one before ends. One who was shut out is let in again. @throws {HttpError} NOT_FOUND; HAND_OVER_WITHDRAWN */
  async sendAgain(member: Member, recipientId: string, days: number): Promise<Deliveries> {
    return this.change(member, recipientId, async (manager, recipient) => {
      const handOver = await lockSendable(manager, member.groupId, recipient.handOverId)
      const terms: LinkTerms = { days, message: '', linkTo: this.linkTo }
      await sendAnother(manager, member, handOver, recipient, terms)
      return 'link sent again'
    })
  }

  /** Lets the link that is out work for so many days from now. @throws {HttpError} NOT_FOUND; CONFLICT once it was revoked */
  async extend(member: Member, recipientId: string, days: number): Promise<Deliveries> {
    return this.change(member, recipientId, async (manager, recipient) => {
      if (recipient.revokedAt !== null) {
        throw new HttpError('CONFLICT', 'This link was revoked: send a new one.')
      }
      await manager.save(Recipient, Object.assign(recipient, { expiresAt: linkExpiry(days) }))
      return 'link extended'
    })
  }

  /** Ends the link, and what the account sees. Twice is as once. @throws {HttpError} NOT_FOUND */
  async revoke(member: Member, recipientId: string): Promise<Deliveries> {
    return this.change(member, recipientId, async (manager, recipient) => {
      if (recipient.revokedAt !== null) return null
      await manager.save(Recipient, Object.assign(recipient, { revokedAt: new Date() }))
      return 'link revoked'
    })
  }

  private async change(
    member: Member,
    recipientId: string,
    step: (manager: EntityManager, recipient: Recipient) => Promise<HistoryAction | null>,
  ): Promise<Deliveries> {
    const handOverId = await this.dataSource.transaction(async (manager) => {
      const recipient = await lockRecipient(manager, member.groupId, recipientId)
      const action = await step(manager, recipient)
      const handOver = await findReleased(manager, member.groupId, recipient.handOverId)
      if (action !== null) await record(manager, member, handOver, action, recipient)
      return recipient.handOverId
    })
    return this.list(member, handOverId)
  }

  private async checkNew(
    manager: EntityManager,
    { id }: ReleasedHandOver,
    recipients: readonly RecipientName[],
  ): Promise<void> {
    if (recipients.length === 0 || recipients.length > MAX_RECIPIENTS) {
      const message =
        recipients.length === 0
          ? 'Name somebody to send it to.'
          : `Send it to ${MAX_RECIPIENTS} at most at once.`
      throw new HttpError('VALIDATION_FAILED', message, { field: 'recipients' })
    }
    const has = await manager.findOneBy(Recipient, {
      handOverId: id,
      email: In(recipients.map(({ email }) => email)),
    })
    if (!has) return
    throw new HttpError('IN_USE', `${has.email} has this hand-over: send the link again instead.`, {
      field: 'recipients',
    })
  }
}

/** Each address once. */
function once(recipients: readonly RecipientName[]): RecipientName[] {
  return [...new Map(recipients.map((each) => [each.email, each])).values()]
}

function record(
  manager: EntityManager,
  member: Member,
  handOver: ReleasedHandOver,
  action: HistoryAction,
  { name, email, expiresAt }: Recipient,
): Promise<void> {
  const details: HistoryDetails = { recipient: name, email, until: expiresAt.toISOString().slice(0, 10) }
  return recordEvent(manager, member, { action, subject: handOverSubject(handOver), details })
}
