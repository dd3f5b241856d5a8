import { type EntityManager, IsNull } from 'typeorm'
import type { HandOverReview as HandOverReviewBody } from '../../../shared/contracts/hand-over'
import { HandOverMark } from '../../entities/hand-over-mark.entity'
import { HandOverReview } from '../../entities/hand-over-review.entity'
import { HandOver } from '../../entities/hand-over.entity'
import { HttpError } from '../../errors/http-error'
import type { Member } from '../member'
import { recordEvent } from '../record-event'
import { checklistOf } from './checklist-of'
import type { HandOverContent } from './content'
import { handOverSubject } from './hand-over-name'
import { layoutName } from './layout-of'

/** @throws {HttpError} CHECKLIST_OPEN with the open lines as issues */
export async function checkComplete(
  manager: EntityManager,
  handOver: HandOver,
  content: HandOverContent,
): Promise<void> {
  const items = checklistOf(handOver, content, await layoutName(manager, handOver))
  const open = items.filter(({ met }) => !met)
  if (open.length === 0) return
  const issues = open.flatMap(({ code, lines }) =>
    lines.filter((line) => line.open).map(({ text }) => ({ field: code, message: text })),
  )
  throw new HttpError('CHECKLIST_OPEN', `The checklist is not met: ${issues[0].message}.`, { issues })
}

/** What was reviewed has changed: the hand-over goes back to its author, and a new review is needed. */
export async function lapse(
  manager: EntityManager,
  member: Member,
  handOver: HandOver,
  now: Date,
): Promise<void> {
  await closeReview(manager, handOver, { outcome: 'lapsed', note: '', by: member.userId }, now)
  await step(manager, handOver, { standing: 'sent back', signedOffById: null, signedOffAt: null }, now)
  const details = { note: 'its content changed after review was asked for' }
  await recordEvent(manager, member, { action: 'sent back', subject: handOverSubject(handOver), details })
}

/** The refusal that goes with `lapse`. */
export function contentChanged(what: 'signed off' | 'released'): HttpError {
  return new HttpError(
    'CONTENT_CHANGED',
    `Data, potentials or choices changed after review was asked for, so nothing was ${what}. The hand-over is back with its author: look at what changed and ask again.`,
  )
}

/** The refusal of a decision on one's own work. */
export function ownWork(): HttpError {
  return new HttpError('OWN_WORK', 'Nobody decides on a hand-over that they made or asked review for.')
}

/** @throws {HttpError} TERM_QUESTIONED while a mark questions a term as it is now */
export async function checkMarks(
  manager: EntityManager,
  { id }: HandOver,
  { terms }: HandOverContent,
): Promise<void> {
  const questioned = await manager.findBy(HandOverMark, { handOverId: id, mark: 'questioned' })
  const term = terms.find((each) =>
    questioned.some(({ termId, contentSha256 }) => termId === each.term.id && contentSha256 === each.basis),
  )
  if (!term) return
  throw new HttpError(
    'TERM_QUESTIONED',
    `${term.name} is questioned: accept it, or send the hand-over back.`,
    { field: 'outcome' },
  )
}

interface Outcome {
  readonly outcome: NonNullable<HandOverReviewBody['outcome']>
  readonly note: string
  readonly by: string
}

/** Ends the open review; one that was signed off already stays as it is on record. */
export async function closeReview(
  manager: EntityManager,
  { id }: HandOver,
  { outcome, note, by }: Outcome,
  now: Date,
): Promise<void> {
  const changes = { outcome, note, decidedById: by, decidedAt: now }
  await manager.update(HandOverReview, { handOverId: id, outcome: IsNull() }, changes)
}

/** Takes the hand-over into another standing. */
export async function step(
  manager: EntityManager,
  handOver: HandOver,
  changes: Partial<HandOver>,
  now: Date,
): Promise<void> {
  Object.assign(handOver, changes, { revision: handOver.revision + 1, changedAt: now })
  await manager.save(HandOver, handOver)
}
