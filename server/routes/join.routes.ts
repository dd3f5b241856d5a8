import { joinNewSchema, joinOfferSchema } from '../../shared/contracts/people'
import { sessionSchema } from '../../shared/contracts/session'
import { route } from './route'
import { sessionBody } from './session-body'

export const joinRoutes = [
  route({
    method: 'get',
    path: '/api/join/:token',
    summary: 'What an invitation leads to',
    access: 'anyone',
    limited: 'link',
    answer: { status: 200, body: joinOfferSchema },
    errors: ['LINK_INVALID', 'TOO_MANY_ATTEMPTS'],
    handle: ({ services, params }) => services.joining.offer(params.token),
  }),
  route({
    method: 'post',
    path: '/api/join/:token/account',
    summary: 'Take up an invitation with a new account for the address it went to, and sign in',
    access: 'visitor',
    body: joinNewSchema,
    limited: 'link',
    answer: { status: 201, body: sessionSchema },
    errors: ['LINK_INVALID', 'NAME_TAKEN', 'TOO_MANY_ATTEMPTS'],
    handle: async ({ services, visitor, params, body }) => {
      await visitor.signIn(await services.joining.joinNew(params.token, body))
      return sessionBody(services, visitor)
    },
  }),
  route({
    method: 'post',
    path: '/api/join/:token',
    summary: 'Take up an invitation as whoever is signed in',
    access: 'person',
    limited: 'link',
    answer: { status: 200, body: sessionSchema },
    errors: ['LINK_INVALID', 'ALREADY_MEMBER', 'FORBIDDEN', 'TOO_MANY_ATTEMPTS'],
    handle: async ({ services, visitor, userId, params }) => {
      await services.joining.join(params.token, userId)
      return sessionBody(services, visitor)
    },
  }),
]
