import {
  accountUpdateSchema,
  groupChoiceSchema,
  passwordChangeSchema,
  resetRequestSchema,
  resetSchema,
} from '../../shared/contracts/people'
import { sessionSchema } from '../../shared/contracts/session'
import { route } from './route'
import { sessionBody } from './session-body'

export const accountRoutes = [
  route({
    method: 'patch',
    path: '/api/account',
    summary: 'Take another name',
    access: 'person',
    body: accountUpdateSchema,
    answer: { status: 200, body: sessionSchema },
    handle: async ({ services, visitor, userId, body }) => {
      await services.accounts.rename(userId, body.name)
      return sessionBody(services, visitor)
    },
  }),
  route({
    method: 'post',
    path: '/api/account/password',
    summary: 'Set another password; other browsers are signed out, and this session gets a new token',
    access: 'person',
    body: passwordChangeSchema,
    limited: 'sign-in',
    answer: { status: 200, body: sessionSchema },
    errors: ['SIGN_IN_FAILED', 'FORBIDDEN', 'TOO_MANY_ATTEMPTS'],
    handle: async ({ services, visitor, userId, body }) => {
      await services.accounts.changePassword(userId, body)
      await visitor.signIn(userId)
      return sessionBody(services, visitor)
    },
  }),
  route({
    method: 'put',
    path: '/api/account/current-group',
    summary: 'Choose the group whose work is shown; addresses of records work whatever the choice',
    access: 'person',
    body: groupChoiceSchema,
    answer: { status: 204 },
    errors: ['NOT_FOUND'],
    handle: ({ services, userId, body }) => services.accounts.chooseGroup(userId, body.groupId),
  }),
  route({
    method: 'post',
    path: '/api/password-resets',
    summary: 'Ask for a link to set a new password; the answer does not tell whether the address is known',
    access: 'visitor',
    body: resetRequestSchema,
    limited: 'mail',
    answer: { status: 204 },
    errors: ['TOO_MANY_ATTEMPTS'],
    handle: ({ services, body }) => services.passwordResets.request(body.email),
  }),
  route({
    method: 'get',
    path: '/api/password-resets/:token',
    summary: 'Whether a link to set a new password still works',
    access: 'anyone',
    limited: 'link',
    answer: { status: 204 },
    errors: ['LINK_INVALID', 'TOO_MANY_ATTEMPTS'],
    handle: ({ services, params }) => services.passwordResets.check(params.token),
  }),
  route({
    method: 'post',
    path: '/api/password-resets/:token',
    summary: 'Set a new password; all browsers are signed out',
    access: 'visitor',
    body: resetSchema,
    limited: 'link',
    answer: { status: 204 },
    errors: ['LINK_INVALID', 'TOO_MANY_ATTEMPTS'],
    handle: ({ services, params, body }) => services.passwordResets.complete(params.token, body.password),
  }),
]
