import { type EntityManager, In } from 'typeorm'
import type {
  Deliveries,
  Recipient as RecipientBody,
  RecipientName,
} from '../../../shared/contracts/delivery'
import { DeliveryDownload } from '../../entities/delivery-download.entity'
import { Mail } from '../../entities/mail.entity'
import { Recipient } from '../../entities/recipient.entity'
import { ReturnedFile } from '../../entities/returned-file.entity'
import { User } from '../../entities/user.entity'
import type { ReleasedHandOver } from '../hand-over/archive'
import { personOf } from '../people'
import { sendingKey } from './delivery-mails'
import { questionBodies } from './question-bodies'
import { returnedBody } from './returned-body'
import { BEFORE } from './send-links'

/** Downloads shown at most, the newest; all are kept. */
const SHOWN_DOWNLOADS = 200

/** Everything between a hand-over and its recipients, for the group. */
export async function deliveriesBody(
  manager: EntityManager,
  handOver: ReleasedHandOver,
): Promise<Deliveries> {
  const recipients = await manager.find(Recipient, {
    where: { handOverId: handOver.id },
    relations: { sentBy: true },
    order: { createdAt: 'ASC', email: 'ASC' },
  })
  const ids = In(recipients.map(({ id }) => id))
  const mails = await manager.findBy(Mail, { eventKey: In(recipients.map(sendingKey)) })
  const accounts = await manager.findBy(User, { email: In(recipients.map(({ email }) => email)) })
  const downloads = await manager.find(DeliveryDownload, {
    where: { recipientId: ids },
    relations: { recipient: true },
    order: { at: 'DESC' },
    take: SHOWN_DOWNLOADS,
  })
  const returned = await manager.find(ReturnedFile, {
    where: { recipientId: ids },
    relations: { recipient: true, settledBy: true },
    order: { returnedAt: 'ASC' },
  })
  return {
    recipients: recipients.map((recipient) =>
      recipientBody(
        recipient,
        mails.find(({ eventKey }) => eventKey === sendingKey(recipient)),
        accounts.some(({ email }) => email === recipient.email),
      ),
    ),
    downloads: downloads.map(({ recipientId, recipient, file, layout, via, at }) => ({
      recipientId,
      recipient: recipient?.name ?? '',
      file,
      layout,
      via,
      at: at.toISOString(),
    })),
    questions: await questionBodies(manager, handOver.id, null),
    returned: returned.map(returnedBody),
    earlier: await earlierRecipients(manager, handOver),
  }
}

/** Who had a hand-over that this one takes the place of, at each address as it stands in the newest, and has not this one. */
export async function earlierRecipients(
  manager: EntityManager,
  { id, previousId }: ReleasedHandOver,
): Promise<RecipientName[]> {
  return manager.query(
    `${BEFORE}, newest as (
       select distinct on (r."email") r."name", r."email", r."revoked_at"
         from "recipient" r join before b on b."id" = r."hand_over_id"
        order by r."email", b."number" desc)
     select "name", "email" from newest n
      where n."revoked_at" is null
        and not exists (select 1 from "recipient" r where r."hand_over_id" = $2 and r."email" = n."email")
      order by "name", "email"`,
    [previousId, id],
  )
}

function recipientBody(recipient: Recipient, mail: Mail | undefined, hasAccount: boolean): RecipientBody {
  const { id, name, email, sent, acknowledgedBy } = recipient
  return {
    id,
    name,
    email,
    hasAccount,
    state: stateOf(recipient, mail),
    sent,
    sentBy: personOf(recipient.sentBy),
    sentAt: recipient.sentAt.toISOString(),
    expiresAt: recipient.expiresAt.toISOString(),
    revokedAt: recipient.revokedAt?.toISOString() ?? null,
    openedAt: recipient.openedAt?.toISOString() ?? null,
    acknowledgedAt: recipient.acknowledgedAt?.toISOString() ?? null,
    acknowledgedBy,
  }
}

function stateOf(recipient: Recipient, mail: Mail | undefined): RecipientBody['state'] {
  if (recipient.revokedAt !== null) return 'revoked'
  if (recipient.acknowledgedAt !== null) return 'acknowledged'
  if (recipient.expiresAt <= new Date()) return 'expired'
  if (recipient.openedAt !== null) return 'opened'
  if (mail?.failedAt) return 'not delivered'
  return mail?.sentAt ? 'sent' : 'waiting'
}
