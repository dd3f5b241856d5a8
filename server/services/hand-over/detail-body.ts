import { type EntityManager, In } from 'typeorm'
import type { Person } from '../../../shared/contracts/common'
import type {
  HandOver as HandOverBody,
  HandOverDetail,
  HandOverPair,
  HandOverTerm,
} from '../../../shared/contracts/hand-over-desk'
import { HandOverComment } from '../../entities/hand-over-comment.entity'
import { HandOverMark } from '../../entities/hand-over-mark.entity'
import { HandOverReview } from '../../entities/hand-over-review.entity'
import type { HandOver } from '../../entities/hand-over.entity'
import { Membership } from '../../entities/membership.entity'
import type { Member } from '../member'
import { personOf } from '../people'
import { checklistOf, stateOf } from './checklist-of'
import { type ContentPair, type ContentTerm, type HandOverContent, joinedTerms, readContent } from './content'
import { layoutName } from './layout-of'
import { isOwnWork, isReleased, REVIEWING_ROLES } from './review-rules'
import {
  type AnsweredWarning,
  evidenceOfPair,
  evidenceOfTerm,
  type TableEvidence,
  warningsOfPair,
  warningsOfTerm,
} from './table-evidence'

/** A hand-over with all there is to say about it before it is released, and who said what. */
export async function detailBody(
  manager: EntityManager,
  member: Member,
  handOver: HandOver,
  head: HandOverBody,
): Promise<HandOverDetail> {
  const { notes, selection, layout, contentSha256 } = handOver
  const name = await layoutName(manager, handOver)
  const reviews = await reviewBodies(manager, handOver)
  const askedBy = reviews.find(({ outcome }) => outcome === null)?.askedBy?.id ?? null
  const said = {
    reviews,
    comments: await commentBodies(manager, handOver),
    reviewers: await findReviewers(manager, handOver),
    mayDecide: REVIEWING_ROLES.includes(member.role) && !isOwnWork(member.userId, handOver, askedBy),
  }
  const own = { ...head, notes, selection, layout: { ...layout, name } }
  if (isReleased(handOver)) return { ...own, ...said, checklist: [], terms: [], pairs: [], changed: false }
  const content = await readContent(manager, handOver)
  const marks = await manager.find(HandOverMark, {
    where: { handOverId: handOver.id },
    relations: { markedBy: true },
  })
  const joined = joinedTerms(content)
  return {
    ...own,
    ...said,
    checklist: checklistOf(handOver, content, name).map((item) => ({
      ...item,
      lines: item.lines.map((line) => ({ ...line, place: line.place && { ...line.place } })),
    })),
    terms: content.terms.map((term) => termBody(term, content, joined, marks)),
    pairs: content.pairs.map((pair) => pairBody(pair, content)),
    changed: ['in review', 'signed off'].includes(handOver.standing) && content.sha256 !== contentSha256,
  }
}

function termBody(
  term: ContentTerm,
  content: HandOverContent,
  joined: ReadonlySet<string>,
  marks: readonly HandOverMark[],
): HandOverTerm {
  const { id, kind, types } = term.term
  const { input, potential } = term
  const evidence = term.leftOut ? null : evidenceOfTerm(term, content)
  const mark = marks.find((each) => each.termId === id && each.contentSha256 === term.basis)
  return {
    id,
    kind,
    types,
    name: term.name,
    state: stateOf(term, evidence?.refused ?? null),
    leftOut: term.leftOut,
    joined: joined.has(id),
    potentialId: potential?.id ?? null,
    savedBy: personOf(potential?.savedBy),
    savedAt: potential?.savedAt.toISOString() ?? null,
    source: input?.file.name ?? null,
    measured: input && {
      measured: input.distribution.silhouette,
      derived: term.stale ? null : (potential?.silhouette ?? null),
    },
    evidence: evidence && evidenceBody(evidence),
    warnings: term.leftOut ? [] : warningsOfTerm(term, content).map(warningBody),
    mark: mark ? { mark: mark.mark, by: personOf(mark.markedBy), at: mark.markedAt.toISOString() } : null,
  }
}

function pairBody(pair: ContentPair, content: HandOverContent): HandOverPair {
  const { joint, decision, together, apart } = pair
  return {
    jointDistributionId: joint.id,
    firstTermId: joint.firstTermId,
    secondTermId: joint.secondTermId,
    name: pair.terms.map(({ name }) => name).join(' · '),
    numbers: joint.numbers,
    decision: decision && {
      choice: decision.choice,
      reason: decision.reason,
      decidedBy: personOf(decision.decidedBy),
      decidedAt: decision.decidedAt.toISOString(),
    },
    together,
    apart,
    evidence: together ? evidenceBody(evidenceOfPair(pair, content)) : null,
    warnings: together ? warningsOfPair(pair, content).map(warningBody) : [],
  }
}

function evidenceBody(evidence: TableEvidence): NonNullable<HandOverTerm['evidence']> {
  const { domain, rows, lowestAt, silhouette } = evidence
  return {
    ...evidence,
    domain: domain.map(([low, high]): [number, number] => [low, high]),
    rows: [...rows],
    lowestAt: [...lowestAt],
    silhouette: [...silhouette],
  }
}

function warningBody({ code, message, action, answer }: AnsweredWarning): HandOverTerm['warnings'][number] {
  return {
    code,
    message,
    action,
    answer: answer && {
      code,
      reason: answer.reason,
      by: personOf(answer.answeredBy),
      at: answer.answeredAt.toISOString(),
    },
  }
}

async function reviewBodies(manager: EntityManager, { id }: HandOver): Promise<HandOverDetail['reviews']> {
  const reviews = await manager.find(HandOverReview, {
    where: { handOverId: id },
    relations: { askedBy: true, reviewer: true, decidedBy: true },
    order: { askedAt: 'ASC' },
  })
  return reviews.map((review) => ({
    askedBy: personOf(review.askedBy),
    askedAt: review.askedAt.toISOString(),
    askedNote: review.askedNote,
    reviewer: personOf(review.reviewer),
    outcome: review.outcome,
    note: review.note,
    decidedBy: personOf(review.decidedBy),
    decidedAt: review.decidedAt?.toISOString() ?? null,
  }))
}

async function commentBodies(manager: EntityManager, { id }: HandOver): Promise<HandOverDetail['comments']> {
  const comments = await manager.find(HandOverComment, {
    where: { handOverId: id },
    relations: { writtenBy: true },
    order: { writtenAt: 'ASC' },
  })
  return comments.map((comment) => ({
    id: comment.id,
    termId: comment.termId,
    text: comment.text,
    by: personOf(comment.writtenBy),
    at: comment.writtenAt.toISOString(),
  }))
}

async function findReviewers(manager: EntityManager, handOver: HandOver): Promise<Person[]> {
  const memberships = await manager.find(Membership, {
    where: { groupId: handOver.groupId, role: In([...REVIEWING_ROLES]) },
    relations: { user: true },
  })
  return memberships
    .filter(({ userId }) => userId !== handOver.authorId)
    .flatMap(({ user }) => personOf(user) ?? [])
    .sort((one, other) => one.name.localeCompare(other.name))
}
