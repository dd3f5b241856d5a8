import { flushPromises } from '@vue/test-utils'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { h, nextTick, shallowRef } from 'vue'
import type { Mapping } from '@shared/contracts/mapping'
import type { CoverageCell, MappingCoverage as Coverage } from '@shared/contracts/mapping-coverage'
import type { Polymer, StatePoint } from '@shared/contracts/polymer'
import { giveAtoms, type MappingDocument } from '@shared/mapping'
import MappingCoverage from '@/components/mapping/MappingCoverage.vue'
import MappingNewVersion from '@/components/mapping/MappingNewVersion.vue'
import { useSaveMapping } from '@/composables/useSaveMapping'
import { useWorkbenchStore } from '@/stores/workbench'
import { HEXYL_ACRYLATE, THREE_TO_ONE } from '../../unit/shared/mapping/hexyl-acrylate'
import {
  click,
  control,
  fakeApi,
  freshStores,
  mountAt,
  pageText,
  type SentRequest,
} from '../../support/mount'

const point = (id: string, temperature: number): StatePoint => ({
  id,
  polymerId: 'p',
  temperature,
  pressure: null,
  phase: 'melt',
  composition: '',
  notes: '',
  revision: 1,
  createdAt: '2026-01-05T09:00:00.000Z',
  distributions: 0,
})
const POINTS = [point('cold', 300), point('hot', 400)]
const POLYMER: Polymer = {
  id: 'p',
  groupId: 'group',
  name: 'poly(n-hexyl acrylate)',
  smiles: HEXYL_ACRYLATE,
  notes: '',
  formula: 'C9H16O2',
  mass: 156.225,
  heavyAtoms: 11,
  revision: 1,
  createdAt: '2026-01-05T09:00:00.000Z',
  demo: false,
  counts: { statePoints: 2, mappings: 1, distributions: 1, potentials: 0 },
}
const MAPPING: Mapping = {
  id: 'm',
  polymerId: 'p',
  name: '3-to-1',
  document: THREE_TO_ONE,
  revision: 4,
  version: 1,
  hasData: true,
  savedAt: '2026-01-05T10:00:00.000Z',
  savedBy: null,
  counts: { beads: 3, terms: 10, leftOut: 0, termsWithData: 10, termsUnfit: 0 },
}
const REASON = 'Measured on version 1 of the mapping. Bead H was C6H13 and is now C5H11.'

afterEach(() => {
  vi.useRealTimers()
  vi.unstubAllGlobals()
  document.body.innerHTML = ''
})

describe('the coverage of a mapping', () => {
  const cell = (statePointId: string, change: Partial<CoverageCell>): CoverageCell => ({
    statePointId,
    coverage: 'missing',
    inverted: false,
    reason: null,
    ...change,
  })
  const coverage: Coverage = {
    statePointIds: ['cold', 'hot'],
    terms: [
      {
        id: 'be',
        kind: 'bond',
        name: 'B–E',
        types: ['B', 'E'],
        leftOut: null,
        cells: [cell('cold', { coverage: 'elsewhere' }), cell('hot', { coverage: 'here', inverted: true })],
      },
      {
        id: 'eh',
        kind: 'bond',
        name: 'E–H',
        types: ['E', 'H'],
        leftOut: null,
        cells: [cell('cold', {}), cell('hot', { coverage: 'unfit', reason: REASON })],
      },
      { id: 'beh', kind: 'angle', name: 'B–E–H', types: ['B', 'E', 'H'], leftOut: 'it is stiff', cells: [] },
    ],
  }
  const open = (readonly: boolean) => {
    const pinia = freshStores()
    const workbench = useWorkbenchStore()
    workbench.polymer = POLYMER
    workbench.mapping = MAPPING
    const view = { render: () => h(MappingCoverage, { coverage, statePoints: POINTS, readonly }) }
    return mountAt('mapping', '/polymers/p/mappings/m/mapping', view, pinia)
  }
  const cells = (): (string | undefined)[] =>
    [...document.querySelectorAll('td')].map((each) => each.textContent?.trim())
  const links = (): (string | null)[] =>
    [...document.querySelectorAll('td a')].map((each) => each.getAttribute('href'))

  it('says of each term at each state point what there is, and leads to the bench or the intake', async () => {
    await open(false)
    expect(cells()).toEqual([
      expect.stringContaining('B–E at 300 K, melt: data only elsewhere'),
      'B–E at 400 K, melt: inverted',
      'E–H at 300 K, melt: no data',
      'E–H at 400 K, melt: data that no longer fit',
    ])
    expect(links()).toHaveLength(4)
    expect(links()[1]).toContain('/bench/be?statePoint=hot')
    expect(links()[3]).toContain('/intake?statePoint=hot&term=eh')
    expect(document.querySelector(`[title="${REASON}"]`)).not.toBeNull()
    expect(pageText()).toContain('B–E–H is left out: it is stiff')
  })

  it('leads who only reads to data, not to the intake', async () => {
    await open(true)
    expect(links()).toHaveLength(1)
  })
})

describe('a change of beads under data', () => {
  const changed = giveAtoms(THREE_TO_ONE, 'e', [5])
  const taken = vi.fn()
  let sent: SentRequest[]

  beforeEach(async () => {
    vi.useFakeTimers({ toFake: ['setTimeout', 'clearTimeout'] })
    taken.mockReset()
    const lost = [{ name: 'E–H', kind: 'bond', statePointIds: ['cold', 'hot'], reason: REASON }]
    sent = fakeApi({
      'POST /api/mappings/m/fit': { body: { version: 2, makesVersion: true, lost, fitting: 3 } },
      'PUT /api/mappings/m': { body: { ...MAPPING, version: 2, revision: 5, document: changed } },
    })
    const pinia = freshStores()
    useWorkbenchStore().statePoints = POINTS
    const painted = shallowRef<MappingDocument>(THREE_TO_ONE)
    await mountAt(
      'mapping',
      '/polymers/p/mappings/m/mapping',
      {
        setup: () => {
          const saving = useSaveMapping(MAPPING, painted, () => undefined)
          return () =>
            saving.held.value
              ? h(MappingNewVersion, { saving, document: painted.value, leaving: 0, onTakeBack: taken })
              : h('p', 'Saved')
        },
      },
      pinia,
    )
    painted.value = changed
    await nextTick()
    await vi.advanceTimersByTimeAsync(3000)
    await flushPromises()
  })

  it('says before saving which version it makes and which data no longer fit', () => {
    expect(pageText()).toContain('Saving makes version 2')
    expect(pageText()).toContain('E–H at 300 K, melt; 400 K, melt. Measured on version 1')
    expect(pageText()).toContain('3 distributions still fit')
    expect(sent.map(({ method }) => method)).toEqual(['POST'])
  })

  it('is saved as a new version when asked', async () => {
    await click('Save as version 2')
    await flushPromises()
    expect(sent.at(-1)).toMatchObject({ method: 'PUT', body: { revision: 4, document: changed } })
    expect(pageText()).toContain('Saved')
  })

  it('can be taken back instead', async () => {
    expect(control('Keep as a new mapping')).toBeDefined()
    await click('Back to version 1')
    expect(taken).toHaveBeenCalledOnce()
  })
})
