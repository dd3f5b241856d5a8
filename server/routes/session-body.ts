import type { Session } from '../../shared/contracts/session'
import type { Visitor } from '../middleware/visitor'
import type { Services } from '../services'

/** Who is signed in now, with the token that belongs to the session as it is now. */
export async function sessionBody(services: Services, visitor: Visitor): Promise<Session> {
  return {
    user: visitor.userId === null ? null : await services.sessions.describe(visitor.userId),
    csrfToken: visitor.csrfToken(),
    demoUsers: await services.sessions.demoUsers(),
  }
}
