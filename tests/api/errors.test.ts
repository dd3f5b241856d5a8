import { mkdirSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import request from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type ApiServer, openApiServer } from '../support/api-server'
import { buildGroup, PASSWORD, type TestGroup } from '../support/group-builder'
import { BOND_SETTINGS, bondFile, buildJob, type Job } from '../support/job-builder'
import { temporaryFolder } from '../support/temporary-folder'

let server: ApiServer
let group: TestGroup
let job: Job

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
  job = await buildJob(server.services, group.modeller.member, { joint: false })
})

afterAll(() => server.close())

const polymers = (): string => `/api/groups/${group.groupId}/polymers`

function write(path: string) {
  const { client } = group.owner
  return client.raw('post', path).set('X-CSRF-Token', client.csrfToken)
}

describe('a request that makes no sense', () => {
  it('names every field that is wrong', async () => {
    const response = await group.owner.client.post(polymers(), { name: '', notes: 5 })
    expect(response.status).toBe(400)
    const { issues, ...body } = response.body as { issues: { field: string }[] }
    expect(body).toMatchObject({ code: 'VALIDATION_FAILED', field: 'name' })
    expect(issues.map(({ field }) => field)).toEqual(['name', 'smiles', 'notes'])
  })

  it('with malformed JSON is told so', async () => {
    const response = await write(polymers()).type('json').send('{"name": ')
    expect(response.status).toBe(400)
    expect(response.body).toMatchObject({
      code: 'VALIDATION_FAILED',
      message: 'The request is not valid JSON.',
    })
  })

  it.each(['text/plain', 'application/x-www-form-urlencoded', 'application/xml'])(
    'of the content type %s is refused',
    async (type) => {
      const response = await write(polymers()).type(type).send('name=x&smiles=*CC*')
      expect(response.status).toBe(400)
      expect(response.body).toMatchObject({ code: 'VALIDATION_FAILED' })
    },
  )

  it('over the limit of JSON is refused', async () => {
    const response = await group.owner.client.post(polymers(), {
      name: 'x',
      smiles: '*CC*',
      notes: 'x'.repeat(3e6),
    })
    expect(response.status).toBe(413)
    expect(response.body).toMatchObject({ code: 'PAYLOAD_TOO_LARGE' })
  })

  it('with a character that the database cannot hold is refused, not broken', async () => {
    const response = await group.owner.client.post(polymers(), { name: 'x\u0000y', smiles: '*CC*' })
    expect(response.status).toBe(400)
    expect(response.body).toMatchObject({ code: 'VALIDATION_FAILED' })
  })

  it.each(['/api', '/api/', '/api/nothing', '/api/polymers', '/api/polymers/x/y/z'])(
    'for %s is not found, in the one shape',
    async (path) => {
      const response = await request(server.app).get(path)
      expect(response.status).toBe(404)
      expect(response.body).toEqual({
        code: 'NOT_FOUND',
        message: expect.any(String) as string,
        requestId: response.headers['x-request-id'],
      })
    },
  )

  it('by a method that the path does not know is not found', async () => {
    const response = await group.owner.client.put(`/api/polymers/${job.polymerId}`, {})
    expect(response.status).toBe(404)
  })

  it('with a path that is no text is refused', async () => {
    const response = await request(server.app).get('/api/set-up/%E0%A4%A')
    expect(response.status).toBe(400)
    expect(response.body).toMatchObject({ code: 'VALIDATION_FAILED' })
  })

  it('with a query that is none is refused', async () => {
    for (const query of ['', 'statePoint=', 'statePoint=x', 'statePoint=1&statePoint=2']) {
      const response = await group.owner.client.get(`/api/mappings/${job.mappingId}/pairs?${query}`)
      expect([query, response.status]).toEqual([query, 400])
      expect(response.body).toMatchObject({ code: 'VALIDATION_FAILED', field: 'statePoint' })
    }
  })
})

describe('an upload that makes no sense', () => {
  const path = (): string => `/api/terms/${job.angleId}/distributions`

  it('without a file names the file', async () => {
    const response = await write(path()).field('settings', '{}')
    expect(response.status).toBe(400)
    expect(response.body).toMatchObject({ code: 'VALIDATION_FAILED', field: 'file' })
  })

  it('with settings that are no JSON names the settings', async () => {
    const response = await write(path()).field('settings', '{').attach('file', Buffer.from('1 2'), 'x.txt')
    expect(response.body).toMatchObject({ code: 'VALIDATION_FAILED', field: 'settings' })
  })

  it('with more than one file, or a field nobody asked for, is refused', async () => {
    const two = await write(path())
      .field('settings', '{}')
      .attach('file', Buffer.from('1'), 'a.txt')
      .attach('file', Buffer.from('2'), 'b.txt')
    expect(two.status).toBe(400)
    const extra = await write(path())
      .field('settings', '{}')
      .field('more', '1')
      .attach('file', Buffer.from('1'), 'a')
    expect(extra.status).toBe(400)
  })

  it('as JSON is told how to send it', async () => {
    const response = await group.owner.client.post(path(), { settings: {} })
    expect(response.status).toBe(400)
    expect(response.body).toMatchObject({ field: 'file' })
  })

  it('cut off in the middle is refused', async () => {
    const response = await write(path())
      .set('Content-Type', 'multipart/form-data; boundary=x')
      .send('--x\r\nContent-Disposition: form-data; name="file"; filename="a.txt"\r\n\r\n1 2')
    expect(response.status).toBe(400)
  })
})

describe('every answer', () => {
  it('carries the policy that lets nothing foreign in', async () => {
    for (const path of ['/api/health', '/api/nothing', '/api/session']) {
      const { headers } = await request(server.app).get(path)
      const policy = String(headers['content-security-policy'])
      expect(policy).toContain("script-src 'self';")
      expect(policy).toContain("frame-ancestors 'none'")
      expect(policy).not.toMatch(/https?:|unsafe-eval|script-src[^;]*unsafe-inline|upgrade-insecure-requests/)
      expect(headers['x-content-type-options']).toBe('nosniff')
      expect(headers['x-frame-options']).toBe('DENY')
      expect(headers['x-powered-by']).toBeUndefined()
      expect(headers['referrer-policy']).toBe('same-origin')
      expect(headers['cache-control']).toBe('no-store')
    }
  })

  it('carries a request id of its own, whatever the caller sends', async () => {
    const ids = await Promise.all(
      [1, 2].map(async () => {
        const { headers } = await request(server.app).get('/api/health').set('X-Request-Id', 'mine')
        return String(headers['x-request-id'])
      }),
    )
    expect(ids[0]).toMatch(/^[0-9a-f-]{36}$/)
    expect(ids[0]).not.toBe(ids[1])
  })

  it('is compressed where that helps', async () => {
    const response = await request(server.app).get('/api/openapi.json').set('Accept-Encoding', 'gzip')
    expect(response.headers['content-encoding']).toBe('gzip')
  })
})

describe('a fault of ours', () => {
  it('is answered with a fixed sentence and the request id, and logged whole', async () => {
    const broken = await openApiServer()
    try {
      const people = await buildGroup(broken)
      await broken.dataSource.query('alter table "polymer" rename to "polymer_gone"')
      const response = await people.owner.client.get(`/api/groups/${people.groupId}/polymers`)
      expect(response.status).toBe(500)
      const { code, message, requestId } = response.body as Record<string, string>
      expect(code).toBe('INTERNAL')
      expect(message).not.toMatch(/polymer|relation/)
      const line = broken
        .log()
        .split('\n')
        .find((text) => text.includes('request failed'))
      expect(line).toContain(requestId)
      expect(line).toContain('relation \\"polymer\\" does not exist')
      expect(line).toContain('polymer.service')
    } finally {
      await broken.close()
    }
  })
})

describe('the log', () => {
  it('holds a line for each request and no secret', async () => {
    const { client, email } = group.owner
    await client.signIn(email, PASSWORD)
    await client.get('/api/set-up/a-secret-token')
    const file = bondFile('secret-free.txt')
    await client.upload(
      `/api/terms/${job.bondId}/distributions`,
      { statePointId: job.statePointId, settings: BOND_SETTINGS },
      file,
    )
    await client.upload(
      `/api/terms/${job.bondId}/distributions`,
      { statePointId: job.statePointId, settings: BOND_SETTINGS },
      { ...file, text: `${file.text}oops content-of-the-file` },
    )
    await client.post(polymers(), { name: 'x\u0000y', smiles: '*CC*' })
    const log = server.log()
    const lines = log
      .trim()
      .split('\n')
      .map(
        (line) => JSON.parse(line) as { reqId?: string; req?: { url: string }; res?: { statusCode: number } },
      )
    expect(lines.some(({ req, res }) => req?.url === '/api/session' && res?.statusCode === 200)).toBe(true)
    expect(lines.some(({ req }) => req?.url === '/api/set-up/[token]')).toBe(true)
    for (const secret of [
      PASSWORD,
      'a-secret-token',
      client.csrfToken,
      'beadwright.sid',
      'argon2',
      'content-of-the-file',
    ]) {
      expect(log).not.toContain(secret)
    }
  })
})

describe('health', () => {
  it('says that server and database answer', async () => {
    const response = await request(server.app).get('/api/health')
    expect(response.status).toBe(200)
    expect(response.body).toEqual({ status: 'ok', database: true, version: '0.0.0' })
  })

  it('says so when the database is gone, and all else asks to try again', async () => {
    const lost = await openApiServer()
    const people = await buildGroup(lost)
    await lost.dropDatabase()
    try {
      const health = await request(lost.app).get('/api/health')
      expect(health.status).toBe(503)
      expect(health.body).toMatchObject({ status: 'unavailable', database: false })
      const response = await people.owner.client.get(`/api/groups/${people.groupId}/polymers`)
      expect(response.status).toBe(503)
      expect(response.body).toMatchObject({ code: 'UNAVAILABLE' })
    } finally {
      await lost.close()
    }
  })
})

describe('the browser application', () => {
  it('is served with its assets for ever and its page anew each time', async () => {
    const folder = temporaryFolder()
    mkdirSync(join(folder, 'assets'))
    writeFileSync(join(folder, 'index.html'), '<!doctype html><title>Beadwright</title>')
    writeFileSync(join(folder, 'assets', 'index-abc123.js'), 'export {}')
    writeFileSync(join(folder, 'icon.svg'), '<svg xmlns="http://www.w3.org/2000/svg"/>')
    const site = await openApiServer({ clientFolder: folder })
    try {
      for (const path of ['/', '/sign-in', '/polymers/1/mappings/2/bench', '/index.html']) {
        const page = await request(site.app).get(path)
        expect([path, page.status, page.headers['cache-control']]).toEqual([path, 200, expect.anything()])
        expect(page.text).toContain('<title>Beadwright</title>')
      }
      expect((await request(site.app).get('/')).headers['cache-control']).toBe('no-store')
      const asset = await request(site.app).get('/assets/index-abc123.js')
      expect(asset.headers['cache-control']).toBe('public, max-age=31536000, immutable')
      expect((await request(site.app).get('/icon.svg')).headers['content-type']).toMatch('image/svg+xml')
      const missing = await request(site.app).get('/assets/index-old.js')
      expect(missing.status).toBe(404)
      expect(missing.text).not.toContain('<title>')
      expect((await request(site.app).get('/api/nothing')).body).toMatchObject({ code: 'NOT_FOUND' })
      expect((await request(site.app).get('/assets/../../package.json')).text).not.toContain('"dependencies"')
    } finally {
      await site.close()
    }
  })
})
