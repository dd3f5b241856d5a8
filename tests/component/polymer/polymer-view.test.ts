import { enableAutoUnmount } from '@vue/test-utils'
import { afterEach, describe, expect, it, vi } from 'vitest'
import PolymerView from '@/views/PolymerView.vue'
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
afterEach(() => vi.unstubAllGlobals())

const polymer = {
  id: 'p',
  groupId: 'group',
  name: 'poly(n-hexyl acrylate)',
  smiles: '*CC(*)C(=O)OCCCCCC',
  notes: '',
  formula: 'C9H16O2',
  mass: 156.225,
  heavyAtoms: 11,
  revision: 3,
  demo: false,
  counts: { statePoints: 1, mappings: 1, distributions: 18, potentials: 4 },
}
const statePoint = {
  id: 'hot',
  polymerId: 'p',
  temperature: 400,
  pressure: 1,
  phase: 'melt',
  composition: '',
  notes: '',
  revision: 2,
  distributions: 18,
}
const mapping = {
  id: 'm',
  polymerId: 'p',
  name: '3-to-1',
  document: {
    version: 1,
    beads: [
      { id: 'b', name: 'B', type: 'B', label: 'backbone', colour: 0, site: { rule: 'mass' }, atoms: [] },
    ],
  },
  savedAt: '2026-11-30T10:00:00.000Z',
  savedBy: null,
  version: 1,
  hasData: true,
  counts: { beads: 1, terms: 10, leftOut: 0, termsWithData: 9, termsUnfit: 0 },
}
const answers = {
  'GET /api/polymers/p': { body: polymer },
  'GET /api/polymers/p/state-points': { body: { statePoints: [statePoint] } },
  'GET /api/polymers/p/mappings': { body: { mappings: [mapping] } },
}
const open = async (role: 'modeller' | 'reviewer' = 'modeller', more: Parameters<typeof fakeApi>[0] = {}) => {
  const sent = fakeApi({ ...answers, ...more })
  const stage = await mountAt('polymer', '/polymers/p', PolymerView, freshStores(role))
  return { ...stage, sent, writes: () => sent.filter(({ method }) => method !== 'GET') }
}
const here = (text: string | RegExp) => vi.waitFor(() => expect(pageText()).toMatch(text), 5000)

describe('PolymerView', () => {
  it('shows the unit, its facts, its mappings and its state points', async () => {
    await open()
    await here('11 heavy, 16 hydrogens')
    expect(pageText()).toContain('9 of 10 terms with data')
    expect(pageText()).toContain('400 K')
    expect(pageText()).toContain('*CC(*)C(=O)OCCCCCC')
  })

  it('lets a reviewer read and write nothing', async () => {
    await open('reviewer')
    await here('9 of 10 terms')
    for (const name of [
      'Delete polymer',
      'New mapping',
      'Add state point',
      'Change 400 K, melt',
      'Copy 3-to-1',
    ]) {
      expect(() => control(name)).toThrow()
    }
  })

  it('adds a state point with what was typed, empty pressure as none', async () => {
    const { writes } = await open('modeller', { 'POST /api/polymers/p/state-points': { status: 201 } })
    await here('400 K')
    await click('Add state point')
    await type('Temperature', '450')
    await type('Phase, if you like', 'melt')
    await submit()
    expect(writes()[0].body).toEqual({
      temperature: 450,
      pressure: null,
      phase: 'melt',
      composition: '',
      notes: '',
    })
  })

  it.each([
    ['', 'Give the temperature in kelvin.'],
    ['warm', 'Give the temperature in kelvin.'],
    ['-3', 'The temperature must be above 0 K.'],
  ])('refuses the temperature "%s" in place', async (temperature, message) => {
    const { writes } = await open()
    await here('400 K')
    await click('Add state point')
    await type('Temperature', temperature)
    await submit()
    expect(pageText()).toContain(message)
    expect(writes()).toEqual([])
  })

  it('keeps the temperature of a state point that data stand on', async () => {
    const { writes } = await open('modeller', { 'PATCH /api/state-points/hot': { body: statePoint } })
    await here('400 K')
    await click('Change 400 K, melt')
    expect(field('Temperature').disabled).toBe(true)
    expect(pageText()).toContain('Fixed: 18 distributions stand on it')
    await type('Pressure, if you like', '2')
    await submit()
    expect(writes()[0].body).toMatchObject({ revision: 2, temperature: 400, pressure: 2 })
  })

  it('says what goes with a mapping, and deletes it only by its name', async () => {
    const { writes } = await open('modeller', { 'DELETE /api/mappings/m': { status: 204 } })
    await here('3-to-1')
    await click('Delete 3-to-1')
    expect(pageText()).toContain('10 terms, 9 of them with distributions, go with it')
    expect((control('Delete mapping') as HTMLButtonElement).disabled).toBe(true)
    await type('Type the name of the mapping', '3-to-1')
    await submit()
    expect(writes().map(({ method, path }) => `${method} ${path}`)).toEqual(['DELETE /api/mappings/m'])
  })

  it('starts a copy of a mapping with its beads and opens its board', async () => {
    const { writes, router } = await open('modeller', {
      'POST /api/polymers/p/mappings': { status: 201, body: { ...mapping, id: 'copy' } },
    })
    await here('3-to-1')
    await click('Copy 3-to-1')
    expect(field('Name').value).toBe('3-to-1, copy')
    await submit()
    expect(writes()[0].body).toEqual({ name: '3-to-1, copy', document: mapping.document })
    await vi.waitFor(() => expect(router.currentRoute.value.params['mappingId']).toBe('copy'))
  })

  it('offers to compare mappings once there are two, to a reviewer as well', async () => {
    const { wrapper } = await open('reviewer')
    await here('9 of 10 terms')
    expect(() => control('Compare mappings')).toThrow()
    wrapper.unmount()
    const mappings = [mapping, { ...mapping, id: 'n', name: '5-to-1' }]
    await open('reviewer', { 'GET /api/polymers/p/mappings': { body: { mappings } } })
    await here('5-to-1')
    expect(control('Compare mappings').getAttribute('href')).toBe('/polymers/p/comparison')
  })

  it('deletes the polymer by its name and goes to the front desk', async () => {
    const { router, writes } = await open('modeller', { 'DELETE /api/polymers/p': { status: 204 } })
    await here('3-to-1')
    await click('Delete polymer')
    expect(pageText()).toContain('18 distributions with their files and 4 potentials go with it')
    await type('Type the name of the polymer', 'poly(n-hexyl acrylate)')
    await submit()
    await vi.waitFor(() => expect(router.currentRoute.value.name).toBe('front-desk'))
    expect(writes()).toHaveLength(1)
  })

  it('tells someone else’s or a deleted polymer from a server that fails', async () => {
    fakeApi({})
    const { wrapper } = await mountAt('polymer', '/polymers/gone', PolymerView, freshStores())
    await here('This polymer is not here')
    wrapper.unmount()
    await open('modeller', {
      'GET /api/polymers/p': { status: 503, body: { code: 'UNAVAILABLE', message: 'It rests.' } },
    })
    await here('It rests.')
    expect(control('Try again')).toBeTruthy()
  })
})
