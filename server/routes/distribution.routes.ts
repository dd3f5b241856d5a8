import {
  distributionSchema,
  distributionUpdateSchema,
  distributionUploadSchema,
} from '../../shared/contracts/distribution'
import { atStatePoint } from './queries'
import { route } from './route'

export const distributionRoutes = [
  route({
    method: 'post',
    path: '/api/terms/:termId/distributions',
    summary:
      'Bring in a file as the distribution of a term at a state point, with those of its blocks; an earlier one is superseded',
    access: { may: 'write', at: 'term' },
    body: distributionUploadSchema,
    upload: 'parted',
    answer: { status: 201, body: distributionSchema },
    errors: ['TERM_GONE'],
    readsContent: true,
    handle: ({ services, member, params, body, file, blockFiles }) =>
      services.distributions.add(member, params.termId, body, file, blockFiles),
  }),
  route({
    method: 'get',
    path: '/api/terms/:termId/distribution',
    summary: 'The current distribution of a term at a state point',
    access: { may: 'read', at: 'term' },
    query: atStatePoint,
    answer: { status: 200, body: distributionSchema },
    handle: ({ services, member, params, query }) =>
      services.distributions.current(member, params.termId, query.statePoint),
  }),
  route({
    method: 'patch',
    path: '/api/distributions/:distributionId',
    summary: 'State how many independent samples a distribution stands for',
    access: { may: 'write', at: 'distribution' },
    body: distributionUpdateSchema,
    answer: { status: 200, body: distributionSchema },
    readsContent: true,
    handle: ({ services, member, params, body }) =>
      services.distributions.update(member, params.distributionId, body),
  }),
  route({
    method: 'delete',
    path: '/api/distributions/:distributionId',
    summary: 'Delete the data of a term at a state point, with the potential that rests on them',
    access: { may: 'write', at: 'distribution' },
    answer: { status: 204 },
    handle: ({ services, member, params }) => services.distributions.remove(member, params.distributionId),
  }),
  route({
    method: 'get',
    path: '/api/distributions/:distributionId/file',
    summary: 'The file of a distribution, as it came',
    access: { may: 'read', at: 'distribution' },
    answer: { status: 200, download: 'application/octet-stream' },
    handle: ({ services, member, params }) => services.distributions.file(member, params.distributionId),
  }),
]
