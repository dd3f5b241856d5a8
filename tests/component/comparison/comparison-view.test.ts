import { enableAutoUnmount } from '@vue/test-utils'
import { afterEach, describe, expect, it, vi } from 'vitest'
import type { ComparedMapping, ComparedTerm, Comparison } from '@shared/contracts/comparison'
import { useDisplayUnits } from '@/composables/useDisplayUnits'
import ComparisonView from '@/views/ComparisonView.vue'
import { mappingDocument } from '../../unit/src/components/bench/bench-terms'
import { control, fakeApi, freshStores, mountAt, pageText } from '../../support/mount'

enableAutoUnmount(afterEach)
afterEach(() => vi.unstubAllGlobals())

const term = (name: string, change: Partial<ComparedTerm> = {}): ComparedTerm => {
  const types = name.split('–')
  return {
    id: `term-${types.join('').toLowerCase()}`,
    kind: (['bond', 'angle', 'dihedral'] as const)[types.length - 2],
    name,
    types,
    multiplicity: 1,
    coverage: 'here',
    unfit: null,
    elsewhere: [],
    basins: { count: 1, depth: 0.5 },
    deviation: 0.0123,
    flatness: null,
    problem: null,
    ...change,
  }
}
const bare = { basins: null, deviation: null }
const column = (id: string, change: Partial<ComparedMapping>): ComparedMapping => ({
  id,
  name: id,
  numbers: { beads: 3, atoms: 27, degreesKept: 9, degreesBefore: 81, reduction: 9 },
  terms: [],
  leftOut: 0,
  pairs: [],
  pairsWithoutData: 0,
  coupling: null,
  cost: 1,
  ...change,
})
const coarse = column('3-to-1', {
  terms: [
    term('E–H', { basins: { count: 3, depth: 0.5 } }),
    term('B–E', { coverage: 'elsewhere', elsewhere: ['hot'], ...bare }),
    term('B–E–H', { coverage: 'missing', ...bare }),
    term('B–B–E–H', { basins: { count: 2, depth: 0.5 }, deviation: 1.5, flatness: 'flat' }),
  ],
  leftOut: 1,
  pairs: [
    {
      firstTermId: 'term-eh',
      secondTermId: 'term-beh',
      first: 'E–H',
      second: 'B–E–H',
      nats: 0.31,
      corrected: false,
      decision: 'joint',
    },
  ],
  pairsWithoutData: 4,
  coupling: 0.31,
})
const fine = column('5-to-1', {
  numbers: { beads: 5, atoms: 27, degreesKept: 15, degreesBefore: 81, reduction: 5.4 },
  terms: [
    term('S1–S2', { multiplicity: 2 }),
    term('E–S1', { basins: null, problem: 'Too few bins are filled.' }),
  ],
  cost: 25 / 9,
})
const comparison: Comparison = {
  statePointId: 'cold',
  summary: ['In 3-to-1 the bond E–H has 3 basins deeper than 0.5 kT.'],
  mappings: [coarse, fine],
}
const point = (id: string, temperature: number) => ({
  id,
  polymerId: 'p',
  temperature,
  pressure: null,
  phase: 'melt',
  composition: '',
})
const mapping = (id: string) => ({ id, polymerId: 'p', name: id, document: mappingDocument })
const ADDRESS = '/polymers/p/comparison'
const answers = {
  'GET /api/polymers/p': { body: { id: 'p', groupId: 'group', name: 'poly(n-hexyl acrylate)', demo: false } },
  'GET /api/polymers/p/state-points': { body: { statePoints: [point('cold', 400), point('hot', 450)] } },
  'GET /api/polymers/p/mappings': { body: { mappings: [mapping('3-to-1'), mapping('5-to-1')] } },
  'GET /api/polymers/p/comparison': { body: comparison },
}
const open = async (
  path = ADDRESS,
  more: Parameters<typeof fakeApi>[0] = {},
  role: 'modeller' | 'reviewer' = 'modeller',
) => {
  const sent = fakeApi({ ...answers, ...more })
  const stage = await mountAt('comparison', path, ComparisonView, freshStores(role))
  return {
    ...stage,
    asked: () => sent.map((each) => each.path).filter((each) => each.includes('comparison')),
  }
}
const here = (text: string | RegExp) => vi.waitFor(() => expect(pageText()).toMatch(text), 5000)
const cells = (row: string): string[] => {
  const heads = [...document.querySelectorAll('th[scope=row]')]
  const found = heads.find((head) => head.textContent?.trim().startsWith(row))
  return [...(found?.parentElement?.querySelectorAll('td') ?? [])].map((cell) =>
    (cell.textContent ?? '').replace(/\s+/g, ' ').trim(),
  )
}

describe('ComparisonView', () => {
  it('puts the sentence first, then a column per mapping', async () => {
    const { asked } = await open()
    await here('What the finer mapping buys')
    expect(asked()).toEqual(['/api/polymers/p/comparison?mappings=3-to-1%2C5-to-1&statePoint=cold'])
    const text = pageText()
    expect(text.indexOf('In 3-to-1 the bond E–H has 3 basins')).toBeLessThan(text.indexOf('Beads per unit'))
    expect([...document.querySelectorAll('th[scope=col]')].map((head) => head.textContent)).toEqual([
      '3-to-1',
      '5-to-1',
    ])
    expect(control('3-to-1').getAttribute('href')).toBe('/polymers/p/mappings/3-to-1/mapping?statePoint=cold')
  })

  it('says of each term whether it has one peak, at which depth, and how wide it is', async () => {
    await open()
    await here('Bonds')
    expect(pageText()).toContain('basins deeper than 0.5 kT; standard deviation')
    expect(cells('Bonds')[0]).toMatch(/E–H ?3 basins ?0\.012 nm/)
    expect(cells('Bonds')[1]).toMatch(/S1–S2 2 per unit ?single-peaked ?0\.012 nm/)
    expect(cells('Bonds')[1]).toContain('Too few bins are filled.')
    expect(cells('Angles')[1]).toBe('none')
    expect(control('E–H').getAttribute('href')).toBe(
      '/polymers/p/mappings/3-to-1/bench/term-eh?statePoint=cold',
    )
  })

  it('writes widths in the units the reader has chosen', async () => {
    await open()
    await here('0.012 nm')
    useDisplayUnits().length = 'angstrom'
    await here(/0\.12 Å/)
    expect(cells('Dihedrals')[0]).toContain('86°')
  })

  it('tells what is here, what only elsewhere and what is missing, and leads to the intake', async () => {
    await open()
    await here('2 of 4 terms here')
    const [first, second] = cells('Data')
    expect(first).toMatch(/1 only elsewhere: ?B–E \(450 K, melt\)/)
    expect(first).toMatch(/1 missing: ?B–E–H/)
    expect(second).toBe('2 of 2 terms here')
    expect(control('Bring in data of B–E–H').getAttribute('href')).toBe(
      '/polymers/p/mappings/3-to-1/intake?statePoint=cold&term=term-beh',
    )
  })

  it('offers no intake to those who only read', async () => {
    await open(ADDRESS, {}, 'reviewer')
    await here('2 of 4 terms here')
    expect(() => control('Bring in data of B–E–H')).toThrow()
  })

  it('gives the correlation of each pair with what its number is, and leads to its map', async () => {
    await open()
    await here('1 pair measured')
    const [first, second] = cells('Correlation')
    expect(first).toContain('0.310 nats')
    expect(first).toContain('with what chance adds, sample size not stated; one joint potential decided')
    expect(first).toContain('4 pairs without joint data')
    expect(second).toBe('no pairs')
    expect(control('E–H with B–E–H').getAttribute('href')).toBe(
      '/polymers/p/mappings/3-to-1/correlation/term-eh~term-beh?statePoint=cold',
    )
  })

  it('names dihedrals that may be dropped, degrees of freedom and the cost with what it assumes', async () => {
    await open()
    await here('Degrees of freedom')
    expect(cells('Dihedrals that may be dropped')).toEqual(['B–B–E–H', 'none'])
    expect(cells('Degrees')).toEqual(['9 of 81 with all atoms', '15 of 81 with all atoms'])
    const [first, second] = cells('Cost')
    expect(first).toContain('fewest pairs per step')
    expect(second).toContain('2.8 times the pairs per step of 3-to-1')
    expect(second).toContain('(5/3)² = 2.8. Pairs of beads within one cutoff at one density')
    // 5.4² pairs, and steps five times as long: 145.8, of which an estimate earns two digits.
    expect(second).toContain('about 150 times less work than all atoms')
    expect(cells('Terms')[0]).toBe('2 bonds, 1 angle, 1 dihedral; 1 left out')
  })

  it('shows one mapping after the other on a phone', async () => {
    vi.stubGlobal('matchMedia', (media: string) =>
      Object.assign(new EventTarget(), { matches: media === '(max-width: 599.98px)', media }),
    )
    await open()
    await here('Beads per unit')
    expect(document.querySelector('table')).toBeNull()
    const entries = [...document.querySelectorAll('section[aria-labelledby^="entry"]')]
    expect(entries.map((entry) => entry.querySelector('h2')?.textContent)).toEqual(['3-to-1', '5-to-1'])
    expect(entries.map((entry) => entry.querySelectorAll('dt').length)).toEqual([10, 10])
    expect(entries[0].textContent).toContain('2 of 4 terms here')
    expect(entries[1].textContent).toContain('2 of 2 terms here')
  })

  it('opens long lists of terms on demand', async () => {
    const terms = Array.from({ length: 15 }, (_, index) => term(`A${index}–B`))
    const body = { ...comparison, mappings: [column('3-to-1', { terms }), fine] }
    await open(ADDRESS, { 'GET /api/polymers/p/comparison': { body } })
    await here('Show 3 more')
    expect(cells('Bonds')[0]).not.toContain('A14–B')
    control('Show 3 more').click()
    await here('A14–B')
    expect(cells('Bonds')[0]).not.toContain('more')
  })

  it('compares what the address names, at its state point, and says when a mapping is gone', async () => {
    const { asked } = await open(`${ADDRESS}?mappings=5-to-1,3-to-1,gone&statePoint=hot`)
    await here('not here any more')
    expect(asked()).toEqual(['/api/polymers/p/comparison?mappings=5-to-1%2C3-to-1&statePoint=hot'])
  })

  it('lets one choose among three mappings, and keeps at least two', async () => {
    const three = ['3-to-1', '5-to-1', '4-to-1'].map(mapping)
    const more = { 'GET /api/polymers/p/mappings': { body: { mappings: three } } }
    const { router, asked } = await open(ADDRESS, more)
    await here('Mappings to compare')
    const boxes = () => [...document.querySelectorAll<HTMLInputElement>('fieldset input')]
    expect(boxes().map(({ checked, disabled }) => [checked, disabled])).toEqual(Array(3).fill([true, false]))
    boxes()[2].click()
    await vi.waitFor(() => expect(router.currentRoute.value.query['mappings']).toBe('3-to-1,5-to-1'))
    await vi.waitFor(() => expect(asked()).toHaveLength(2))
    expect(boxes().map(({ checked, disabled }) => [checked, disabled])).toEqual([
      [true, true],
      [true, true],
      [false, false],
    ])
  })

  it.each([
    [[], 'it has none'],
    [[mapping('3-to-1')], 'it has one'],
  ])('says in words what a comparison needs', async (mappings, words) => {
    const { asked } = await open(ADDRESS, { 'GET /api/polymers/p/mappings': { body: { mappings } } })
    await here('Nothing to compare yet')
    expect(pageText()).toContain(words)
    expect(asked()).toEqual([])
    expect(control('To the mappings').getAttribute('href')).toBe('/polymers/p#mappings')
  })

  it('asks for a state point where there is none', async () => {
    await open(ADDRESS, { 'GET /api/polymers/p/state-points': { body: { statePoints: [] } } })
    await here('No state point yet')
    expect(control('To the state points').getAttribute('href')).toBe('/polymers/p#state-points')
  })

  it('says when nothing can be said, and shows mappings without beads all the same', async () => {
    const empty = column('3-to-1', { numbers: null, cost: null })
    const body = { ...comparison, summary: [], mappings: [empty, column('5-to-1', {})] }
    await open(ADDRESS, { 'GET /api/polymers/p/comparison': { body } })
    await here('Nothing to say yet')
    expect(cells('Beads')[0]).toBe('no beads yet')
    expect(cells('Cost')[0]).toBe('not known without beads')
    expect(cells('Data')[0]).toBe('no terms')
  })

  it('says why a comparison failed and tries again', async () => {
    const failed = { status: 503, body: { code: 'UNAVAILABLE', message: 'It rests.' } }
    await open(ADDRESS, { 'GET /api/polymers/p/comparison': [failed, { body: comparison }] })
    await here('It rests.')
    control('Try again').click()
    await here('2 of 4 terms here')
    expect(pageText()).not.toContain('It rests.')
  })
})
