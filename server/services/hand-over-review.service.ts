import { type DataSource, type EntityManager, IsNull } from 'typeorm'
import type { z } from 'zod'
import type {
  commentWriteSchema,
  markWriteSchema,
  reviewAskSchema,
  reviewDecisionSchema,
} from '../../shared/contracts/hand-over'
import type { HandOverDetail } from '../../shared/contracts/hand-over-desk'
import type { LinkTo } from '../mail/links'
import { HandOverComment } from '../entities/hand-over-comment.entity'
import { HandOverMark } from '../entities/hand-over-mark.entity'
import { HandOverReview } from '../entities/hand-over-review.entity'
import { Membership } from '../entities/membership.entity'
import { HttpError, notFound } from '../errors/http-error'
import { readContent } from './hand-over/content'
import { detailBody } from './hand-over/detail-body'
import { readHandOverBody } from './hand-over/hand-over-body'
import { findHandOver, lockContent, lockHandOver } from './hand-over/hand-over-context'
import { handOverSubject } from './hand-over/hand-over-name'
import { mailDecision, mailReviewAsked } from './hand-over/review-mails'
import { isOwnWork, REVIEWING_ROLES } from './hand-over/review-rules'
import {
  checkComplete,
  checkMarks,
  closeReview,
  contentChanged,
  lapse,
  ownWork,
  step,
} from './hand-over/review-steps'
import type { Member } from './member'
import { recordEvent } from './record-event'

/** A hand-over goes to a colleague and comes back: asked for, marked, commented, decided. */
export class HandOverReviewService {
  constructor(
    private readonly dataSource: DataSource,
    private readonly linkTo: LinkTo,
  ) {}

  /**
   * Asks a reviewer, by e-mail too. From here on its content is what gets signed off and released, or nothing.
   *
   * @throws {HttpError} CHECKLIST_OPEN while a point is not met; OWN_WORK for a reviewer who made it or asks; NOT_FOUND for one who
   *   may not review; CONFLICT
   */
  async ask(
    member: Member,
    handOverId: string,
    { revision, reviewerId, note }: z.output<typeof reviewAskSchema>,
  ): Promise<HandOverDetail> {
    return this.dataSource.transaction(async (manager) => {
      const from = ['draft', 'sent back'] as const
      const handOver = await lockHandOver(manager, member.groupId, handOverId, { revision, from })
      if (isOwnWork(reviewerId, handOver, member.userId)) {
        throw new HttpError('OWN_WORK', 'Nobody reviews their own hand-over: ask somebody else.', {
          field: 'reviewerId',
        })
      }
      const reviewer = await manager.findOne(Membership, {
        where: { groupId: member.groupId, userId: reviewerId },
        relations: { user: true },
      })
      if (!reviewer?.user || !REVIEWING_ROLES.includes(reviewer.role)) {
        throw notFound('reviewer in this group', 'reviewerId')
      }
      const content = await lockContent(manager, handOver)
      await checkComplete(manager, handOver, content)
      const now = new Date()
      const contentSha256 = content.sha256
      const review = await manager.save(HandOverReview, {
        groupId: member.groupId,
        handOverId,
        contentSha256,
        askedById: member.userId,
        askedAt: now,
        askedNote: note,
        reviewerId,
        outcome: null,
        note: '',
      })
      await step(manager, handOver, { standing: 'in review', reviewerId, contentSha256 }, now)
      const details = { reviewer: reviewer.user.name }
      await recordEvent(manager, member, {
        action: 'review asked',
        subject: handOverSubject(handOver),
        details,
      })
      await mailReviewAsked(manager, { handOver, review, to: reviewer.user, note, linkTo: this.linkTo })
      return this.detail(manager, member, handOverId)
    })
  }

  /** Takes a hand-over back from review, or from being signed off, to change it. @throws {HttpError} CONFLICT */
  async takeBack(member: Member, handOverId: string, revision: number): Promise<HandOverDetail> {
    return this.dataSource.transaction(async (manager) => {
      const from = ['in review', 'signed off'] as const
      const handOver = await lockHandOver(manager, member.groupId, handOverId, { revision, from })
      const now = new Date()
      await closeReview(manager, handOver, { outcome: 'taken back', note: '', by: member.userId }, now)
      await step(manager, handOver, { standing: 'draft', signedOffById: null, signedOffAt: null }, now)
      await recordEvent(manager, member, { action: 'review withdrawn', subject: handOverSubject(handOver) })
      return this.detail(manager, member, handOverId)
    })
  }

  /**
   * Signs off, or sends back with a note.
   *
   * @throws {HttpError} OWN_WORK for whoever made it or asked; CONFLICT when another reviewer was first, or it was taken back;
   *   TERM_QUESTIONED when signing off while a term is questioned; CONTENT_CHANGED when what was to be reviewed has changed: it
   *   then goes back to its author by itself
   */
  async decide(
    member: Member,
    handOverId: string,
    decision: z.output<typeof reviewDecisionSchema>,
  ): Promise<HandOverDetail> {
    const { revision, outcome, note } = decision
    const decided = await this.dataSource.transaction(async (manager) => {
      const handOver = await lockHandOver(manager, member.groupId, handOverId, {
        revision,
        from: ['in review'],
      })
      const review = await manager.findOneByOrFail(HandOverReview, { handOverId, outcome: IsNull() })
      if (isOwnWork(member.userId, handOver, review.askedById)) throw ownWork()
      const now = new Date()
      if (outcome === 'signed off') {
        const content = await lockContent(manager, handOver)
        if (content.sha256 !== handOver.contentSha256) {
          await lapse(manager, member, handOver, now)
          return null
        }
        await checkMarks(manager, handOver, content)
      }
      await closeReview(manager, handOver, { outcome, note, by: member.userId }, now)
      const signature = outcome === 'signed off' ? { signedOffById: member.userId, signedOffAt: now } : {}
      await step(manager, handOver, { standing: outcome, ...signature }, now)
      await recordEvent(manager, member, {
        action: outcome,
        subject: handOverSubject(handOver),
        details: { note },
      })
      await mailDecision(manager, { handOver, review, outcome, note, by: member.userId, linkTo: this.linkTo })
      return this.detail(manager, member, handOverId)
    })
    if (decided === null) throw contentChanged('signed off')
    return decided
  }

  /**
   * Marks a single term as questioned or accepted, or takes the mark away.
   *
   * @throws {HttpError} OWN_WORK; NOT_FOUND for a term that is not in the hand-over; CONFLICT when it is not under review
   */
  async mark(
    member: Member,
    handOverId: string,
    { termId, mark }: z.output<typeof markWriteSchema>,
  ): Promise<HandOverDetail> {
    return this.dataSource.transaction(async (manager) => {
      const { revision } = await findHandOver(manager, member.groupId, handOverId)
      const handOver = await lockHandOver(manager, member.groupId, handOverId, {
        revision,
        from: ['in review'],
      })
      const review = await manager.findOneByOrFail(HandOverReview, { handOverId, outcome: IsNull() })
      if (isOwnWork(member.userId, handOver, review.askedById)) throw ownWork()
      const content = await readContent(manager, handOver)
      const term = content.terms.find((each) => each.term.id === termId && each.leftOut === null)
      if (!term?.basis) throw notFound('term in this hand-over', 'termId')
      await manager.delete(HandOverMark, { handOverId, termId })
      if (mark !== null) {
        await manager.insert(HandOverMark, {
          groupId: member.groupId,
          handOverId,
          termId,
          mark,
          contentSha256: term.basis,
          markedById: member.userId,
          markedAt: new Date(),
        })
        const action = mark === 'accepted' ? 'term accepted' : 'term questioned'
        const details = { term: term.name }
        await recordEvent(manager, member, { action, subject: handOverSubject(handOver), details })
      }
      return this.detail(manager, member, handOverId)
    })
  }

  /** Adds a comment to a term or to the whole. @throws {HttpError} NOT_FOUND for a term of another mapping */
  async comment(
    member: Member,
    handOverId: string,
    { termId, text }: z.output<typeof commentWriteSchema>,
  ): Promise<HandOverDetail> {
    return this.dataSource.transaction(async (manager) => {
      const handOver = await findHandOver(manager, member.groupId, handOverId)
      const content = await readContent(manager, handOver)
      const term = content.terms.find((each) => each.term.id === termId)
      if (termId !== null && !term) throw notFound('term in this hand-over', 'termId')
      await manager.insert(HandOverComment, {
        groupId: member.groupId,
        handOverId,
        termId,
        text,
        writtenById: member.userId,
        writtenAt: new Date(),
      })
      const details = { term: term?.name ?? null }
      await recordEvent(manager, member, { action: 'commented', subject: handOverSubject(handOver), details })
      return this.detail(manager, member, handOverId)
    })
  }

  private async detail(manager: EntityManager, member: Member, id: string): Promise<HandOverDetail> {
    const handOver = await findHandOver(manager, member.groupId, id)
    return detailBody(manager, member, handOver, await readHandOverBody(manager, member.groupId, id))
  }
}
