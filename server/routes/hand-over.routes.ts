import { z } from 'zod'
import { handOverCreateSchema, handOverUpdateSchema } from '../../shared/contracts/hand-over'
import { handOverDetailSchema, handOverSchema, waitingSchema } from '../../shared/contracts/hand-over-desk'
import { route } from './route'

const at = { at: 'handOver' } as const

/** Drafts: made, changed, looked at, thrown away. */
export const handOverRoutes = [
  route({
    method: 'get',
    path: '/api/polymers/:polymerId/hand-overs',
    summary: 'The hand-overs of a polymer, what changed last first',
    access: { may: 'read', at: 'polymer' },
    answer: { status: 200, body: z.object({ handOvers: z.array(handOverSchema) }) },
    handle: async ({ services, member, params }) => ({
      handOvers: await services.handOvers.list(member, params.polymerId),
    }),
  }),
  route({
    method: 'post',
    path: '/api/polymers/:polymerId/hand-overs',
    summary: 'Start a hand-over of a mapping at a state point',
    access: { may: 'write', at: 'polymer' },
    body: handOverCreateSchema,
    answer: { status: 201, body: handOverDetailSchema },
    handle: ({ services, member, params, body }) => services.handOvers.create(member, params.polymerId, body),
  }),
  route({
    method: 'get',
    path: '/api/hand-overs/:handOverId',
    summary: 'A hand-over with its checklist, the evidence of each term and its reviews',
    access: { may: 'read', ...at },
    answer: { status: 200, body: handOverDetailSchema },
    handle: ({ services, member, params }) => services.handOvers.get(member, params.handOverId),
  }),
  route({
    method: 'patch',
    path: '/api/hand-overs/:handOverId',
    summary: 'Change a draft or one that was sent back: title, notes, what is handed over, layout',
    access: { may: 'write', ...at },
    body: handOverUpdateSchema,
    answer: { status: 200, body: handOverDetailSchema },
    errors: ['CONFLICT'],
    handle: ({ services, member, params, body }) =>
      services.handOvers.update(member, params.handOverId, body),
  }),
  route({
    method: 'delete',
    path: '/api/hand-overs/:handOverId',
    summary: 'Throw a draft away; what is under review or out stays',
    access: { may: 'write', ...at },
    answer: { status: 204 },
    errors: ['CONFLICT'],
    handle: ({ services, member, params }) => services.handOvers.remove(member, params.handOverId),
  }),
  route({
    method: 'get',
    path: '/api/hand-overs/:handOverId/preview',
    summary: 'The file of one table as a release would write it now',
    access: { may: 'read', ...at },
    query: z.object({ table: z.string().max(200) }),
    answer: { status: 200, body: z.object({ text: z.string() }) },
    handle: ({ services, member, params, query }) =>
      services.handOvers.preview(member, params.handOverId, query.table),
  }),
  route({
    method: 'get',
    path: '/api/groups/:groupId/waiting',
    summary:
      'What waits for the one who asks: reviews, hand-overs that came back, questions and files of recipients, terms without data',
    access: { may: 'read', at: 'group' },
    answer: { status: 200, body: waitingSchema },
    handle: ({ services, member }) => services.waiting.get(member),
  }),
]
