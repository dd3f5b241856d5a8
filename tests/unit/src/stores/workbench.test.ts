import { flushPromises } from '@vue/test-utils'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import type { Mapping, Term } from '@shared/contracts/mapping'
import type { Polymer, StatePoint } from '@shared/contracts/polymer'
import * as mappings from '@/api/mappings'
import * as polymers from '@/api/polymers'
import * as statePoints from '@/api/state-points'
import { useSessionStore } from '@/stores/session'
import { useWorkbenchStore } from '@/stores/workbench'
import { freshStores } from '../../../support/mount'

const polymer = { id: 'polymer', groupId: 'group' } as Polymer
const points = ['cold', 'hot'].map((id) => ({ id }) as StatePoint)
const board = { id: 'mapping', name: 'as loaded' } as Mapping
const termsAt = (id: string | null) => [{ id: `term at ${id}` } as Term]
const listTerms = vi.spyOn(mappings, 'listTerms')

beforeEach(() => {
  freshStores()
  vi.spyOn(polymers, 'getPolymer').mockResolvedValue(polymer)
  vi.spyOn(statePoints, 'listStatePoints').mockResolvedValue(points)
  vi.spyOn(mappings, 'listMappings').mockResolvedValue([board])
  vi.spyOn(mappings, 'getMapping').mockResolvedValue(board)
  listTerms.mockReset().mockImplementation((_id, statePoint) => Promise.resolve(termsAt(statePoint)))
})

describe('useWorkbenchStore', () => {
  it('takes the state point asked for, and the first one when it is unknown or none is asked for', async () => {
    const workbench = useWorkbenchStore()
    await workbench.load('polymer', 'mapping', 'hot')
    expect(workbench.statePoint?.id).toBe('hot')
    for (const asked of [null, 'gone']) {
      await workbench.load('polymer', 'mapping', asked)
      expect(workbench.statePoint?.id).toBe('cold')
      expect(workbench.terms).toEqual(termsAt('cold'))
    }
  })

  it('asks for terms without a state point when the polymer has none', async () => {
    vi.spyOn(statePoints, 'listStatePoints').mockResolvedValue([])
    const workbench = useWorkbenchStore()
    await workbench.load('polymer', 'mapping', null)
    expect(workbench.statePoint).toBeNull()
    expect(listTerms).toHaveBeenCalledWith('mapping', null)
  })

  it('keeps terms that the mapping leaves out apart from those in use', async () => {
    const [used, gone] = ['B–B', 'B–E'].map((name) => ({ id: name, types: name.split('–') }) as Term)
    const choice = { types: ['B', 'E'], placeKey: '', use: 'left out' as const, reason: 'why' }
    const document = { version: 1 as const, beads: [], termChoices: [choice] }
    vi.spyOn(mappings, 'getMapping').mockResolvedValue({ ...board, document })
    listTerms.mockResolvedValue([used, gone])
    const workbench = useWorkbenchStore()
    await workbench.load('polymer', 'mapping', 'cold')
    expect(workbench.terms).toEqual([used, gone])
    expect(workbench.usedTerms).toEqual([used])
  })

  it('does not let a slow answer overwrite a later one', async () => {
    const workbench = useWorkbenchStore()
    await workbench.load('polymer', 'mapping', 'cold')
    let late: (terms: Term[]) => void = () => undefined
    listTerms.mockReturnValueOnce(new Promise((resolve) => (late = resolve)))
    const slow = workbench.reloadTerms()
    await workbench.chooseStatePoint('hot')
    late(termsAt('cold'))
    await slow
    await flushPromises()
    expect(workbench.statePoint?.id).toBe('hot')
    expect(workbench.terms).toEqual(termsAt('hot'))
  })

  it('puts a saved mapping where the old one stood', async () => {
    const workbench = useWorkbenchStore()
    await workbench.load('polymer', 'mapping', null)
    const saved = { ...board, name: 'as saved' }
    workbench.replaceMapping(saved)
    expect([workbench.mapping?.name, workbench.mappings[0].name]).toEqual(['as saved', 'as saved'])
  })

  it.each([
    ['owner', true],
    ['modeller', true],
    ['reviewer', false],
    ['collaborator', false],
  ] as const)('lets an %s write: %s, in the polymer’s group only', (role, may) => {
    freshStores(role)
    const workbench = useWorkbenchStore()
    workbench.polymer = polymer
    expect(workbench.canWrite).toBe(may)
    workbench.polymer = { ...polymer, groupId: 'another' }
    expect(workbench.canWrite).toBe(false)
    expect(useSessionStore().canWrite(undefined)).toBe(false)
  })
})
