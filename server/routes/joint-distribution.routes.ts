import {
  decisionWriteSchema,
  jointDistributionSchema,
  jointDistributionUploadSchema,
} from '../../shared/contracts/distribution'
import { jointTableQuerySchema } from '../../shared/contracts/potential'
import { route } from './route'

export const jointDistributionRoutes = [
  route({
    method: 'post',
    path: '/api/mappings/:mappingId/joint-distributions',
    summary: 'Bring in a file as the joint distribution of two terms; an earlier one is superseded',
    access: { may: 'write', at: 'mapping' },
    body: jointDistributionUploadSchema,
    upload: 'single',
    answer: { status: 201, body: jointDistributionSchema },
    errors: ['TERM_GONE'],
    readsContent: true,
    handle: ({ services, member, params, body, file }) =>
      services.jointDistributions.add(member, params.mappingId, body, file),
  }),
  route({
    method: 'get',
    path: '/api/joint-distributions/:jointDistributionId',
    summary: 'A joint distribution with the decision about it',
    access: { may: 'read', at: 'jointDistribution' },
    answer: { status: 200, body: jointDistributionSchema },
    handle: ({ services, member, params }) =>
      services.jointDistributions.get(member, params.jointDistributionId),
  }),
  route({
    method: 'delete',
    path: '/api/joint-distributions/:jointDistributionId',
    summary: 'Delete the joint data of two terms at a state point, with the decisions about them',
    access: { may: 'write', at: 'jointDistribution' },
    answer: { status: 204 },
    handle: ({ services, member, params }) =>
      services.jointDistributions.remove(member, params.jointDistributionId),
  }),
  route({
    method: 'get',
    path: '/api/joint-distributions/:jointDistributionId/file',
    summary: 'The file of a joint distribution, as it came',
    access: { may: 'read', at: 'jointDistribution' },
    answer: { status: 200, download: 'application/octet-stream' },
    handle: ({ services, member, params }) =>
      services.jointDistributions.file(member, params.jointDistributionId),
  }),
  route({
    method: 'get',
    path: '/api/joint-distributions/:jointDistributionId/table',
    summary: 'The table of the smoothed joint potential as text: both coordinates, energy, both forces',
    access: { may: 'read', at: 'jointDistribution' },
    query: jointTableQuerySchema,
    answer: { status: 200, download: 'text/plain; charset=utf-8' },
    readsContent: true,
    handle: ({ services, member, params, query }) =>
      services.jointTables.forPair(member, params.jointDistributionId, query),
  }),
  route({
    method: 'put',
    path: '/api/joint-distributions/:jointDistributionId/decision',
    summary: 'Record what is decided about a pair of terms, and why',
    access: { may: 'write', at: 'jointDistribution' },
    body: decisionWriteSchema,
    answer: { status: 200, body: jointDistributionSchema },
    handle: ({ services, member, params, body }) =>
      services.jointDistributions.decide(member, params.jointDistributionId, body),
  }),
]
