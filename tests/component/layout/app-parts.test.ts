import { enableAutoUnmount, flushPromises } from '@vue/test-utils'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { Mapping } from '@shared/contracts/mapping'
import type { Polymer, StatePoint } from '@shared/contracts/polymer'
import AppShell from '@/components/layout/AppShell.vue'
import { useNoticesStore } from '@/stores/notices'
import { usePreferencesStore } from '@/stores/preferences'
import { useShortcutsStore } from '@/stores/shortcuts'
import { useWorkbenchStore } from '@/stores/workbench'
import { click, control, fakeApi, freshStores, mountAt, pageText } from '../../support/mount'

enableAutoUnmount(afterEach)
beforeEach(() => freshStores())
afterEach(() => vi.unstubAllGlobals())

const bench = '/polymers/p/mappings/m/bench/t?statePoint=hot'
const points = [
  { id: 'hot', temperature: 450, pressure: null, phase: 'melt', composition: '' },
  { id: 'cold', temperature: 300, pressure: 1, phase: 'glass', composition: '' },
] as StatePoint[]

const open = async (demo = false) => {
  const pinia = freshStores()
  const workbench = useWorkbenchStore()
  workbench.polymer = { id: 'p', groupId: 'group', name: 'polyethylene', demo } as Polymer
  workbench.mapping = { id: 'm', name: '1-to-1' } as Mapping
  workbench.mappings = [workbench.mapping, { id: 'n', name: '2-to-1' } as Mapping]
  workbench.statePoints = points
  workbench.statePoint = points[0]
  return mountAt('bench', bench, { components: { AppShell }, template: '<AppShell />' }, pinia)
}

describe('AppShell', () => {
  it('marks the room we are in, and keeps the state point on the way to the others', async () => {
    const { wrapper } = await open()
    const rooms = wrapper.findAll('nav[aria-label=Rooms] a')
    expect(rooms.map((room) => room.text())).toEqual([
      'Mapping',
      'Intake',
      'Bench',
      'Correlation',
      'Tables',
      'Hand-over',
    ])
    expect(
      rooms.filter((room) => room.attributes('aria-current') === 'page').map((room) => room.text()),
    ).toEqual(['Bench'])
    expect(rooms[1].attributes('href')).toBe('/polymers/p/mappings/m/intake?statePoint=hot')
  })

  it('leads from its crumbs to the same room of another mapping and to another state point', async () => {
    fakeApi({ 'GET /api/groups/group/polymers': { body: { polymers: [] } } })
    await open()
    await click('mapping: 1-to-1')
    await vi.waitFor(() =>
      expect(control('2-to-1').getAttribute('href')).toBe('/polymers/p/mappings/n/bench?statePoint=hot'),
    )
    await click('state point: 450 K, melt')
    await vi.waitFor(() => {
      const other = control('300 K, 1 bar, glass')
      expect(other.getAttribute('href')).toBe('/polymers/p/mappings/m/bench/t?statePoint=cold')
    })
  })

  it('marks invented data in the foot line, and only those', async () => {
    const { wrapper } = await open()
    expect(pageText()).not.toContain('Invented data')
    wrapper.unmount()
    await open(true)
    expect(pageText()).toContain('Invented data, demonstration group')
  })

  it('tells the keys of the room, until they are switched off', async () => {
    await open()
    useShortcutsStore().register(() => [{ keys: ['j', 'k'], label: 'term', run: () => undefined }])
    await flushPromises()
    expect(document.querySelector('footer')?.textContent.replace(/\s+/g, '')).toContain('JKterm')
    usePreferencesStore().singleKeys = false
    await flushPromises()
    expect(document.querySelector('footer')?.textContent).not.toContain('term')
  })

  it('says what was done, and takes it back where that is possible', async () => {
    await open()
    const undo = vi.fn()
    useNoticesStore().say('B–E accepted', undo)
    await vi.waitFor(() => expect(pageText()).toContain('B–E accepted'))
    await click('Undo')
    expect(undo).toHaveBeenCalledOnce()
    expect(useNoticesStore().current).toBeNull()
  })

  it('signs out from the account menu and forgets the bench', async () => {
    const sent = fakeApi({
      'DELETE /api/session': { status: 204 },
      'GET /api/session': { body: { user: null, csrfToken: 't', demoUsers: [] } },
    })
    const { router } = await open()
    await click('Account: Mo Modeller')
    await vi.waitFor(() => expect(pageText()).toContain('modeller, Adhesives group'))
    await click('Sign out')
    await vi.waitFor(() => expect(router.currentRoute.value.name).toBe('sign-in'))
    expect(sent.map(({ method }) => method)).toEqual(['DELETE', 'GET'])
    expect(useWorkbenchStore().polymer).toBeNull()
  })
})
