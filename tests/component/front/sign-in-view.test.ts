import { enableAutoUnmount, flushPromises } from '@vue/test-utils'
import { afterEach, describe, expect, it, vi } from 'vitest'
import { useSessionStore } from '@/stores/session'
import SignInView from '@/views/SignInView.vue'
import { control, fakeApi, field, freshStores, mountAt, pageText, submit, type } from '../../support/mount'

enableAutoUnmount(afterEach)
afterEach(() => vi.unstubAllGlobals())

const user = { id: 'me', name: 'Mo', email: 'mo@example.org', memberships: [] }
const signedIn = { 'GET /api/session': { body: { user, csrfToken: 't', demoUsers: [] } } }
const open = (next = '', demo = false) => {
  const pinia = freshStores(null)
  if (demo) useSessionStore().demoUsers = [{ id: 'demo-1', name: 'Renate Okafor', role: 'reviewer' }]
  return mountAt('sign-in', `/sign-in${next}`, SignInView, pinia)
}

describe('SignInView', () => {
  it('starts in the first field', async () => {
    await open()
    expect(document.activeElement).toBe(field('E-mail'))
  })

  it('says in place what is missing, and sends nothing', async () => {
    const sent = fakeApi({})
    await open()
    await type('E-mail', 'mo')
    await submit()
    await vi.waitFor(() => expect(pageText()).toContain('This does not look like an e-mail address.'), 5_000)
    expect(pageText()).toContain('Type your password.')
    expect(sent).toEqual([])
  })

  it('goes on to the page that was asked for', async () => {
    const sent = fakeApi({ ...signedIn, 'POST /api/session': { body: {} } })
    const { router } = await open('?next=/polymers/7')
    await type('E-mail', 'mo@example.org')
    await type('Password', 'a long sentence')
    await submit()
    await vi.waitFor(() => expect(router.currentRoute.value.fullPath).toBe('/polymers/7'))
    expect(sent[0].body).toEqual({ email: 'mo@example.org', password: 'a long sentence' })
  })

  it('does not say which of the two is wrong, empties the password and waits in it', async () => {
    fakeApi({ 'POST /api/session': { status: 401, body: { code: 'SIGN_IN_FAILED', message: 'No.' } } })
    await open()
    await type('E-mail', 'mo@example.org')
    await type('Password', 'wrong')
    await submit()
    await flushPromises()
    expect(pageText()).toContain('E-mail and password do not go together')
    expect(field('Password').value).toBe('')
    expect(field('E-mail').value).toBe('mo@example.org')
    expect(document.activeElement).toBe(field('Password'))
  })

  it('passes on how long to wait after too many attempts', async () => {
    const message = 'Wait 14 minutes and try again.'
    fakeApi({ 'POST /api/session': { status: 429, body: { code: 'TOO_MANY_ATTEMPTS', message } } })
    await open()
    await type('E-mail', 'mo@example.org')
    await type('Password', 'wrong')
    await submit()
    expect(pageText()).toContain(message)
  })

  it('offers the demonstration’s people only when there are any, marked as invented', async () => {
    const { wrapper } = await open()
    expect(pageText()).not.toContain('demonstration')
    wrapper.unmount()
    const sent = fakeApi({ ...signedIn, 'POST /api/session/demo': { body: {} } })
    const { router } = await open('', true)
    expect(pageText()).toContain('all its data are invented')
    control('Enter as Renate Okafor, reviewer').click()
    await vi.waitFor(() => expect(router.currentRoute.value.name).toBe('front-desk'))
    expect(sent[0].body).toEqual({ userId: 'demo-1' })
  })
})
