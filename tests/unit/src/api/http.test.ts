import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { ApiError } from '@/api/http'
import { apiUrl, http, setCsrfToken, setSignedOutHandler, uploadForm } from '@/api/http'
import { fakeApi } from '../../../support/mount'

beforeEach(() => setCsrfToken('first token'))
afterEach(() => vi.unstubAllGlobals())

const failure = (work: Promise<unknown>): Promise<ApiError> =>
  work.then(
    () => {
      throw new Error('It went through.')
    },
    (error: unknown) => error as ApiError,
  )

describe('apiUrl', () => {
  it('leaves out what is null or undefined and encodes the rest', () => {
    expect(apiUrl('/terms', { statePoint: null, energy: undefined })).toBe('/api/terms')
    expect(apiUrl('/terms', { name: 'B & E', rows: 3 })).toBe('/api/terms?name=B+%26+E&rows=3')
  })
})

describe('http', () => {
  it('sends the token with writes and not with reads', async () => {
    const sent = fakeApi({ 'GET /api/a': { body: { seen: true } }, 'POST /api/a': { body: { made: true } } })
    expect(await http.get('/a')).toEqual({ seen: true })
    expect(await http.post('/a', { json: { name: 'x' } })).toEqual({ made: true })
    expect(sent[0].headers['X-CSRF-Token']).toBeUndefined()
    expect(sent[1].headers).toMatchObject({
      'X-CSRF-Token': 'first token',
      'Content-Type': 'application/json',
    })
    expect(sent[1].body).toEqual({ name: 'x' })
  })

  it('lets the browser set the content type of an upload', async () => {
    const sent = fakeApi({ 'POST /api/files': { body: {} } })
    const form = uploadForm(new File(['1 2'], 'B-E.txt'), { settings: { unit: 'nm' } })
    await http.post('/files', { form })
    expect(sent[0].headers['Content-Type']).toBeUndefined()
    expect(sent[0].body).toBe(form)
    expect(form.get('settings')).toBe('{"unit":"nm"}')
    expect((form.get('file') as File).name).toBe('B-E.txt')
  })

  it('answers an empty response with undefined', async () => {
    fakeApi({ 'DELETE /api/a': { status: 204 } })
    expect(await http.delete('/a')).toBeUndefined()
  })

  it('throws what the server said, field by field', async () => {
    const issues = [{ field: 'temperature', message: 'Above 0 K.' }]
    fakeApi({
      'POST /api/a': { status: 400, body: { code: 'VALIDATION_FAILED', message: 'Look again.', issues } },
    })
    const error = await failure(http.post('/a'))
    expect([error.status, error.code, error.message]).toEqual([400, 'VALIDATION_FAILED', 'Look again.'])
    expect(error.fieldMessage('temperature')).toBe('Above 0 K.')
    expect(error.fieldMessage('phase')).toBeUndefined()
  })

  it('tells a server that does not answer from one that answers nonsense', async () => {
    vi.stubGlobal('fetch', () => Promise.reject(new TypeError('Failed to fetch')))
    expect((await failure(http.get('/a'))).code).toBe('NO_CONNECTION')
    fakeApi({ 'GET /api/a': { status: 502, text: '<html>' } })
    expect((await failure(http.get('/a'))).code).toBe('UNREADABLE_ANSWER')
  })

  it('passes on that a request was given up', async () => {
    const gaveUp = new DOMException('given up', 'AbortError')
    vi.stubGlobal('fetch', () => Promise.reject(gaveUp))
    expect(await failure(http.get('/a'))).toBe(gaveUp)
  })

  it('fetches a new token once and repeats the write when the old one does not hold', async () => {
    const sent = fakeApi({
      'PUT /api/a': [
        { status: 403, body: { code: 'CSRF_TOKEN_INVALID', message: 'old' } },
        { body: { saved: true } },
      ],
      'GET /api/session': { body: { user: null, csrfToken: 'second token', demoUsers: [] } },
    })
    expect(await http.put('/a', { json: { kept: 1 } })).toEqual({ saved: true })
    expect(sent.map(({ method, path }) => `${method} ${path}`)).toEqual([
      'PUT /api/a',
      'GET /api/session',
      'PUT /api/a',
    ])
    expect(sent[2].headers['X-CSRF-Token']).toBe('second token')
    expect(sent[2].body).toEqual({ kept: 1 })
  })

  it('gives up when the new token does not hold either', async () => {
    const sent = fakeApi({
      'PUT /api/a': { status: 403, body: { code: 'CSRF_TOKEN_INVALID', message: 'old' } },
      'GET /api/session': { body: { user: null, csrfToken: 'second token', demoUsers: [] } },
    })
    expect((await failure(http.put('/a'))).code).toBe('CSRF_TOKEN_INVALID')
    expect(sent).toHaveLength(3)
  })

  it('says that nobody is signed in, and not for other refusals', async () => {
    const signedOut = vi.fn()
    setSignedOutHandler(signedOut)
    fakeApi({
      'GET /api/a': { status: 401, body: { code: 'NOT_SIGNED_IN', message: 'Sign in.' } },
      'POST /api/session': { status: 401, body: { code: 'SIGN_IN_FAILED', message: 'No.' } },
    })
    await failure(http.post('/session'))
    expect(signedOut).not.toHaveBeenCalled()
    await failure(http.get('/a'))
    expect(signedOut).toHaveBeenCalledOnce()
  })

  it('finds null where there is nothing, and still throws other errors', async () => {
    fakeApi({ 'GET /api/b': { status: 403, body: { code: 'FORBIDDEN', message: 'No.' } } })
    expect(await http.find('/a')).toBeNull()
    expect((await failure(http.find('/b'))).code).toBe('FORBIDDEN')
  })

  it.each([
    ['attachment; filename="bond_B-E_400K.txt"', 'bond_B-E_400K.txt'],
    ['attachment; filename=bond.txt', 'bond.txt'],
    ['inline', ''],
  ])('reads the name of a file from %s', async (disposition, name) => {
    fakeApi({ 'GET /api/t': { text: '# rows', headers: { 'Content-Disposition': disposition } } })
    expect(await http.textFile('/t')).toEqual({ name, text: '# rows' })
  })
})
