import { z } from 'zod'
import {
  atRevisionSchema,
  commentWriteSchema,
  markWriteSchema,
  reviewAskSchema,
  reviewDecisionSchema,
  warningAnswerSchema,
  warningAnswerWriteSchema,
} from '../../shared/contracts/hand-over'
import { handOverDetailSchema } from '../../shared/contracts/hand-over-desk'
import { route } from './route'

const at = { at: 'handOver' } as const
const detail = { status: 200, body: handOverDetailSchema } as const
const answers = z.object({ answers: z.array(warningAnswerSchema) })

/** Review: asked for, marked, commented, decided; and the answers to warnings that go before it. */
export const handOverReviewRoutes = [
  route({
    method: 'post',
    path: '/api/hand-overs/:handOverId/review',
    summary: 'Ask a reviewer, who is told by e-mail',
    access: { may: 'write', ...at },
    body: reviewAskSchema,
    answer: detail,
    errors: ['CHECKLIST_OPEN', 'OWN_WORK', 'CONFLICT'],
    handle: ({ services, member, params, body }) => services.reviews.ask(member, params.handOverId, body),
  }),
  route({
    method: 'post',
    path: '/api/hand-overs/:handOverId/take-back',
    summary: 'Take a hand-over back from review, to change it',
    access: { may: 'write', ...at },
    body: atRevisionSchema,
    answer: detail,
    errors: ['CONFLICT'],
    handle: ({ services, member, params, body }) =>
      services.reviews.takeBack(member, params.handOverId, body.revision),
  }),
  route({
    method: 'post',
    path: '/api/hand-overs/:handOverId/decision',
    summary: 'Sign off, or send back with a note; never one’s own',
    access: { may: 'review', ...at },
    body: reviewDecisionSchema,
    answer: detail,
    errors: ['OWN_WORK', 'CONFLICT', 'CONTENT_CHANGED', 'TERM_QUESTIONED'],
    handle: ({ services, member, params, body }) => services.reviews.decide(member, params.handOverId, body),
  }),
  route({
    method: 'put',
    path: '/api/hand-overs/:handOverId/mark',
    summary: 'Mark a single term as questioned or accepted',
    access: { may: 'review', ...at },
    body: markWriteSchema,
    answer: detail,
    errors: ['OWN_WORK', 'CONFLICT'],
    handle: ({ services, member, params, body }) => services.reviews.mark(member, params.handOverId, body),
  }),
  route({
    method: 'post',
    path: '/api/hand-overs/:handOverId/comments',
    summary: 'Comment on a hand-over or on one of its terms',
    access: { may: 'read', ...at },
    body: commentWriteSchema,
    answer: detail,
    handle: ({ services, member, params, body }) => services.reviews.comment(member, params.handOverId, body),
  }),
  route({
    method: 'get',
    path: '/api/potentials/:potentialId/answers',
    summary: 'Why warnings of a saved potential are kept',
    access: { may: 'read', at: 'potential' },
    answer: { status: 200, body: answers },
    handle: async ({ services, member, params }) => ({
      answers: await services.warningAnswers.ofPotential(member, params.potentialId),
    }),
  }),
  route({
    method: 'put',
    path: '/api/potentials/:potentialId/answers',
    summary: 'Keep a warning of a saved potential, with the reason; it lapses when data or settings change',
    access: { may: 'write', at: 'potential' },
    body: warningAnswerWriteSchema,
    answer: { status: 200, body: answers },
    handle: async ({ services, member, params, body }) => ({
      answers: await services.warningAnswers.keepForPotential(member, params.potentialId, body),
    }),
  }),
  route({
    method: 'put',
    path: '/api/joint-distributions/:jointDistributionId/answers',
    summary: 'Keep a warning of a joint potential, with the reason',
    access: { may: 'write', at: 'jointDistribution' },
    body: warningAnswerWriteSchema,
    answer: { status: 200, body: answers },
    handle: async ({ services, member, params, body }) => ({
      answers: await services.warningAnswers.keepForPair(member, params.jointDistributionId, body),
    }),
  }),
]
