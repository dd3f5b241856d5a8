import type { EntityManager } from 'typeorm'
import type { HandOverReview } from '../../entities/hand-over-review.entity'
import type { HandOver } from '../../entities/hand-over.entity'
import { User } from '../../entities/user.entity'
import type { LinkTo } from '../../mail/links'
import { queueMail } from '../../mail/queue-mail'

interface ReviewMail {
  readonly handOver: HandOver
  readonly review: HandOverReview
  readonly note: string
  readonly linkTo: LinkTo
}

/** Tells a reviewer that they were asked. */
export async function mailReviewAsked(
  manager: EntityManager,
  { handOver, review, to, note, linkTo }: ReviewMail & { readonly to: User },
): Promise<void> {
  const { title, groupId } = handOver
  const asker = await nameOf(manager, review.askedById)
  await queueMail(manager, {
    eventKey: `review ${review.id}, asked`,
    groupId,
    to: to.email,
    subject: oneLine(`Review asked: ${title}`),
    text: letter(`${asker} asks you to review the hand-over "${title}".`, note, handOver, linkTo),
  })
}

/** Tells the author, and whoever asked, what was decided. */
export async function mailDecision(
  manager: EntityManager,
  {
    handOver,
    review,
    outcome,
    note,
    by,
    linkTo,
  }: ReviewMail & {
    readonly outcome: 'signed off' | 'sent back'
    readonly by: string
  },
): Promise<void> {
  const { title, groupId } = handOver
  const reviewer = await nameOf(manager, by)
  const verb = outcome === 'signed off' ? 'signed off' : 'sent back'
  for (const id of new Set([handOver.authorId, review.askedById])) {
    const person = id === null ? null : await manager.findOneBy(User, { id })
    if (!person) continue
    await queueMail(manager, {
      eventKey: `review ${review.id}, decided, ${person.id}`,
      groupId,
      to: person.email,
      subject: oneLine(`${outcome === 'signed off' ? 'Signed off' : 'Sent back'}: ${title}`),
      text: letter(`${reviewer} ${verb} the hand-over "${title}".`, note, handOver, linkTo),
    })
  }
}

/** A title may hold signs that no line of a header may. */
export function oneLine(text: string): string {
  return text.replace(/[\p{Cc}\u2028\u2029]+/gu, ' ')
}

async function nameOf(manager: EntityManager, id: string | null): Promise<string> {
  const user = id === null ? null : await manager.findOneBy(User, { id })
  return user?.name ?? 'Somebody who has left'
}

function letter(opening: string, note: string, { id }: HandOver, linkTo: LinkTo): string {
  return [opening, ...(note === '' ? [] : ['', note]), '', linkTo(`/hand-overs/${id}`), ''].join('\n')
}
