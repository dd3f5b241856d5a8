import { enableAutoUnmount } from '@vue/test-utils'
import { afterEach, describe, expect, it, vi } from 'vitest'
import SetUpView from '@/views/SetUpView.vue'
import { fakeApi, freshStores, mountAt, pageText, submit, type } from '../../support/mount'

enableAutoUnmount(afterEach)
afterEach(() => vi.unstubAllGlobals())

const open = () => mountAt('set-up', '/set-up/abc', SetUpView, freshStores(null))
const works = { 'GET /api/set-up/abc': { body: {} } }

describe('SetUpView', () => {
  it('says the rule of the password before it is broken', async () => {
    fakeApi(works)
    await open()
    expect(pageText()).toContain('At least 10 characters')
  })

  it('makes the group and its owner and opens the front desk', async () => {
    const sent = fakeApi({
      ...works,
      'POST /api/set-up': { body: {} },
      'GET /api/session': { body: { user: null, csrfToken: 't', demoUsers: [] } },
    })
    const { router } = await open()
    await type('Name of the group', 'Coatings')
    await type('Your name', 'Ada')
    await type('E-mail', 'Ada@Example.org')
    await type('Password', 'ten letters and more')
    await submit()
    await vi.waitFor(() => expect(router.currentRoute.value.name).toBe('front-desk'))
    expect(sent.find(({ method }) => method === 'POST')?.body).toMatchObject({
      token: 'abc',
      groupName: 'Coatings',
      name: 'Ada',
    })
  })

  it('names what is missing at its field', async () => {
    fakeApi(works)
    await open()
    await type('Password', 'short')
    await submit()
    expect(pageText()).toContain('Use at least 10 characters.')
    expect(pageText()).toContain('Give it a name.')
  })

  it('explains a link that was used, and asks for nothing', async () => {
    fakeApi({})
    const { wrapper } = await open()
    expect(pageText()).toContain('This link does not work any more')
    expect(wrapper.find('form').exists()).toBe(false)
  })

  it('tells a dead link from a server that does not answer', async () => {
    vi.stubGlobal('fetch', () => Promise.reject(new TypeError('Failed to fetch')))
    await open()
    expect(pageText()).toContain('The link could not be checked')
    expect(pageText()).not.toContain('does not work any more')
  })
})
