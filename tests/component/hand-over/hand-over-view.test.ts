import { enableAutoUnmount } from '@vue/test-utils'
import { afterEach, describe, expect, it, vi } from 'vitest'
import type { Role } from '@shared/contracts/common'
import type { HandOverDetail, HandOverTerm } from '@shared/contracts/hand-over-desk'
import HandOverView from '@/views/HandOverView.vue'
import { mappingDocument } from '../../unit/src/components/bench/bench-terms'
import { click, control, fakeApi, field, freshStores, mountAt, pageText } from '../../support/mount'

enableAutoUnmount(afterEach)
afterEach(() => vi.unstubAllGlobals())

const person = { id: 'author', name: 'Milo Modeller' }
const term = (id: string, changes: Partial<HandOverTerm> = {}): HandOverTerm => ({
  id,
  kind: 'bond',
  types: ['B', 'E'],
  name: id,
  state: 'covered',
  leftOut: null,
  joined: false,
  potentialId: `potential-${id}`,
  savedBy: person,
  savedAt: '2026-06-12T12:00:00Z',
  source: 'bond.txt',
  measured: null,
  evidence: {
    refused: null,
    domain: [[0.12, 0.48]],
    rows: [361],
    lowestAt: [0.25],
    silhouette: [1, 0, 1],
    independentSamples: 1200,
    inefficiency: 1,
    basins: 1,
    form: null,
  },
  warnings: [],
  mark: null,
  ...changes,
})
const detail = (changes: Partial<HandOverDetail> = {}): HandOverDetail => ({
  id: 'h',
  polymerId: 'p',
  mappingId: 'm',
  mapping: '3-to-1',
  statePointId: 's',
  statePoint: { temperature: 400, pressure: 1, phase: 'melt', composition: '' },
  title: 'Melt tables',
  standing: 'draft',
  number: null,
  revision: 4,
  author: person,
  reviewer: null,
  changedAt: '2026-06-12T12:00:00Z',
  signedOffBy: null,
  signedOffAt: null,
  releasedAt: null,
  replaces: null,
  replacedBy: null,
  withdrawn: null,
  notes: '',
  selection: { version: 1, leftOut: [], apart: [] },
  layout: { layoutId: null, length: 'nm', angle: 'degree', energy: 'kJ/mol', name: 'Three columns' },
  checklist: [{ code: 'TERMS_COVERED', title: 'Every term in use has a table', met: true, lines: [] }],
  terms: [term('B–E')],
  pairs: [],
  changed: false,
  reviews: [],
  comments: [],
  reviewers: [{ id: 'reviewer', name: 'Renate Reviewer' }],
  mayDecide: false,
  ...changes,
})
const rest = {
  'GET /api/mappings/m': { body: { id: 'm', name: '3-to-1', document: mappingDocument } },
  'GET /api/polymers/p': { body: { id: 'p', groupId: 'group', name: 'polyethylene', demo: false } },
  'GET /api/groups/group/layouts': { body: { builtIns: [], layouts: [], default: 'three-columns' } },
  'GET /api/hand-overs/h/preview': { body: { text: '# coordinate energy\n 0.12 4\n' } },
}
const open = async (
  handOver: HandOverDetail,
  role: Role = 'modeller',
  more: Parameters<typeof fakeApi>[0] = {},
) => {
  const sent = fakeApi({ ...rest, 'GET /api/hand-overs/h': { body: handOver }, ...more })
  await mountAt('hand-over', '/hand-overs/h', HandOverView, freshStores(role))
  await vi.waitFor(() => expect(pageText()).toContain(handOver.title))
  return sent
}
const writes = (sent: ReturnType<typeof fakeApi>) => sent.filter(({ method }) => method !== 'GET')

describe('HandOverView of a draft', () => {
  it('asks for review of the revision on screen once the checklist is met', async () => {
    const asked = detail({ standing: 'in review', reviewer: { id: 'reviewer', name: 'Renate Reviewer' } })
    const sent = await open(detail(), 'modeller', { 'POST /api/hand-overs/h/review': { body: asked } })
    await click('Ask for review')
    await vi.waitFor(() => expect(pageText()).toContain('in review, with Renate Reviewer'))
    expect(writes(sent)[0].body).toEqual({ revision: 4, reviewerId: 'reviewer', note: '' })
  })

  it('holds the question back while a point is open, and leads to where it is mended', async () => {
    const place = { room: 'intake' as const, termId: 'x' }
    const checklist: HandOverDetail['checklist'] = [
      {
        code: 'TERMS_COVERED',
        title: 'Every term in use has a table',
        met: false,
        lines: [{ text: 'X: no data at this state point', open: true, place }],
      },
    ]
    await open(detail({ checklist }))
    expect(control('Ask for review').hasAttribute('disabled')).toBe(true)
    expect(control('Bring data').getAttribute('href')).toBe(
      '/polymers/p/mappings/m/intake?statePoint=s&term=x',
    )
  })

  it('keeps a warning with a reason, and no reason is none', async () => {
    const warning = { code: 'FEW_SAMPLES', message: 'Few.', action: 'Measure.', answer: null }
    const sent = await open(detail({ terms: [term('B–E', { warnings: [warning] })] }), 'modeller', {
      'PUT /api/potentials/potential-B–E/answers': { body: { answers: [] } },
    })
    await click('Keep, with reason: Few independent samples, B–E')
    await click('Keep')
    expect(writes(sent)).toEqual([])
    const input = field('Reason, for the record')
    input.value = 'The well is what matters.'
    input.dispatchEvent(new Event('input'))
    await click('Keep')
    await vi.waitFor(() => expect(writes(sent)).toHaveLength(1))
    expect(writes(sent)[0].body).toEqual({ code: 'FEW_SAMPLES', reason: 'The well is what matters.' })
  })

  it('lets a reviewer look and change nothing', async () => {
    await open(detail(), 'reviewer')
    expect(pageText()).not.toContain('Ask for review')
    expect(pageText()).not.toContain('Leave out')
  })
})

describe('HandOverView under review', () => {
  const review = detail({ standing: 'in review', mayDecide: true, reviewer: { id: 'me', name: 'Me' } })

  it('shows the evidence of each term and takes the mark and the word of the reviewer', async () => {
    const signed = detail({ ...review, standing: 'signed off', mayDecide: true })
    const sent = await open(review, 'reviewer', {
      'PUT /api/hand-overs/h/mark': { body: review },
      'POST /api/hand-overs/h/decision': { body: signed },
    })
    expect(pageText()).toContain('1 basin; smooth curve; from bond.txt')
    await click('Accept B–E')
    await click('Sign off')
    await vi.waitFor(() => expect(writes(sent)).toHaveLength(2))
    expect(writes(sent).map(({ body }) => body)).toEqual([
      { termId: 'B–E', mark: 'accepted' },
      { outcome: 'signed off', revision: 4, note: '' },
    ])
  })

  it('holds signing off back while a term is questioned', async () => {
    const mark = { mark: 'questioned' as const, by: null, at: '2026-06-12T12:00:00Z' }
    await open({ ...review, terms: [term('B–E', { mark })] }, 'reviewer')
    expect(control('Sign off').hasAttribute('disabled')).toBe(true)
    expect(pageText()).toContain('questioned: B–E')
  })

  it('sends nothing back without a note', async () => {
    const sent = await open(review, 'reviewer')
    await click('Send back')
    expect(pageText()).toContain('Say what should be mended.')
    expect(writes(sent)).toEqual([])
  })

  it('offers its author no word on it, but the way back', async () => {
    await open({ ...review, mayDecide: false })
    expect(() => control('Sign off')).toThrow()
    expect(control('Take it back to change it')).toBeTruthy()
  })

  it('says why a step was refused, and shows what holds now', async () => {
    const back = detail({ standing: 'sent back', reviews: [] })
    await open(review, 'reviewer', {
      'GET /api/hand-overs/h': [{ body: review }, { body: back }],
      'POST /api/hand-overs/h/decision': {
        status: 409,
        body: { code: 'CONTENT_CHANGED', message: 'Data changed, nothing was signed off.' },
      },
    })
    await click('Sign off')
    await vi.waitFor(() => expect(pageText()).toContain('sent back'))
    expect(pageText()).toContain('Data changed, nothing was signed off.')
  })
})

describe('HandOverView for somebody outside the readers of the group', () => {
  it('asks for what was handed over to them, and says when nothing was', async () => {
    const sent = fakeApi({})
    await mountAt('hand-over', '/hand-overs/h', HandOverView, freshStores('collaborator'))
    await vi.waitFor(() => expect(pageText()).toContain('it was not handed over to you'))
    expect(sent.map(({ path }) => path)).toEqual(['/api/hand-overs/h/received'])
  })

  it('looks for a delivery where a reader of another group finds no hand-over', async () => {
    const sent = fakeApi({})
    await mountAt('hand-over', '/hand-overs/h', HandOverView, freshStores('modeller'))
    await vi.waitFor(() => expect(pageText()).toContain('it was not handed over to you'))
    expect(sent.map(({ path }) => path)).toEqual(['/api/hand-overs/h', '/api/hand-overs/h/received'])
  })
})
