import { potentialSaveSchema, potentialSchema, tableQuerySchema } from '../../shared/contracts/potential'
import { atStatePoint } from './queries'
import { route } from './route'

export const potentialRoutes = [
  route({
    method: 'get',
    path: '/api/terms/:termId/potential',
    summary: 'The saved inversion of a term at a state point',
    access: { may: 'read', at: 'term' },
    query: atStatePoint,
    answer: { status: 200, body: potentialSchema },
    handle: ({ services, member, params, query }) =>
      services.potentials.get(member, params.termId, query.statePoint),
  }),
  route({
    method: 'put',
    path: '/api/terms/:termId/potential',
    summary: 'Save the inversion of a term over the revision one started from',
    access: { may: 'write', at: 'term' },
    body: potentialSaveSchema,
    answer: { status: 200, body: potentialSchema },
    errors: ['CONFLICT', 'TERM_GONE'],
    readsContent: true,
    handle: ({ services, member, params, body }) => services.potentials.save(member, params.termId, body),
  }),
  route({
    method: 'delete',
    path: '/api/potentials/:potentialId',
    summary: 'Forget a saved inversion; the data stay',
    access: { may: 'write', at: 'potential' },
    answer: { status: 204 },
    handle: ({ services, member, params }) => services.potentials.remove(member, params.potentialId),
  }),
  route({
    method: 'get',
    path: '/api/terms/:termId/table',
    summary: 'The table of a saved inversion as text, in a layout',
    access: { may: 'read', at: 'term' },
    query: tableQuerySchema,
    answer: { status: 200, download: 'text/plain; charset=utf-8' },
    errors: ['CONFLICT'],
    readsContent: true,
    handle: ({ services, member, params, query: { statePoint, ...units } }) =>
      services.tables.forTerm(member, params.termId, statePoint, units),
  }),
  route({
    method: 'get',
    path: '/api/mappings/:mappingId/tables.zip',
    summary: 'All tables of a mapping at a state point, with a README',
    access: { may: 'read', at: 'mapping' },
    query: tableQuerySchema,
    answer: { status: 200, download: 'application/zip' },
    readsContent: true,
    handle: ({ services, member, params, query: { statePoint, ...units } }) =>
      services.tables.archive(member, params.mappingId, statePoint, units),
  }),
]
