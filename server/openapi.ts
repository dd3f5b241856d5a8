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
import type { AnyRoute } from './routes/route'

const DESCRIPTION = `Numbers are in internal units: nm, rad, kJ/mol, K, g/mol. null stands for "no data".

Sign in with POST /api/session and keep the cookie. Every write carries the header X-CSRF-Token with the token that
GET /api/session gives; signing in changes it. Whoever is not in the group of a record gets 404 for it.`

/** The description of the API, from the same declarations that serve it. */
export function openApiDocument(routes: readonly AnyRoute[]) {
  const registry = new OpenAPIRegistry()
  registry.registerComponent('securitySchemes', 'session', {
    type: 'apiKey',
    in: 'cookie',
    name: SESSION_COOKIE,
  })
  registry.registerComponent('securitySchemes', 'token', {
    type: 'apiKey',
    in: 'header',
    name: 'X-CSRF-Token',
  })
  for (const route of routes) registry.registerPath(pathOf(route))
  return new OpenApiGeneratorV31(registry.definitions).generateDocument({
    openapi: '3.1.0',
    info: { title: 'Beadwright', version: '1', description: DESCRIPTION },
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
    tags: [route.path.split('/')[2]],
    ...(route.access === 'anyone' ? {} : { security: [security(route)] }),
    request: {
      ...(names.length > 0 ? { params } : {}),
      ...(route.query ? { query: route.query as z.ZodObject } : {}),
      ...(route.body ? { body: { required: true, content: bodyOf(route, route.body) } } : {}),
    },
    responses: { ...success(route), ...failures(route) },
  }
}

function security({ method }: AnyRoute): Record<string, string[]> {
  return method === 'get' ? { session: [] } : { session: [], token: [] }
}

function bodyOf({ upload }: AnyRoute, schema: z.ZodType) {
  if (!upload) return { 'application/json': { schema } }
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
    'multipart/form-data': { schema: parts, encoding: { settings: { contentType: 'application/json' } } },
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

/** By status: the codes that follow from access and form, and those the route names itself. */
function failures(route: AnyRoute): Record<string, ResponseConfig> {
  const codes = new Set<ApiCode>(route.errors)
  if (typeof route.access === 'object') ['NOT_SIGNED_IN', 'FORBIDDEN', 'NOT_FOUND'].forEach(add)
  if (route.method !== 'get') add('CSRF_TOKEN_INVALID')
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
