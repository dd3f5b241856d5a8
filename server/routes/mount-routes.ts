import type { RequestHandler, Response, Router } from 'express'
import { idSchema, type Role } from '../../shared/contracts/common'
import { HttpError, notFound } from '../errors/http-error'
import { requireCsrfToken } from '../middleware/csrf'
import { readJson } from '../middleware/json-body'
import { readUpload, uploadedFiles } from '../middleware/upload'
import { visitorOf } from '../middleware/visitor'
import type { Download, Member, Services } from '../services'
import { RESOURCES } from '../services/access.service'
import { type AnyRoute, type MemberAccess, ROLES_FOR } from './route'

const REFUSED = {
  read: 'see',
  write: 'change',
  review: 'decide on',
  manage: 'manage',
  belong: 'see',
} as const

/** What routes are mounted with. */
export interface MountOptions {
  readonly services: Services
  readonly sessions: RequestHandler
  readonly signInLimits: readonly RequestHandler[]
}

/**
 * Mounts routes. Each request passes, in this order: session, token of a write, membership and role, body, limits; only then
 * is its content parsed and its handler called. So nobody who may not write can make the server read an upload.
 */
export function mountRoutes(router: Router, routes: readonly AnyRoute[], options: MountOptions): void {
  for (const route of routes) {
    const steps: RequestHandler[] = []
    if (route.access !== 'anyone') steps.push(options.sessions)
    if (route.method !== 'get') steps.push(requireCsrfToken)
    if (typeof route.access === 'object') steps.push(requireMember(route.access, options.services))
    if (route.upload) steps.push(readUpload(route.upload))
    else if (route.body) steps.push(readJson)
    if (route.limited) steps.push(...options.signInLimits)
    router[route.method](route.path, ...steps, answerWith(route, options.services))
  }
}

function requireMember({ may, at }: MemberAccess, { access }: Services): RequestHandler {
  return async (request, response, next) => {
    const { userId } = request.session
    if (userId === undefined) throw new HttpError('NOT_SIGNED_IN', 'Sign in first.')
    const id = idSchema.safeParse(request.params[`${at}Id`])
    const member = id.success ? await access.memberFor(at, id.data, userId) : null
    if (!member) throw notFound(RESOURCES[at].replace('_', ' '))
    const roles: readonly Role[] = ROLES_FOR[may]
    if (!roles.includes(member.role)) {
      throw new HttpError('FORBIDDEN', `A ${member.role} may not ${REFUSED[may]} this.`)
    }
    response.locals.member = member
    next()
  }
}

function answerWith(route: AnyRoute, services: Services): RequestHandler {
  return async (request, response) => {
    const context = {
      services,
      params: request.params,
      query: route.query?.parse(request.query),
      body: route.body?.parse(request.body),
      ...uploadedFiles(request),
      visitor: route.access === 'visitor' ? visitorOf(request) : undefined,
      member: response.locals.member as Member | undefined,
    }
    // The declaration has fitted the handler to its own schemas; here all routes look alike.
    const result = await route.handle(context as never)
    send(route, response, result)
  }
}

function send({ answer }: AnyRoute, response: Response, result: unknown): void {
  response.set('Cache-Control', 'no-store')
  if (answer.download !== undefined) {
    const { fileName, bytes } = result as Download
    response.attachment(fileName).type(answer.download).send(Buffer.from(bytes))
    return
  }
  response.status(answer.statusFor?.(result as never) ?? answer.status)
  // What goes out is held to its contract as well: nothing leaves that the contract does not name.
  if (answer.body) response.json(answer.body.parse(result))
  else response.end()
}
