import { enableAutoUnmount, flushPromises } from '@vue/test-utils'
import { afterEach, describe, expect, it, vi } from 'vitest'
import type { ApiKey } from '@shared/contracts/key'
import AccountView from '@/views/AccountView.vue'
import {
  click,
  control,
  fakeApi,
  field,
  freshStores,
  mountAt,
  pageText,
  submit,
  type,
} from '../../support/mount'

enableAutoUnmount(afterEach)
afterEach(() => {
  vi.unstubAllGlobals()
  vi.restoreAllMocks()
})

const SECRET = 'bw_AbCdEfGhsecret'
const key = (changes: Partial<ApiKey> = {}): ApiKey => ({
  id: 'k',
  name: 'nightly upload',
  scopes: ['read', 'write'],
  prefix: 'bw_AbCdEfGh',
  createdAt: '2026-06-12T08:00:00.000Z',
  expiresAt: null,
  lastUsedAt: null,
  revokedAt: null,
  ...changes,
})
const open = () => mountAt('account', '/account', AccountView, freshStores())
const here = (text: string | RegExp) => vi.waitFor(() => expect(pageText()).toMatch(text))
const check = async (label: RegExp): Promise<void> => {
  field(label).click()
  await flushPromises()
}

describe('the API keys of an account', () => {
  it('are listed with what they may do, when they end and when they were used', async () => {
    fakeApi({ 'GET /api/keys': { body: { keys: [key()] } } })
    await open()
    await here('nightly upload')
    expect(pageText()).toContain('bw_AbCdEfGh…')
    expect(pageText()).toContain('Read, write data')
    expect(pageText()).toContain('when revoked')
    expect(pageText()).toContain('never')
  })

  it('are shown with their secret once, when they are made, and not after it was kept', async () => {
    const writeText = vi.spyOn(navigator.clipboard, 'writeText').mockResolvedValue()
    const sent = fakeApi({
      'GET /api/keys': { body: { keys: [] } },
      'POST /api/keys': { status: 201, body: { key: SECRET, made: key() } },
    })
    await open()
    await here('No key that works')
    await click('New key')
    await type('Name', 'nightly upload')
    await check(/^Write data/)
    await submit()
    const body = sent.find(({ method }) => method === 'POST')?.body as Record<string, unknown>
    expect(body).toMatchObject({ name: 'nightly upload', scopes: ['read', 'write'] })
    const days = (Date.parse(String(body['expiresAt'])) - Date.now()) / 86_400_000
    expect(days).toBeCloseTo(90, 2)
    await here('keep this key now')
    const box = document.querySelector<HTMLInputElement>('[aria-label="The key"]')
    expect(box?.value).toBe(SECRET)
    await click('Copy')
    expect(writeText).toHaveBeenCalledWith(SECRET)
    await here('Copied.')
    await click('I have kept it')
    expect(document.querySelector('[aria-label="The key"]')).toBeNull()
    await here('nightly upload')
  })

  it('are selected for copying by hand where the clipboard is closed to pages', async () => {
    vi.spyOn(navigator.clipboard, 'writeText').mockRejectedValue(new DOMException('no', 'NotAllowedError'))
    fakeApi({
      'GET /api/keys': { body: { keys: [] } },
      'POST /api/keys': { status: 201, body: { key: SECRET, made: key() } },
    })
    await open()
    await here('No key that works')
    await click('New key')
    await type('Name', 'nightly upload')
    await submit()
    await here('keep this key now')
    await click('Copy')
    await here('Selected: copy it')
    expect(document.activeElement).toBe(document.querySelector('[aria-label="The key"]'))
  })

  it('are not made without a name or anything they may do', async () => {
    const sent = fakeApi({ 'GET /api/keys': { body: { keys: [] } } })
    await open()
    await here('No key that works')
    await click('New key')
    await check(/^Read/)
    await submit()
    expect(pageText()).toContain('Give it a name.')
    expect(pageText()).toContain('Choose at least one thing the key may do.')
    expect(sent.some(({ method }) => method === 'POST')).toBe(false)
  })

  it('are revoked only after a question, and stand apart from then on', async () => {
    const revoked = key({ revokedAt: '2026-06-13T08:00:00.000Z' })
    const sent = fakeApi({
      'GET /api/keys': [{ body: { keys: [key()] } }, { body: { keys: [revoked] } }],
      'DELETE /api/keys/k': { status: 204 },
    })
    await open()
    await here('nightly upload')
    await click('Revoke nightly upload')
    await here('Revoke nightly upload?')
    expect(sent.some(({ method }) => method === 'DELETE')).toBe(false)
    await click('Revoke key')
    await here('1 key revoked or out of date')
    expect(() => control('Revoke nightly upload')).toThrow()
    await click(/revoked or out of date/)
    expect(pageText()).toContain('revoked 13 June 2026')
  })

  it('that are out of date offer nothing to revoke', async () => {
    fakeApi({ 'GET /api/keys': { body: { keys: [key({ expiresAt: '2020-01-01T00:00:00.000Z' })] } } })
    await open()
    await here('1 key revoked or out of date')
    expect(pageText()).toContain('No key that works')
  })
})
