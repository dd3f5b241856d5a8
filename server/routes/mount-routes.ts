import type { Request, RequestHandler, Response, Router } from 'express'
import { idSchema, type Role } from '../../shared/contracts/common'
import { HttpError, notFound } from '../errors/http-error'
import { requireCsrfToken } from '../middleware/csrf'
import { readJson } from '../middleware/json-body'
import { keyOf, readKey, requireScope, unlessKey } from '../middleware/key'
import type { Limits } from '../middleware/limits'
import { readUpload, uploadedFiles } from '../middleware/upload'
import { visitorOf } from '../middleware/visitor'
import type { Download, Member, Services } from '../services'
import { RESOURCES } from '../services/access.service'
import type { ReceivingParty } from '../services/delivery/party'
import { keyScopeOf } from './key-scope'
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
  readonly limits: Limits
}

/**
 * Mounts routes. Each request passes, in this order: key or else session and token of a write, scope of the key, membership and
 * role, body, limits; only then is its content parsed and its handler called. So nobody who may not write can make the server
 * read an upload. A link is a key of its own: neither cookie nor token are looked at, and its limit comes before it is.
 */
export function mountRoutes(router: Router, routes: readonly AnyRoute[], options: MountOptions): void {
  for (const route of routes) {
    const steps: RequestHandler[] = []
    if (route.access === 'key') steps.push(readKey(options.services), requireKey)
    else if (route.access === 'link') steps.push(...options.limits.link, requireLink(options.services))
    else if (route.access !== 'anyone') {
      steps.push(readKey(options.services), unlessKey(options.sessions))
      if (route.method !== 'get') steps.push(unlessKey(requireCsrfToken))
      steps.push(requireScope(keyScopeOf(route)))
    }
    if (route.access === 'person') steps.push(requirePerson)
    if (route.access === 'recipient') steps.push(requireRecipient(options.services))
    if (typeof route.access === 'object') steps.push(requireMember(route.access, options.services))
    if (route.upload) steps.push(readUpload(route.upload))
    else if (route.body) steps.push(readJson)
    if (route.limited && route.access !== 'link') steps.push(...options.limits[route.limited])
    router[route.method](route.path, ...steps, answerWith(route, options.services))
  }
}

function requireMember({ may, at }: MemberAccess, { access }: Services): RequestHandler {
  return async (request, response, next) => {
    const key = keyOf(response)
    const userId = key?.userId ?? signedIn(request)
    const id = idSchema.safeParse(request.params[`${at}Id`])
    const member = id.success ? await access.memberFor(at, id.data, userId) : null
    if (!member) throw notFound(RESOURCES[at].replace('_', ' '))
    const roles: readonly Role[] = ROLES_FOR[may]
    if (!roles.includes(member.role)) {
      throw new HttpError('FORBIDDEN', `A ${member.role} may not ${REFUSED[may]} this.`)
    }
    response.locals.member = key ? { ...member, by: key.name } : member
    next()
  }
}

/** Whoever holds the link of a delivery. */
function requireLink({ received }: Services): RequestHandler {
  return async (request, response, next) => {
    response.locals.recipient = await received.byToken(String(request.params.token))
    next()
  }
}

/** Someone signed in whom the hand-over was sent to; to all others it is not there, whatever their role. */
function requireRecipient({ received }: Services): RequestHandler {
  return async (request, response, next) => {
    const userId = signedIn(request)
    const id = idSchema.safeParse(request.params.handOverId)
    response.locals.recipient = id.success ? await received.byAccount(id.data, userId) : null
    if (response.locals.recipient === null) throw notFound('hand-over')
    next()
  }
}

/** Someone signed in, and no script: what is a person's own, no key opens. */
const requirePerson: RequestHandler = (request, response, next) => {
  response.locals.userId = signedIn(request)
  next()
}

const requireKey: RequestHandler = (_request, response, next) => {
  if (!keyOf(response)) throw new HttpError('NOT_SIGNED_IN', 'Send a key, as in Authorization: Bearer bw_….')
  next()
}

function signedIn({ session }: Request): string {
  if (session.userId === undefined) throw new HttpError('NOT_SIGNED_IN', 'Sign in first.')
  return session.userId
}

function answerWith(route: AnyRoute, services: Services): RequestHandler {
  return async (request, response) => {
    const context = {
      services,
      params: request.params,
      query: route.query?.parse(request.query),
      body: route.body?.parse(request.body),
      ...uploadedFiles(request),
      visitor: route.access === 'visitor' || route.access === 'person' ? visitorOf(request) : undefined,
      userId: response.locals.userId as string | undefined,
      key: keyOf(response),
      member: response.locals.member as Member | undefined,
      recipient: response.locals.recipient as ReceivingParty | undefined,
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
