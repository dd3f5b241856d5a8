import { z } from 'zod'
import { idSchema } from '../../shared/contracts/common'
import { pairListSchema } from '../../shared/contracts/distribution'
import {
  mappingCreateSchema,
  mappingSchema,
  mappingUpdateSchema,
  termSchema,
} from '../../shared/contracts/mapping'
import { mappingCoverageSchema } from '../../shared/contracts/mapping-coverage'
import {
  mappingFitRequestSchema,
  mappingFitSchema,
  mappingVersionListSchema,
} from '../../shared/contracts/mapping-version'
import { termEvidenceSchema } from '../../shared/contracts/term-evidence'
import { atStatePoint } from './queries'
import { route } from './route'

export const mappingRoutes = [
  route({
    method: 'get',
    path: '/api/polymers/:polymerId/mappings',
    summary: 'The mappings of a polymer, by name',
    access: { may: 'read', at: 'polymer' },
    answer: { status: 200, body: z.object({ mappings: z.array(mappingSchema) }) },
    handle: async ({ services, member, params }) => ({
      mappings: await services.mappings.list(member, params.polymerId),
    }),
  }),
  route({
    method: 'post',
    path: '/api/polymers/:polymerId/mappings',
    summary: 'Add a mapping; its terms follow from it',
    access: { may: 'write', at: 'polymer' },
    body: mappingCreateSchema,
    answer: { status: 201, body: mappingSchema },
    errors: ['NAME_TAKEN'],
    readsContent: true,
    handle: ({ services, member, params, body }) => services.mappings.create(member, params.polymerId, body),
  }),
  route({
    method: 'get',
    path: '/api/mappings/:mappingId',
    summary: 'A mapping with its document',
    access: { may: 'read', at: 'mapping' },
    answer: { status: 200, body: mappingSchema },
    handle: ({ services, member, params }) => services.mappings.get(member, params.mappingId),
  }),
  route({
    method: 'put',
    path: '/api/mappings/:mappingId',
    summary: 'Save a mapping over the revision one started from; its terms keep their ids and data',
    access: { may: 'write', at: 'mapping' },
    body: mappingUpdateSchema,
    answer: { status: 200, body: mappingSchema },
    errors: ['CONFLICT', 'NAME_TAKEN'],
    readsContent: true,
    handle: ({ services, member, params, body }) => services.mappings.update(member, params.mappingId, body),
  }),
  route({
    method: 'delete',
    path: '/api/mappings/:mappingId',
    summary: 'Delete a mapping with everything that stands on it',
    access: { may: 'write', at: 'mapping' },
    answer: { status: 204 },
    handle: ({ services, member, params }) => services.mappings.remove(member, params.mappingId),
  }),
  route({
    method: 'get',
    path: '/api/mappings/:mappingId/terms',
    summary: 'The terms of a mapping, with their standing at a state point if one is named',
    access: { may: 'read', at: 'mapping' },
    query: z.object({ statePoint: idSchema.optional() }),
    answer: { status: 200, body: z.object({ terms: z.array(termSchema) }) },
    handle: async ({ services, member, params, query }) => ({
      terms: await services.terms.list(member, params.mappingId, query.statePoint ?? null),
    }),
  }),
  route({
    method: 'get',
    path: '/api/mappings/:mappingId/pairs',
    summary: 'Pairs of terms that share a bead, with what is known of each at a state point',
    access: { may: 'read', at: 'mapping' },
    query: atStatePoint,
    answer: { status: 200, body: pairListSchema },
    handle: ({ services, member, params, query }) =>
      services.pairs.list(member, params.mappingId, query.statePoint),
  }),
  route({
    method: 'get',
    path: '/api/mappings/:mappingId/evidence',
    summary:
      'What data say about which of several terms of one motion to use: samples and couplings at a state point',
    access: { may: 'read', at: 'mapping' },
    query: atStatePoint,
    answer: { status: 200, body: termEvidenceSchema },
    handle: ({ services, member, params, query }) =>
      services.termEvidence.of(member, params.mappingId, query.statePoint),
  }),
  route({
    method: 'get',
    path: '/api/mappings/:mappingId/coverage',
    summary: 'Which terms of a mapping have data at which state points, and which data no longer fit',
    access: { may: 'read', at: 'mapping' },
    answer: { status: 200, body: mappingCoverageSchema },
    handle: ({ services, member, params }) => services.coverages.of(member, params.mappingId),
  }),
  route({
    method: 'get',
    path: '/api/mappings/:mappingId/versions',
    summary: 'The earlier versions of a mapping, the newest first',
    access: { may: 'read', at: 'mapping' },
    answer: { status: 200, body: mappingVersionListSchema },
    handle: async ({ services, member, params }) => ({
      versions: await services.mappingVersions.list(member, params.mappingId),
    }),
  }),
  route({
    method: 'post',
    path: '/api/mappings/:mappingId/fit',
    summary:
      'What saving a document would do: whether it makes a new version, and which data would no longer fit',
    access: { may: 'write', at: 'mapping' },
    body: mappingFitRequestSchema,
    answer: { status: 200, body: mappingFitSchema },
    readsContent: true,
    handle: ({ services, member, params, body }) =>
      services.mappingVersions.preview(member, params.mappingId, body.document),
  }),
]
