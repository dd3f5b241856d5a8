import { enableAutoUnmount } from '@vue/test-utils'
import { afterEach, describe, expect, it, vi } from 'vitest'
import WorkbenchView from '@/views/WorkbenchView.vue'
import { useWorkbenchStore } from '@/stores/workbench'
import { fakeApi, freshStores, mountAt, pageText } from '../../support/mount'

enableAutoUnmount(afterEach)
afterEach(() => vi.unstubAllGlobals())

const answers = {
  'GET /api/polymers/p': { body: { id: 'p', groupId: 'group' } },
  'GET /api/polymers/p/state-points': { body: { statePoints: [{ id: 'cold' }, { id: 'hot' }] } },
  'GET /api/polymers/p/mappings': { body: { mappings: [] } },
  'GET /api/mappings/m': { body: { id: 'm' } },
  'GET /api/mappings/m/terms?statePoint=cold': { body: { terms: [{ id: 'term when cold' }] } },
  'GET /api/mappings/m/terms?statePoint=hot': { body: { terms: [{ id: 'term when hot' }] } },
}
const open = (query = '') =>
  mountAt('intake', `/polymers/p/mappings/m/intake${query}`, WorkbenchView, freshStores())

describe('WorkbenchView', () => {
  it('puts the state point it takes into the address, beside what stands there', async () => {
    fakeApi(answers)
    const { router } = await open('?term=7')
    await vi.waitFor(() => expect(router.currentRoute.value.query).toEqual({ statePoint: 'cold', term: '7' }))
  })

  it('follows the address to another state point with its terms', async () => {
    fakeApi(answers)
    const { router } = await open('?statePoint=cold')
    await vi.waitFor(() => expect(useWorkbenchStore().terms).toEqual([{ id: 'term when cold' }]))
    await router.push({ query: { statePoint: 'hot' } })
    await vi.waitFor(() => expect(useWorkbenchStore().terms).toEqual([{ id: 'term when hot' }]))
  })

  it('says when there is no such mapping, or the server fails', async () => {
    fakeApi({ ...answers, 'GET /api/mappings/m': { status: 404, body: { code: 'NOT_FOUND', message: 'x' } } })
    const { wrapper } = await open()
    await vi.waitFor(() => expect(pageText()).toContain('This mapping is not here'))
    wrapper.unmount()
    fakeApi({
      ...answers,
      'GET /api/mappings/m': { status: 500, body: { code: 'INTERNAL', message: 'It broke.' } },
    })
    await open()
    await vi.waitFor(() => expect(pageText()).toContain('It broke.'))
  })
})
