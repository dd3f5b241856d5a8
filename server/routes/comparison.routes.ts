import { comparisonQuerySchema, comparisonSchema } from '../../shared/contracts/comparison'
import { route } from './route'

export const comparisonRoutes = [
  route({
    method: 'get',
    path: '/api/polymers/:polymerId/comparison',
    summary: 'Two to six mappings side by side: what each has at a state point and what its data say',
    access: { may: 'read', at: 'polymer' },
    query: comparisonQuerySchema,
    answer: { status: 200, body: comparisonSchema },
    handle: ({ services, member, params, query }) =>
      services.comparisons.compare(member, params.polymerId, query.mappings, query.statePoint),
  }),
]
