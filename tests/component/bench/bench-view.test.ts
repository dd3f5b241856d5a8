import { createPinia, setActivePinia } from 'pinia'
import { enableAutoUnmount, flushPromises, mount } from '@vue/test-utils'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { createMemoryHistory, createRouter } from 'vue-router'
import { createVuetify } from 'vuetify'
import { HOUSE_DEFAULTS } from '@shared/contracts/group'
import type { Mapping, Term } from '@shared/contracts/mapping'
import type { Polymer, StatePoint } from '@shared/contracts/polymer'
import * as distributions from '@/api/distributions'
import { ApiError } from '@/api/http'
import * as mappings from '@/api/mappings'
import * as potentials from '@/api/potentials'
import { useSessionStore } from '@/stores/session'
import { useShortcutsStore } from '@/stores/shortcuts'
import { useWorkbenchStore } from '@/stores/workbench'
import BenchView from '@/views/BenchView.vue'
import type { InversionWorker } from '@/workers'
import { findAutomatic, runInversion, runRanking } from '@/workers/inversion-task'
import { mappingDocument, term } from '../../unit/src/components/bench/bench-terms'
import { angleCounts, bondCounts } from '../../unit/src/components/bench/distributions'
import { storedDistribution, storedPotential } from '../../unit/src/components/bench/stored-records'

vi.mock('@/api/hand-overs', () => ({ listAnswers: () => Promise.resolve([]), keepWarning: vi.fn() }))
vi.mock('@/workers', () => ({
  startInversionWorker: (): InversionWorker => ({
    runInversion: (task) => Promise.resolve(runInversion(task).answer!),
    runRanking: (task) => Promise.resolve(runRanking(task).answer!),
    findAutomatic: (task) => Promise.resolve(findAutomatic(task).answer),
    stop: () => undefined,
  }),
}))

const bond = term('bond', 'BE')
const angle = term('angle', 'BEH', { standing: 'inverted' })
const bare = term('dihedral', 'BBEH', { standing: 'no data', silhouette: null })
const statePoint = { id: 'hot', temperature: 400, pressure: 1, phase: 'melt', composition: '' } as StatePoint

const save = vi.spyOn(potentials, 'savePotential')

beforeEach(() => {
  sessionStorage.clear()
  localStorage.clear()
  setActivePinia(createPinia())
  vi.spyOn(mappings, 'listTerms').mockResolvedValue([bond, angle, bare])
  vi.spyOn(distributions, 'findDistribution').mockImplementation((termId) => {
    if (termId === bare.id) return Promise.resolve(null)
    return Promise.resolve(storedDistribution(termId === bond.id ? bondCounts() : angleCounts(), { termId }))
  })
  vi.spyOn(potentials, 'findPotential').mockImplementation((termId) =>
    Promise.resolve(termId === angle.id ? storedPotential({ termId }) : null),
  )
  save.mockReset()
})
enableAutoUnmount(afterEach)

const open = async (
  shown: Term | null,
  role: 'modeller' | 'reviewer' = 'modeller',
  painted: Mapping['document'] = mappingDocument,
) => {
  const membership = { groupId: 'group', groupName: 'Adhesives', role, demo: false, defaults: HOUSE_DEFAULTS }
  useSessionStore().user = {
    id: 'me',
    name: 'Mo',
    email: 'mo@example.org',
    memberships: [membership],
    currentGroupId: 'group',
  }
  const workbench = useWorkbenchStore()
  workbench.polymer = { id: 'polymer', groupId: 'group' } as Polymer
  workbench.mapping = { id: 'mapping', document: painted } as Mapping
  workbench.statePoints = [statePoint]
  workbench.statePoint = statePoint
  workbench.terms = [bond, angle, bare]
  const router = createRouter({
    history: createMemoryHistory(),
    routes: [
      { path: '/bench/:termId?', name: 'bench', component: BenchView },
      { path: '/intake', name: 'intake', component: { template: '<p />' } },
      { path: '/mapping', name: 'mapping', component: { template: '<p />' } },
    ],
  })
  await router.push(`/bench/${shown?.id ?? ''}?statePoint=hot`)
  const wrapper = mount(
    { template: '<RouterView />' },
    { global: { plugins: [router, createVuetify()] }, attachTo: document.body },
  )
  await flushPromises()
  const press = async (key: string): Promise<void> => {
    const shortcut = useShortcutsStore().shortcuts.find(({ keys }) => keys.includes(key))!
    shortcut.run(new KeyboardEvent('keydown', { key }))
    await flushPromises()
  }
  const button = (text: string) => wrapper.findAll('button').find((each) => each.text() === text)
  return { wrapper, router, press, button }
}

describe('BenchView', () => {
  it('leads from the bare address to the first term of the rail', async () => {
    const { router, wrapper } = await open(null)
    expect(router.currentRoute.value.params['termId']).toBe(bond.id)
    expect(wrapper.find('h1').text()).toBe('B–E')
  })

  it('waits with that until the address names the state point, which another change of address would undo', async () => {
    const { router } = await open(bond)
    await router.push('/bench')
    await flushPromises()
    expect(router.currentRoute.value.params['termId']).toBe('')
    await router.replace('/bench?statePoint=hot')
    await vi.waitFor(() => expect(router.currentRoute.value.params['termId']).toBe(bond.id))
    expect(router.currentRoute.value.query).toEqual({ statePoint: 'hot' })
  })

  it('keeps terms that the mapping leaves out off the rail, and says so at their address', async () => {
    const { types } = bond
    const termChoices = [{ types, placeKey: '', use: 'left out' as const, reason: 'why' }]
    const { router, wrapper } = await open(bond, 'modeller', { ...mappingDocument, termChoices })
    expect(wrapper.text()).toContain('B–E is left out of the mapping')
    await router.push('/bench?statePoint=hot')
    await vi.waitFor(() => expect(router.currentRoute.value.params['termId']).toBe(angle.id))
    expect(wrapper.find(`[data-term="${bond.id}"]`).exists()).toBe(false)
  })

  it('goes from term to term with J and K', async () => {
    const { router, press } = await open(bond)
    const shown = () => router.currentRoute.value.params['termId']
    await press('j')
    await vi.waitFor(() => expect(shown()).toBe(angle.id))
    await press('k')
    await vi.waitFor(() => expect(shown()).toBe(bond.id))
  })

  it('shows what is stored, and nothing to save while nothing was changed', async () => {
    const { wrapper, button } = await open(angle)
    expect(wrapper.text()).toContain('BEH_400K.hist')
    expect(wrapper.text()).toContain('revision 3 saved')
    expect(button('Save potential')!.attributes('disabled')).toBeDefined()
    expect(button('Undo changes')).toBeUndefined()
  })

  it('saves the settings on screen silently and asks for the standings again', async () => {
    const { wrapper, press, button } = await open(angle)
    await press(']')
    expect(wrapper.text()).toContain('Download revision 3')
    save.mockImplementation((termId, { settings }) =>
      Promise.resolve(storedPotential({ termId, settings, revision: 4 })),
    )
    await button('Save potential')!.trigger('click')
    await flushPromises()
    const [, sent] = save.mock.calls[0]
    expect(sent).toMatchObject({
      statePointId: 'hot',
      revision: 3,
      settings: { smoothing: { mode: 'manual' } },
    })
    expect(mappings.listTerms).toHaveBeenCalled()
    expect(wrapper.text()).toContain('revision 4 saved')
    expect(button('Undo changes')).toBeUndefined()
    expect(wrapper.find('[role=alert]').exists()).toBe(false)
  })

  it('saves the first potential of a term without a revision', async () => {
    const { button } = await open(bond)
    save.mockResolvedValue(storedPotential({ revision: 1 }))
    await button('Save potential')!.trigger('click')
    expect(save.mock.calls[0][1].revision).toBeNull()
  })

  it('keeps both versions of a conflict until one is chosen', async () => {
    const { wrapper, press, button } = await open(angle)
    const theirs = storedPotential({ revision: 7 })
    save.mockRejectedValueOnce(new ApiError(409, { code: 'CONFLICT', message: 'Changed.', details: theirs }))
    await press(']')
    await button('Save potential')!.trigger('click')
    await flushPromises()
    expect(wrapper.text()).toContain('Ana Rivera saved this potential')
    save.mockResolvedValueOnce(storedPotential({ revision: 8 }))
    await button('Save mine over it')!.trigger('click')
    await flushPromises()
    expect(save.mock.calls[1][1]).toMatchObject({ revision: 7, settings: { smoothing: { mode: 'manual' } } })
    expect(wrapper.text()).not.toContain('Ana Rivera saved')
  })

  it('drops the own changes only when the other version is taken', async () => {
    const { wrapper, press, button } = await open(angle)
    const theirs = storedPotential({ revision: 7 })
    save.mockRejectedValueOnce(new ApiError(409, { code: 'CONFLICT', message: 'Changed.', details: theirs }))
    await press(']')
    await button('Save potential')!.trigger('click')
    await flushPromises()
    expect(button('Undo changes')).toBeDefined()
    await button('Take revision 7')!.trigger('click')
    expect(wrapper.text()).toContain('revision 7 saved')
    expect(button('Undo changes')).toBeUndefined()
  })

  it('says since when changes are not saved, and that they are kept', async () => {
    const { wrapper, press, button } = await open(angle)
    save.mockRejectedValueOnce(
      new ApiError(503, { code: 'UNAVAILABLE', message: 'The database does not answer.' }),
    )
    await press(']')
    await button('Save potential')!.trigger('click')
    await flushPromises()
    expect(wrapper.text()).toMatch(/Not saved since \d\d:\d\d/)
    expect(wrapper.text()).toContain('kept in this browser tab')
  })

  it('goes back to the saved settings on request', async () => {
    const { press, button, wrapper } = await open(angle)
    await press('[')
    expect(wrapper.text()).toContain('by hand')
    await button('Undo changes')!.trigger('click')
    await flushPromises()
    expect(wrapper.text()).not.toContain('by hand')
  })

  it('offers two ways to data for a term that has none', async () => {
    const { wrapper } = await open(bare)
    expect(wrapper.text()).toContain('No distribution for B–B–E–H at 400 K')
    const ways = wrapper.findAll('a').filter((link) => link.attributes('href')?.startsWith('/intake'))
    expect(ways.map((link) => link.attributes('href'))).toEqual(
      Array.from({ length: 2 }, () => `/intake?statePoint=hot&term=${bare.id}`),
    )
  })

  it('lets a reviewer read but neither save nor change', async () => {
    const { wrapper, button } = await open(angle, 'reviewer')
    expect(button('Save potential')).toBeUndefined()
    expect(wrapper.find('input[type=range]').exists()).toBe(false)
    expect(useShortcutsStore().shortcuts.some(({ keys }) => keys.includes(']'))).toBe(false)
    expect(wrapper.text()).toContain('Download')
  })

  it('says that a term is not in the mapping', async () => {
    const { wrapper } = await open({ ...bond, id: 'gone' })
    expect(wrapper.text()).toContain('This term is not in the mapping')
  })
})
