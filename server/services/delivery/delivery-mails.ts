import { type EntityManager, In } from 'typeorm'
import type { HandOver } from '../../entities/hand-over.entity'
import { Membership } from '../../entities/membership.entity'
import type { Recipient } from '../../entities/recipient.entity'
import { User } from '../../entities/user.entity'
import { queueMail } from '../../mail/queue-mail'
import type { LinkTo } from '../../mail/links'
import { statePointWords } from '../hand-over/release-readme'
import { oneLine } from '../hand-over/review-mails'
import type { ReleasedHandOver } from '../hand-over/archive'

/** A hand-over on its way to one recipient. */
export interface Sending {
  readonly handOver: ReleasedHandOver
  readonly recipient: Recipient
  readonly sender: string
  readonly message: string
  readonly link: string
  /** Number of the hand-over before, where the recipient has that one. */
  readonly replaces: number | null
}

/** The e-mail with the link. One for each recipient and sending. */
export async function mailHandOver(manager: EntityManager, sending: Sending): Promise<void> {
  const { handOver, recipient, sender, message, link, replaces } = sending
  const { number, title, group, polymer, mapping, invented } = handOver.frozen
  const what = `hand-over ${number}`
  await queueMail(manager, {
    eventKey: sendingKey(recipient),
    groupId: handOver.groupId,
    to: recipient.email,
    subject: oneLine(
      replaces === null
        ? `Hand-over ${number} from ${group}: ${title}`
        : `Hand-over ${number} from ${group} replaces hand-over ${replaces}: ${title}`,
    ),
    text: paragraphs(
      `${recipient.name},`,
      `${sender} sends you ${what} of ${group}: tables of ${polymer.name}, mapping ${mapping.name}, ${statePointWords(handOver.frozen)}.${invented ? ' The data are invented.' : ''}`,
      replaces === null
        ? ''
        : `It replaces hand-over ${replaces}, which you have. The page says what changed.`,
      message,
      `Open it here, no account needed:\n${link}`,
      `The link works until ${dayWords(recipient.expiresAt)}. It is yours: whoever holds it can take the tables and ask in your name.`,
    ),
  })
}

/** Names a sending; by it the group finds what became of the e-mail. */
export function sendingKey({ id, sent }: Pick<Recipient, 'id' | 'sent'>): string {
  return `delivery ${id}, ${sent}`
}

/** Tells the one who asked that there is an answer. Links are kept as hashes: the e-mail cannot repeat theirs. */
export async function mailAnswer(
  manager: EntityManager,
  details: {
    readonly handOver: ReleasedHandOver
    readonly questionId: string
    readonly to: Recipient
    readonly question: string
    readonly answer: string
    readonly by: string
  },
): Promise<void> {
  const { handOver, questionId, to, question, answer, by } = details
  const { number, group } = handOver.frozen
  await queueMail(manager, {
    eventKey: `question ${questionId}, answered`,
    groupId: handOver.groupId,
    to: to.email,
    subject: oneLine(`Answer to your question on hand-over ${number} of ${group}`),
    text: paragraphs(`You asked:\n${question}`, `${by} answers:\n${answer}`, pageWords(number)),
  })
}

/** Tells a recipient that a hand-over is not to be used any more, and why. */
export async function mailWithdrawal(
  manager: EntityManager,
  handOver: ReleasedHandOver,
  recipient: Recipient,
  reason: string,
): Promise<void> {
  const { number, title, group } = handOver.frozen
  await queueMail(manager, {
    eventKey: `withdrawal ${handOver.id}, ${recipient.id}`,
    groupId: handOver.groupId,
    to: recipient.email,
    subject: oneLine(`Withdrawn: hand-over ${number} of ${group}, ${title}`),
    text: paragraphs(
      `${recipient.name},`,
      `${group} has withdrawn hand-over ${number}, "${title}". Do not start new simulations from its tables.`,
      `The reason:\n${reason}`,
      pageWords(number),
    ),
  })
}

/** Tells the group's side, author and owners, what a recipient did. */
export async function mailGroup(
  manager: EntityManager,
  handOver: ReleasedHandOver,
  linkTo: LinkTo,
  letter: { readonly event: string; readonly subject: string; readonly lines: readonly string[] },
): Promise<void> {
  for (const { id, email } of await authorAndOwners(manager, handOver)) {
    await queueMail(manager, {
      eventKey: `${letter.event}, ${id}`,
      groupId: handOver.groupId,
      to: email,
      subject: oneLine(letter.subject),
      text: paragraphs(...letter.lines, linkTo(`/hand-overs/${handOver.id}`)),
    })
  }
}

async function authorAndOwners(
  manager: EntityManager,
  { groupId, authorId }: Pick<HandOver, 'groupId' | 'authorId'>,
): Promise<User[]> {
  const owners = await manager.findBy(Membership, { groupId, role: 'owner' })
  const author = authorId === null ? null : await manager.findOneBy(Membership, { groupId, userId: authorId })
  const ids = [...owners, ...(author ? [author] : [])].map(({ userId }) => userId)
  return manager.find(User, { where: { id: In(ids) }, order: { id: 'ASC' } })
}

function paragraphs(...parts: readonly string[]): string {
  return `${parts.filter((part) => part !== '').join('\n\n')}\n`
}

function pageWords(number: number): string {
  return `It stands on the page of hand-over ${number}: open it by the link that you have, or in your account.`
}

function dayWords(date: Date): string {
  return date.toLocaleDateString('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' })
}
