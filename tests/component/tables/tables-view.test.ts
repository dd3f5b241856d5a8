import { enableAutoUnmount } from '@vue/test-utils'
import { afterEach, describe, expect, it, vi } from 'vitest'
import type { Mapping, Term } from '@shared/contracts/mapping'
import type { Polymer, StatePoint } from '@shared/contracts/polymer'
import { useDisplayUnits } from '@/composables/useDisplayUnits'
import { useWorkbenchStore } from '@/stores/workbench'
import TablesView from '@/views/TablesView.vue'
import { mappingDocument, term } from '../../unit/src/components/bench/bench-terms'
import { control, fakeApi, freshStores, mountAt, pageText } from '../../support/mount'

enableAutoUnmount(afterEach)
afterEach(() => vi.unstubAllGlobals())

const hot = { id: 'hot', temperature: 400, pressure: null, phase: 'melt', composition: '' } as StatePoint
const bond = term('bond', 'BE', { standing: 'inverted' })
const angle = term('angle', 'BEH', { standing: 'data' })
const bare = term('dihedral', 'BBEH', { standing: 'no data', silhouette: null })

const table = (unit: string) => ({
  text: `# coordinate[${unit}] energy force\n 0.20 4.5 90\n 0.25 0.0 0\n 0.30 3.2 -80\n`,
  headers: { 'Content-Disposition': 'attachment; filename="bond_B-E_400K.txt"' },
})
const at = (length: string) =>
  `GET /api/terms/${bond.id}/table?statePoint=hot&length=${length}&angle=degree&energy=kJ%2Fmol`
const answers = {
  [at('nm')]: table('nm'),
  [at('angstrom')]: table('angstrom'),
  'GET /api/mappings/mapping/pairs': { body: { pairs: [] } },
  'GET /api/groups/group/layouts': {
    body: {
      builtIns: [
        { key: 'three-columns', name: 'Three columns', about: 'coordinate, energy, force' },
        { key: 'json', name: 'JSON', about: 'one object' },
      ],
      layouts: [],
      default: 'three-columns',
    },
  },
}
const open = async (terms: Term[], more: Parameters<typeof fakeApi>[0] = {}) => {
  const sent = fakeApi({ ...answers, ...more })
  const pinia = freshStores()
  const workbench = useWorkbenchStore()
  workbench.polymer = { id: 'p', groupId: 'group', demo: false } as Polymer
  workbench.mapping = { id: 'mapping', name: '3-to-1', document: mappingDocument } as Mapping
  workbench.statePoints = [hot]
  workbench.statePoint = hot
  workbench.terms = terms
  await mountAt('tables', '/polymers/p/mappings/mapping/tables', TablesView, pinia)
  return sent
}
const here = (wanted: string | RegExp) => vi.waitFor(() => expect(pageText()).toMatch(wanted))

describe('TablesView', () => {
  it('reads domain, rows and first lines off the very file that is downloaded', async () => {
    await open([bond])
    await here('First lines of bond_B-E_400K.txt')
    expect(pageText()).toContain('0.2 to 0.3 nm')
    expect(pageText()).toContain('3 rows')
    expect(document.querySelector('pre')?.textContent).toContain(
      '# coordinate[nm] energy force\n 0.20 4.5 90',
    )
    const link = control('Download bond_B-E_400K.txt')
    expect(`GET ${link.getAttribute('href')}`).toBe(at('nm'))
  })

  it('writes files in the default layout of the group, and still reads the numbers off the plain table', async () => {
    const list = { builtIns: [{ key: 'json', name: 'JSON', about: '' }], layouts: [], default: 'json' }
    await open([bond], {
      'GET /api/groups/group/layouts': { body: list },
      [`${at('nm')}&layout=json`]: {
        text: '{ "rows": [] }',
        headers: { 'Content-Disposition': 'attachment; filename="bond_B-E_400K.json"' },
      },
    })
    await here('First lines of bond_B-E_400K.json')
    expect(pageText()).toContain('0.2 to 0.3 nm')
    expect(document.querySelector('pre')?.textContent).toContain('{ "rows": [] }')
    const link = control('Download bond_B-E_400K.json')
    expect(link.getAttribute('href')).toContain('layout=json')
  })

  it('writes the files and the archive in the units that are chosen', async () => {
    await open([bond])
    await here('# coordinate[nm]')
    useDisplayUnits().length = 'angstrom'
    await here(/# coordinate\[angstrom\]/)
    expect(control('Download all').getAttribute('href')).toContain('length=angstrom')
    expect(pageText()).toContain('0.2 to 0.3 Å')
  })

  it('names what is missing, why, and the way to it', async () => {
    await open([bond, angle, bare])
    await here('Not among them')
    expect(pageText()).toContain('2 terms left out')
    expect(control('Invert it').getAttribute('href')).toContain(`/bench/${angle.id}`)
    expect(control('Bring one').getAttribute('href')).toContain(`/intake?statePoint=hot&term=${bare.id}`)
  })

  it('says why a table is refused, counts it as missing, and leads to the bench', async () => {
    const message = 'There is no table for this term: its data changed after the potential was saved.'
    await open([bond], { [at('nm')]: { status: 409, body: { code: 'CONFLICT', message } } })
    await here(message)
    expect(control(`Bench of ${bond.name}`).getAttribute('href')).toContain(`/bench/${bond.id}`)
    expect(pageText()).toContain('0 tables in one archive')
    expect(control('Download all').getAttribute('href')).toBeNull()
  })

  it('warns where the record says that two terms want one joint potential', async () => {
    const pair = { firstTermId: bond.id, secondTermId: angle.id, name: 'B–E with B–E–H', decision: 'joint' }
    await open([bond, angle], { 'GET /api/mappings/mapping/pairs': { body: { pairs: [pair] } } })
    await here('B–E with B–E–H wants one joint potential')
  })

  it('says what the tables may be used for', async () => {
    await open([bond])
    await here('As bonded potentials of 3-to-1 beads at 400 K, melt, and nowhere else.')
  })

  it('leads to the bench while nothing is inverted, and asks for no table', async () => {
    const sent = await open([angle, bare])
    await here('No table yet')
    expect(sent.some(({ path }) => path.includes('/table?'))).toBe(false)
  })
})
