import { healthSchema } from '../../shared/contracts/health'
import { route } from './route'

export const healthRoutes = [
  route({
    method: 'get',
    path: '/api/health',
    summary: 'Whether the server and its database answer; 503 with the same body when the database does not',
    access: 'anyone',
    answer: { status: 200, body: healthSchema, statusFor: ({ database }) => (database ? 200 : 503) },
    handle: ({ services }) => services.health.check(),
  }),
]
