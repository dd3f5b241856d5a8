import { enableAutoUnmount, flushPromises } from '@vue/test-utils'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { Mapping, Term } from '@shared/contracts/mapping'
import type { Polymer, StatePoint } from '@shared/contracts/polymer'
import { useNoticesStore } from '@/stores/notices'
import { useWorkbenchStore } from '@/stores/workbench'
import IntakeView from '@/views/IntakeView.vue'
import type { IntakeWorker } from '@/workers/intake'
import { readBlockFiles, readText } from '@/workers/intake-task'
import { mappingDocument, term } from '../../unit/src/components/bench/bench-terms'
import { click, control, fakeApi, freshStores, mountAt, pageText } from '../../support/mount'

vi.mock('@/workers/intake', () => ({
  startIntakeWorker: (): IntakeWorker => ({
    readFile: async (_id, blob, task) => readText(await blob.text(), task, await readBlockFiles(task)),
    forgetFile: () => Promise.resolve(),
    stop: () => undefined,
  }),
}))

enableAutoUnmount(afterEach)
afterEach(() => vi.unstubAllGlobals())

const hot = { id: 'hot', temperature: 400, pressure: 1, phase: 'melt', composition: '' } as StatePoint
const bond = term('bond', 'BE', { standing: 'no data', distributionId: null, silhouette: null })
const angle = term('angle', 'BEH', { standing: 'data', distributionId: 'd-angle' })
const text = '0.30 12\n0.31 15\n0.32 18\n0.33 14\n0.34 9\n'
const file = {
  name: 'old.txt',
  size: 749,
  sha256: 'ab'.repeat(32),
  uploadedBy: null,
  uploadedAt: '2026-11-30T10:00:00.000Z',
}
const stored = {
  id: 'd-angle',
  termId: angle.id,
  content: 'count',
  edges: [1, 2, 3],
  weights: [1000, 200],
  independentSamples: null,
  settings: { unit: 'degree' },
  notes: ['The first bin was clipped at 0°.'],
  file,
  demo: false,
}
const answers = {
  'GET /api/mappings/mapping/pairs': { body: { pairs: [] } },
  'GET /api/mappings/mapping/terms': { body: { terms: [bond, angle] } },
  [`GET /api/terms/${angle.id}/distribution`]: { body: stored },
}

const open = async (
  query = '',
  {
    role = 'modeller',
    terms = [bond, angle],
    point = hot,
  }: { role?: 'modeller' | 'reviewer'; terms?: Term[]; point?: StatePoint | null } = {},
  more: Parameters<typeof fakeApi>[0] = {},
) => {
  const sent = fakeApi({ ...answers, ...more })
  const pinia = freshStores(role)
  const workbench = useWorkbenchStore()
  workbench.polymer = { id: 'p', groupId: 'group' } as Polymer
  workbench.mapping = { id: 'mapping', document: mappingDocument } as Mapping
  workbench.statePoints = point ? [point] : []
  workbench.statePoint = point
  workbench.terms = terms
  const stage = await mountAt('intake', `/polymers/p/mappings/mapping/intake${query}`, IntakeView, pinia)
  return { ...stage, sent }
}
const bring = (name: string, content: string): Promise<void> =>
  pick('#intake-files', [new File([content], name)])
const pick = async (selector: string, files: readonly File[]): Promise<void> => {
  const picker = document.querySelector<HTMLInputElement>(selector)!
  Object.defineProperty(picker, 'files', { value: files, configurable: true })
  picker.dispatchEvent(new Event('change', { bubbles: true }))
  await flushPromises()
  await flushPromises()
}
const here = (wanted: string | RegExp) => vi.waitFor(() => expect(pageText()).toMatch(wanted))

describe('IntakeView', () => {
  beforeEach(() => localStorage.clear())

  it('stores nothing before it is told to, then says what was stored and where', async () => {
    const { sent, router } = await open(
      '',
      {},
      { [`POST /api/terms/${bond.id}/distributions`]: { status: 201 } },
    )
    await bring('B-E_400K.txt', text)
    await here('reads well')
    expect(pageText()).toContain('Column 1 holds the bin centres.')
    expect(sent.some(({ method }) => method === 'POST')).toBe(false)
    await click('Store distribution')
    await vi.waitFor(() =>
      expect(useNoticesStore().current?.text).toBe('B-E_400K.txt stored for B–E at 400 K, melt'),
    )
    const upload = sent.find(({ method }) => method === 'POST')!.body as FormData
    expect((upload.get('file') as File).name).toBe('B-E_400K.txt')
    expect(JSON.parse(upload.get('settings') as string)).toMatchObject({
      statePointId: 'hot',
      settings: { kind: 'bond', unit: 'nm', layout: 'centre', value: 'count' },
    })
    expect(router.currentRoute.value.query['term']).toBe(bond.id)
  })

  it('keeps a file that cannot be read from being stored, and shows the line', async () => {
    await open()
    await bring('B-E.txt', text.replace('18', 'abc'))
    await here('Line 3, column 2 cannot be read')
    expect(pageText()).toContain('0.32 abc')
    expect((control('Store distribution') as HTMLButtonElement).disabled).toBe(true)
  })

  it('shows what files of chains say about correlation, and sends them with the file', async () => {
    const { sent } = await open('', {}, { [`POST /api/terms/${bond.id}/distributions`]: { status: 201 } })
    const counts = [12, 15, 18, 14, 9]
    // Ten chains that lean one way or the other: far more scatter than independent counts have.
    const chains = Array.from({ length: 10 }, (_, chain) => {
      const lean = chain % 2 === 0 ? 0.5 : 1.5
      return counts.map((count, bin) => 100 * count * (bin < 2 ? lean : 2 - lean))
    })
    const content = (values: readonly number[]) =>
      values.map((value, bin) => `${(0.3 + 0.01 * bin).toFixed(2)} ${value}\n`).join('')
    const files = chains.map((values, chain) => new File([content(values)], `chain${chain}.txt`))
    await bring('B-E.txt', content(counts.map((_, bin) => chains.reduce((sum, each) => sum + each[bin], 0))))
    await here('reads well')
    await pick('#intake-block-files', files.slice(0, 9))
    await here('There are 9 blocks; at least 10 are needed')
    expect((control('Store distribution') as HTMLButtonElement).disabled).toBe(true)
    await pick('#intake-block-files', files.slice(9))
    await here(/Statistical inefficiency g [1-9]\d+ ± \d/)
    document.querySelector<HTMLInputElement>('.intake-blocks input[value=chain]')!.click()
    await flushPromises()
    await here('10 files')
    // 68 000 counts over a g near 478.
    await here(/Independent samples1[34]\dAdd/)
    await click('Store distribution')
    await vi.waitFor(() => expect(sent.some(({ method }) => method === 'POST')).toBe(true))
    const upload = sent.find(({ method }) => method === 'POST')!.body as FormData
    expect(upload.getAll('chains').map((each) => (each as File).name)).toEqual(files.map(({ name }) => name))
    expect(upload.getAll('blocks')).toEqual([])
    expect(JSON.parse(upload.get('settings') as string)).toMatchObject({ firstOf: null })
  })

  it('adds the file and its blocks up when it is the first of them', async () => {
    await open()
    const part = (shift: number) => text.replaceAll(/ (\d+)/g, (_, count) => ` ${Number(count) + shift}`)
    await bring('B-E.txt', part(0))
    await here('reads well')
    await pick(
      '#intake-block-files',
      Array.from({ length: 9 }, (_, block) => new File([part(block + 1)], `block${block}.txt`)),
    )
    await here('There are 9 blocks')
    document.querySelector<HTMLInputElement>('.intake-blocks input[type=checkbox]')!.click()
    await here('The counts of 10 files were added up.')
    await click('Take off')
    await here('Histograms of 10 or more stretches of time')
  })

  it('asks what a file is when its name does not say', async () => {
    await open()
    await bring('run7.txt', text)
    await here('Which term is it?')
    expect((control('Store distribution') as HTMLButtonElement).disabled).toBe(true)
  })

  it('warns that a file takes the place of another', async () => {
    await open()
    await bring('B-E-H.txt', text.replaceAll('0.3', '13'))
    await here('It takes the place of another')
    expect(pageText()).toContain('old.txt stands there now.')
  })

  it('shows what is stored for the chosen term, and asks nothing for one without data', async () => {
    const { sent } = await open(`?term=${angle.id}`)
    await here('Stored for B–E–H')
    expect(pageText()).toContain('The first bin was clipped at 0°.')
    expect(control('old.txt').getAttribute('href')).toBe('/api/distributions/d-angle/file')
    document.body.innerHTML = ''
    sent.length = 0
    const other = await open(`?term=${bond.id}`)
    await here('No distribution for B–E at 400 K, melt')
    expect(other.sent.some(({ path }) => path.includes('/distribution?'))).toBe(false)
  })

  it('deletes what is stored only by its name, hyphens being enough', async () => {
    const { sent } = await open(
      `?term=${angle.id}`,
      {},
      { 'DELETE /api/distributions/d-angle': { status: 204 } },
    )
    await here('Stored for B–E–H')
    await click('Delete this distribution')
    const typed = document.querySelector<HTMLInputElement>('.base-confirm input')!
    typed.value = 'B-E-H'
    typed.dispatchEvent(new Event('input', { bubbles: true }))
    await flushPromises()
    document.querySelector('.base-confirm')!.dispatchEvent(new Event('submit', { cancelable: true }))
    await flushPromises()
    expect(sent.filter(({ method }) => method === 'DELETE').map(({ path }) => path)).toEqual([
      '/api/distributions/d-angle',
    ])
  })

  it('leads on where there is no state point, no term, or no right to write', async () => {
    await open('', { point: null })
    await here('No state point yet')
    expect(control('To the state points').getAttribute('href')).toBe('/polymers/p#state-points')
    document.body.innerHTML = ''
    await open('', { terms: [] })
    await here('No terms yet')
    document.body.innerHTML = ''
    await open('', { role: 'reviewer' })
    await here('You read here')
    expect(document.querySelector('#intake-files')).toBeNull()
  })
})
