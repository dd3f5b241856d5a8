import { enableAutoUnmount } from '@vue/test-utils'
import { afterEach, describe, expect, it, vi } from 'vitest'
import type { Role } from '@shared/contracts/common'
import FrontDeskView from '@/views/FrontDeskView.vue'
import { click, control, fakeApi, freshStores, mountAt, pageText } from '../../support/mount'

enableAutoUnmount(afterEach)
afterEach(() => vi.unstubAllGlobals())

const polymer = {
  id: 'p',
  groupId: 'group',
  name: 'polyethylene',
  smiles: '*CC*',
  formula: 'C2H4',
  mass: 28.054,
  demo: false,
  counts: { statePoints: 1, mappings: 1, distributions: 1, potentials: 1 },
}
const mapping = { id: 'm', name: '1-to-1', counts: { beads: 1, terms: 3, termsWithData: 1 } }
const nothing = { reviews: [], sentBack: [], toRelease: [], questions: [], returned: [], gaps: [] }
const nobodyAsks = {
  'GET /api/groups/group/waiting': { body: nothing },
  'GET /api/received': { body: { handOvers: [] } },
}
const answers = {
  ...nobodyAsks,
  'GET /api/groups/group/polymers': { body: { polymers: [polymer] } },
  'GET /api/polymers/p/mappings': { body: { mappings: [mapping] } },
}
const open = (role: Role = 'modeller') => mountAt('front-desk', '/', FrontDeskView, freshStores(role))
const here = (text: string | RegExp) => vi.waitFor(() => expect(pageText()).toMatch(text))

describe('FrontDeskView', () => {
  it('shows the polymers of the group with how far they are, and what waits', async () => {
    fakeApi(answers)
    const { wrapper } = await open()
    await here('1 of 3 terms with data')
    expect(wrapper.find('h1').text()).toBe('Adhesives group')
    expect(pageText()).toContain('28.054 g/mol')
    expect(control('2 terms of 3 without data').getAttribute('href')).toBe('/polymers/p/mappings/m/intake')
  })

  it('asks nothing of a reviewer and offers no writing', async () => {
    fakeApi(answers)
    await open('reviewer')
    await here('polyethylene')
    expect(pageText()).not.toContain('without data')
    expect(() => control('New polymer')).toThrow()
  })

  it('leads a reviewer to the review that was asked for, and an author to what came back', async () => {
    const handOver = {
      id: 'h',
      title: 'Melt tables',
      author: { id: 'a', name: 'Milo' },
      mapping: '3-to-1',
      statePoint: { temperature: 400, phase: 'melt' },
    }
    const waiting = { ...nothing, reviews: [handOver], sentBack: [{ ...handOver, id: 'back' }] }
    fakeApi({ ...answers, 'GET /api/groups/group/waiting': { body: waiting } })
    await open('reviewer')
    await here('Melt tables: 3-to-1, 400 K, melt')
    expect(control('Review asked by Milo').getAttribute('href')).toBe('/hand-overs/h')
    expect(control('Sent back to you').getAttribute('href')).toBe('/hand-overs/back')
  })

  it('tells a collaborator that nothing was handed over, and asks the server for nothing of the group', async () => {
    const sent = fakeApi({ 'GET /api/received': { body: { handOvers: [] } } })
    await open('collaborator')
    await here('Nothing was handed over to you yet')
    expect(sent.map(({ path }) => path)).toEqual(['/api/received'])
  })

  it('lists to a collaborator what was handed over to them, with where it stands', async () => {
    const handOver = {
      id: 'h',
      number: 2,
      title: 'Melt tables',
      group: 'Adhesives group',
      polymer: 'polyethylene',
      sentAt: '2026-06-12T12:00:00Z',
      acknowledgedAt: null,
      withdrawn: false,
      replacedBy: 3,
    }
    fakeApi({ 'GET /api/received': { body: { handOvers: [handOver] } } })
    await open('collaborator')
    await here('replaced by hand-over 3')
    expect(control('Hand-over 2, Melt tables').getAttribute('href')).toBe('/hand-overs/h')
  })

  it('leads to questions on one’s tables and to files that came back', async () => {
    const at = { handOverId: 'h', number: 2, table: 'B–E' }
    const waiting = {
      ...nothing,
      questions: [{ ...at, id: 'q', text: 'At 0?' }],
      returned: [{ ...at, id: 'f', name: 'run.txt' }],
    }
    fakeApi({ ...answers, 'GET /api/groups/group/waiting': { body: waiting } })
    await open()
    await here('Hand-over 2: At 0?')
    expect(control('Question on B–E').getAttribute('href')).toBe('/hand-overs/h#questions')
    expect(control('File sent back for B–E').getAttribute('href')).toBe('/hand-overs/h#returned')
  })

  it('leads an empty group to its first repeat unit', async () => {
    fakeApi({ ...nobodyAsks, 'GET /api/groups/group/polymers': { body: { polymers: [] } } })
    await open()
    await here('No polymer yet')
    expect(control('Draw the first repeat unit').getAttribute('href')).toBe('/polymers/new?group=group')
  })

  it('says when the polymers could not be fetched, and tries again when asked', async () => {
    const failed = { status: 503, body: { code: 'UNAVAILABLE', message: 'The database rests.' } }
    fakeApi({
      ...answers,
      'GET /api/groups/group/polymers': [failed, answers['GET /api/groups/group/polymers']],
    })
    await open()
    await here('The database rests.')
    await click('Try again')
    await here('polyethylene')
  })
})
