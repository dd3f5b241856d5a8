import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { createMemoryHistory, createRouter } from 'vue-router'
import { http } from '@/api/http'
import { installGuards, safeReturnPath } from '@/router/guards'
import { useSessionStore } from '@/stores/session'
import { fakeApi, freshStores } from '../../../support/mount'

beforeEach(() => freshStores(null))
afterEach(() => vi.unstubAllGlobals())

const page = { template: '<p />' }
const guarded = () => {
  const router = createRouter({
    history: createMemoryHistory(),
    routes: [
      { path: '/', name: 'front-desk', component: page, meta: { title: 'Front desk' } },
      { path: '/polymers/:id', name: 'polymer', component: page, meta: { title: 'Polymer' } },
      { path: '/sign-in', name: 'sign-in', component: page, meta: { title: 'Sign in', open: true } },
    ],
  })
  installGuards(router)
  return router
}
const person = { id: 'me', name: 'Mo', email: 'mo@example.org', memberships: [], currentGroupId: null }

describe('safeReturnPath', () => {
  it.each([
    ['/polymers/7?statePoint=1', '/polymers/7?statePoint=1'],
    ['//elsewhere.example', '/'],
    ['/\\elsewhere.example', '/'],
    ['https://elsewhere.example', '/'],
    [undefined, '/'],
    [['/a', '/b'], '/'],
  ])('takes %j as %s', (next, path) => {
    expect(safeReturnPath(next)).toBe(path)
  })
})

describe('installGuards', () => {
  it('sends a stranger to the sign-in and keeps where they wanted to go', async () => {
    const router = guarded()
    await router.push('/polymers/7?statePoint=1')
    expect(router.currentRoute.value).toMatchObject({
      name: 'sign-in',
      query: { next: '/polymers/7?statePoint=1' },
    })
    expect(document.title).toBe('Sign in · Beadwright')
  })

  it('leads someone signed in past the sign-in to the page they asked for', async () => {
    useSessionStore().user = person
    const router = guarded()
    await router.push('/sign-in?next=/polymers/7')
    expect(router.currentRoute.value.fullPath).toBe('/polymers/7')
  })

  it('asks who is signed in once, before the first page', async () => {
    useSessionStore().loaded = false
    const sent = fakeApi({ 'GET /api/session': { body: { user: person, csrfToken: 't', demoUsers: [] } } })
    const router = guarded()
    await router.push('/')
    await router.push('/polymers/7')
    expect(sent).toHaveLength(1)
    expect(router.currentRoute.value.name).toBe('polymer')
  })

  it('goes to the sign-in when the session ends in the middle of work', async () => {
    useSessionStore().user = person
    const router = guarded()
    await router.push('/polymers/7')
    fakeApi({ 'GET /api/a': { status: 401, body: { code: 'NOT_SIGNED_IN', message: 'Sign in.' } } })
    await expect(http.get('/a')).rejects.toThrow('Sign in.')
    await vi.waitFor(() => expect(router.currentRoute.value.name).toBe('sign-in'))
    expect(router.currentRoute.value.query).toEqual({ next: '/polymers/7' })
    expect(useSessionStore().user).toBeNull()
  })
})
