import { demoSignInSchema, sessionSchema, setUpSchema, signInSchema } from '../../shared/contracts/session'
import { route } from './route'
import { sessionBody } from './session-body'

export const sessionRoutes = [
  route({
    method: 'get',
    path: '/api/session',
    summary: 'Who is signed in, and the token that every write must carry',
    access: 'visitor',
    answer: { status: 200, body: sessionSchema },
    handle: ({ services, visitor }) => sessionBody(services, visitor),
  }),
  route({
    method: 'post',
    path: '/api/session',
    summary: 'Sign in with e-mail address and password',
    access: 'visitor',
    body: signInSchema,
    limited: 'sign-in',
    answer: { status: 200, body: sessionSchema },
    errors: ['SIGN_IN_FAILED'],
    handle: async ({ services, visitor, body }) => {
      await visitor.signIn(await services.sessions.signIn(body.email, body.password))
      return sessionBody(services, visitor)
    },
  }),
  route({
    method: 'post',
    path: '/api/session/demo',
    summary: "Sign in as one of the demo's people, while the demo is on",
    access: 'visitor',
    body: demoSignInSchema,
    answer: { status: 200, body: sessionSchema },
    errors: ['NOT_FOUND'],
    handle: async ({ services, visitor, body }) => {
      await visitor.signIn(await services.sessions.signInDemo(body.userId))
      return sessionBody(services, visitor)
    },
  }),
  route({
    method: 'delete',
    path: '/api/session',
    summary: 'Sign out',
    access: 'visitor',
    answer: { status: 204 },
    handle: ({ visitor }) => visitor.signOut(),
  }),
  route({
    method: 'get',
    path: '/api/set-up/:token',
    summary: 'Whether a set-up link still works',
    access: 'anyone',
    limited: 'link',
    answer: { status: 204 },
    errors: ['SET_UP_LINK_INVALID'],
    handle: ({ services, params }) => services.setUp.check(params.token),
  }),
  route({
    method: 'post',
    path: '/api/set-up',
    summary: 'Found the first group by a set-up link and sign in as its owner',
    access: 'visitor',
    body: setUpSchema,
    limited: 'link',
    answer: { status: 201, body: sessionSchema },
    errors: ['SET_UP_LINK_INVALID', 'NAME_TAKEN'],
    handle: async ({ services, visitor, body }) => {
      await visitor.signIn(await services.setUp.complete(body))
      return sessionBody(services, visitor)
    },
  }),
]
