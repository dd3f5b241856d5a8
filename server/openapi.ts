import {
  OpenApiGeneratorV31,
  OpenAPIRegistry,
  type ResponseConfig,
  type RouteConfig,
} from '@asteasolutions/zod-to-openapi'
import { z } from 'zod'
import { idSchema } from '../shared/contracts/common'
import { MAX_BLOCKS } from '../shared/contracts/distribution'
import { type ApiCode, errorSchema } from '../shared/contracts/error'
import { statusOf } from './errors/http-error'
import { SESSION_COOKIE } from './middleware/session'
import { BODY_EXAMPLES } from './openapi-examples'
import { API_DESCRIPTION, TAGS } from './openapi-texts'
import { keyScopeOf } from './routes/key-scope'
import { type AnyRoute, ROLES_FOR } from './routes/route'

/** The description of the API, from the same declarations that serve it. */
export function openApiDocument(routes: readonly AnyRoute[]) {
  const registry = new OpenAPIRegistry()
  registry.registerComponent('securitySchemes', 'session', {
    type: 'apiKey',
    in: 'cookie',
    name: SESSION_COOKIE,
    description: 'The cookie of someone signed in',
  })
  registry.registerComponent('securitySchemes', 'token', {
    type: 'apiKey',
    in: 'header',
    name: 'X-CSRF-Token',
    description: 'The token of the session, from GET /api/session; for writes with a cookie',
  })
  registry.registerComponent('securitySchemes', 'key', {
    type: 'http',
    scheme: 'bearer',
    description: 'An API key, made on the account page',
  })
  for (const route of routes) registry.registerPath(pathOf(route))
  return new OpenApiGeneratorV31(registry.definitions).generateDocument({
    openapi: '3.1.0',
    info: { title: 'Beadwright API', version: '1', description: API_DESCRIPTION },
    tags: [...TAGS],
  })
}

function pathOf(route: AnyRoute): RouteConfig {
  const names = [...route.path.matchAll(/:(\w+)/g)].map(([, name]) => name)
  const params = z.object(
    Object.fromEntries(names.map((name) => [name, name.endsWith('Id') ? idSchema : z.string()])),
  )
  return {
    method: route.method,
    path: route.path.replace(/:(\w+)/g, '{$1}'),
    summary: route.summary,
    description: descriptionOf(route),
    tags: [route.path.split('/')[2]],
    ...(route.access === 'anyone' || route.access === 'link' ? {} : { security: security(route) }),
    request: {
      ...(names.length > 0 ? { params } : {}),
      ...(route.query ? { query: route.query as z.ZodObject } : {}),
      ...(route.body ? { body: { required: true, content: bodyOf(route, route.body) } } : {}),
    },
    responses: { ...success(route), ...failures(route) },
  }
}

/** Who may call it, and with what key. */
function descriptionOf(route: AnyRoute): string {
  const { access, description } = route
  const scope = keyScopeOf(route)
  const roles = typeof access === 'object' ? [`Roles: ${ROLES_FOR[access.may].join(', ')}.`] : []
  const key = {
    anyone: 'Open to everyone.',
    key: 'Any key.',
    visitor: 'Not open to keys.',
    person: 'Not open to keys.',
    link: 'Open to whoever holds the link: the token in the path is the credential, neither cookie nor key is looked at.',
    recipient: 'Open to whom the hand-over was sent. Not open to keys.',
  }
  const keys =
    typeof access === 'string' ? key[access] : scope ? `Key scope: \`${scope}\`.` : 'Not open to keys.'
  return [description, ...roles, keys].filter((each) => each !== undefined).join(' ')
}

/** Any one of these is enough. */
function security(route: AnyRoute): Record<string, string[]>[] {
  const byKey = route.access === 'key' || keyScopeOf(route) !== null ? [{ key: [] }] : []
  if (route.access === 'key') return byKey
  return [...byKey, route.method === 'get' ? { session: [] } : { session: [], token: [] }]
}

function bodyOf({ upload, method, path }: AnyRoute, schema: z.ZodType) {
  const given = BODY_EXAMPLES[`${method} ${path}`]
  if (!upload) return { 'application/json': { schema, ...(given && { example: given }) } }
  const file = z.string().meta({ format: 'binary', description: 'The file, 20 MB at most' })
  const blocks = z
    .array(z.string().meta({ format: 'binary' }))
    .max(MAX_BLOCKS)
    .optional()
  const parts =
    upload === 'single'
      ? z.object({ file, settings: schema })
      : z.object({ file, blocks, chains: blocks, settings: schema })
  return {
    'multipart/form-data': {
      schema: parts,
      encoding: { settings: { contentType: 'application/json' } },
      ...(given && { example: { file: '(the file)', settings: given } }),
    },
  }
}

function success({ answer, summary }: AnyRoute): Record<string, ResponseConfig> {
  const status = String(answer.status)
  if (answer.download !== undefined) {
    const schema = z.string().meta({ format: 'binary' })
    return { [status]: { description: summary, content: { [answer.download]: { schema } } } }
  }
  if (!answer.body) return { [status]: { description: 'Done' } }
  const content = { 'application/json': { schema: answer.body } }
  const answers: Record<string, ResponseConfig> = { [status]: { description: summary, content } }
  if (answer.statusFor) answers['503'] = { description: 'The database does not answer', content }
  return answers
}

const KEY_FAILURES = ['KEY_INVALID', 'KEY_EXPIRED', 'KEY_REVOKED'] as const

/** By status: the codes that follow from access and form, and those the route names itself. */
function failures(route: AnyRoute): Record<string, ResponseConfig> {
  const codes = new Set<ApiCode>(route.errors)
  const isOpen = route.access === 'anyone' || route.access === 'link'
  if (typeof route.access === 'object') ['NOT_SIGNED_IN', 'FORBIDDEN', 'NOT_FOUND'].forEach(add)
  if (route.access === 'link') add('LINK_INVALID')
  if (route.access === 'recipient') ['NOT_SIGNED_IN', 'NOT_FOUND'].forEach(add)
  if (route.access === 'person' || route.access === 'key') add('NOT_SIGNED_IN')
  if (!isOpen) KEY_FAILURES.forEach(add)
  if (keyScopeOf(route) !== null) add('KEY_SCOPE_MISSING')
  else if (!isOpen && route.access !== 'key') add('KEY_NOT_ALLOWED')
  if (route.method !== 'get' && !isOpen) add('CSRF_TOKEN_INVALID')
  if (route.limited) add('TOO_MANY_ATTEMPTS')
  if (route.body ?? route.query) add('VALIDATION_FAILED')
  if (route.body) add('PAYLOAD_TOO_LARGE')
  if (!route.answer.statusFor && route.path !== '/api/openapi.json') add('UNAVAILABLE')
  add('INTERNAL')
  const byStatus = new Map<string, string[]>()
  for (const code of codes) {
    const status = String(statusOf(code))
    byStatus.set(status, [...(byStatus.get(status) ?? []), code])
  }
  if (route.readsContent) byStatus.set('422', ['a code of the core, with line, column, field or position'])
  const content = { 'application/json': { schema: errorSchema } }
  return Object.fromEntries(
    [...byStatus].map(([status, names]) => [status, { description: names.join(', '), content }]),
  )

  function add(code: string): void {
    codes.add(code as ApiCode)
  }
}
