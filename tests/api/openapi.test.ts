import type { Express } from 'express'
import request from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { BODY_EXAMPLES } from '../../server/openapi-examples'
import { routes } from '../../server/routes'
import { keyScopeOf } from '../../server/routes/key-scope'
import { type ApiServer, openApiServer } from '../support/api-server'
import { nameOf } from '../support/route-calls'

interface Operation {
  readonly summary?: string
  readonly description?: string
  readonly parameters?: readonly { readonly name: string; readonly in: string }[]
  readonly requestBody?: { readonly content: Record<string, unknown> }
  readonly responses: Record<string, { readonly content?: Record<string, { readonly schema: object }> }>
  readonly security?: readonly Record<string, unknown>[]
}

interface Document {
  readonly openapi: string
  readonly paths: Record<string, Record<string, Operation>>
  readonly components: {
    readonly schemas: Record<string, unknown>
    readonly securitySchemes: Record<string, unknown>
  }
}

let server: ApiServer
let document: Document

beforeAll(async () => {
  server = await openApiServer()
  document = (await request(server.app).get('/api/openapi.json')).body as Document
})

afterAll(() => server.close())

/** What Express itself would answer under /api. */
function mounted(app: Express): string[] {
  const { stack } = app.router as unknown as {
    stack: { route?: { path: string; methods: Record<string, boolean> } }[]
  }
  return stack
    .flatMap(({ route }) =>
      route ? Object.keys(route.methods).map((method) => `${method} ${route.path}`) : [],
    )
    .filter((route) => route.includes(' /api'))
    .sort()
}

function operations(): { name: string; operation: Operation }[] {
  return Object.entries(document.paths).flatMap(([path, methods]) =>
    Object.entries(methods).map(([method, operation]) => ({
      name: `${method} ${path.replace(/\{(\w+)\}/g, ':$1')}`,
      operation,
    })),
  )
}

describe('the API document', () => {
  it('names every route that is mounted, and no other', () => {
    expect(
      operations()
        .map(({ name }) => name)
        .sort(),
    ).toEqual(mounted(server.app))
    expect(mounted(server.app).length).toBeGreaterThan(35)
  })

  it('describes every parameter of every path', () => {
    for (const { name, operation } of operations()) {
      const inPath = [...name.matchAll(/:(\w+)/g)].map(([, parameter]) => parameter)
      const described = (operation.parameters ?? [])
        .filter((each) => each.in === 'path')
        .map((each) => each.name)
      expect([name, described]).toEqual([name, inPath])
    }
  })

  it('says of every write what it takes, which token it needs and how it fails', () => {
    for (const { name, operation } of operations().filter(({ name: each }) => !each.startsWith('get'))) {
      if (operation.security === undefined) continue
      expect([name, operation.security]).toEqual([name, expect.arrayContaining([{ session: [], token: [] }])])
      expect(operation.responses).toHaveProperty('403')
      const takes = routes.some(({ method, path, body, upload }) => {
        return `${method} ${path}` === name && (body !== undefined || upload !== undefined)
      })
      expect([name, operation.requestBody !== undefined]).toEqual([name, takes])
    }
  })

  it('says of every operation who may call it, and with which scope of a key', () => {
    for (const { name, operation } of operations()) {
      const route = routes.find((each) => nameOf(each) === name)!
      const scope = keyScopeOf(route)
      const byKey = scope !== null || route.access === 'key'
      expect([name, operation.security?.some((each) => 'key' in each) ?? false]).toEqual([name, byKey])
      expect([name, operation.description]).toEqual([name, expect.stringMatching(/key|everyone/i)])
      if (scope !== null) expect(operation.description).toContain(`Key scope: \`${scope}\``)
    }
    expect(document.components.securitySchemes).toMatchObject({ key: { type: 'http', scheme: 'bearer' } })
  })

  it('gives examples of the main job that fit their contracts', () => {
    for (const [name, example] of Object.entries(BODY_EXAMPLES)) {
      const route = routes.find((each) => nameOf(each) === name)
      expect([name, route?.body?.safeParse(example).success]).toEqual([name, true])
    }
    expect(JSON.stringify(document.paths)).toContain('poly(vinyl acetate)')
  })

  it('gives every failure the one error shape', () => {
    const error = { $ref: '#/components/schemas/Error' }
    for (const { name, operation } of operations()) {
      for (const [status, response] of Object.entries(operation.responses)) {
        if (Number(status) < 400 || (name === 'get /api/health' && status === '503')) continue
        expect([name, response.content?.['application/json'].schema]).toEqual([name, error])
      }
    }
  })

  it('refers to the contracts by their names and to nothing that is missing', () => {
    const text = JSON.stringify(document)
    const references = [...text.matchAll(/"#\/components\/schemas\/(\w+)"/g)].map(([, name]) => name)
    for (const name of references) expect(Object.keys(document.components.schemas)).toContain(name)
    expect(references).toEqual(
      expect.arrayContaining(['Polymer', 'Mapping', 'Term', 'Distribution', 'Error']),
    )
  })

  it('takes uploads as multipart', () => {
    const { post } = document.paths['/api/terms/{termId}/distributions']
    expect(Object.keys(post.requestBody?.content ?? {})).toEqual(['multipart/form-data'])
  })
})

describe('the page that shows the document', () => {
  it('stands at /api/docs, holds no script of its own and comes whole from this server', async () => {
    const moved = await request(server.app).get('/api/docs')
    expect([moved.status, moved.headers['location']]).toEqual([301, '/api/docs/'])
    const page = await request(server.app).get('/api/docs/')
    expect(page.status).toBe(200)
    expect(page.text).not.toMatch(/<script(?! src=".\/)|\son\w+=|https?:/)
    const files = [...page.text.matchAll(/(?:src|href)="(\.\/[^"]+)"/g)].map(([, path]) => path)
    expect(files).toHaveLength(4)
    for (const path of [...files, './fonts/fira-sans-latin-400-normal.woff2']) {
      const file = await request(server.app).get(`/api/docs/${path.slice(2)}`)
      expect([path, file.status]).toEqual([path, 200])
    }
    expect((await request(server.app).get('/api/docs/nothing')).status).toBe(404)
  })
})
