import { historyFilterSchema, historyPageSchema, historyQuerySchema } from '../../shared/contracts/history'
import { route } from './route'

export const historyRoutes = [
  route({
    method: 'get',
    path: '/api/groups/:groupId/history',
    summary: 'Who did what in a group, the newest first',
    access: { may: 'read', at: 'group' },
    query: historyQuerySchema,
    answer: { status: 200, body: historyPageSchema },
    handle: ({ services, member, query }) => services.history.list(member, query),
  }),
  route({
    method: 'get',
    path: '/api/groups/:groupId/history.csv',
    summary: 'Who did what in a group, as comma-separated values',
    access: { may: 'read', at: 'group' },
    query: historyFilterSchema,
    answer: { status: 200, download: 'text/csv' },
    handle: ({ services, member, query }) => services.history.csv(member, query),
  }),
]
