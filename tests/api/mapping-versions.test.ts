import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { Comparison } from '@shared/contracts/comparison'
import type { PairList } from '@shared/contracts/distribution'
import type { Mapping, MappingDocument, Term } from '@shared/contracts/mapping'
import type { MappingCoverage } from '@shared/contracts/mapping-coverage'
import type { MappingFit, MappingVersion } from '@shared/contracts/mapping-version'
import type { TermEvidence } from '@shared/contracts/term-evidence'
import { changeBead, giveAtoms, setTermUse } from '@shared/mapping'
import type { ApiClient } from '../support/api-client'
import { type ApiServer, openApiServer } from '../support/api-server'
import { buildGroup, type TestGroup } from '../support/group-builder'
import {
  BOND_SETTINGS,
  bondFile,
  buildJob,
  DOCUMENT,
  type Job,
  uploaded,
  withTypes,
} from '../support/job-builder'

let server: ApiServer
let group: TestGroup
let client: ApiClient
let job: Job

/** The first ring atom moves to the backbone bead: both beads change. */
const MOVED = giveAtoms(DOCUMENT, 'backbone', [2])
const UNFIT = 'Measured on version 1 of the mapping. Bead A was C2H3 and is now C3H3.'

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
  client = group.modeller.client
})
beforeEach(async () => {
  job = await buildJob(server.services, group.modeller.member)
})
afterAll(() => server.close())

async function save(document: MappingDocument, revision = 1): Promise<Mapping> {
  const response = await client.put(`/api/mappings/${job.mappingId}`, {
    revision,
    name: 'Two beads',
    document,
  })
  expect(response.status).toBe(200)
  return response.body as Mapping
}
async function get<Body>(path: string): Promise<Body> {
  const response = await client.get(`/api/mappings/${job.mappingId}${path}`)
  expect(response.status).toBe(200)
  return response.body as Body
}
async function fitOf(document: MappingDocument): Promise<MappingFit> {
  const response = await client.post(`/api/mappings/${job.mappingId}/fit`, { document })
  expect(response.status).toBe(200)
  return response.body as MappingFit
}
const termOf = async (name: string): Promise<Term | undefined> =>
  (await get<{ terms: Term[] }>(`/terms?statePoint=${job.statePointId}`)).terms.find(
    (each) => each.name === name,
  )
const measureBond = () =>
  server.services.distributions.add(
    group.modeller.member,
    job.bondId,
    { statePointId: job.statePointId, settings: BOND_SETTINGS },
    uploaded(bondFile('again.txt', 5e5)),
  )

describe('the version of a mapping', () => {
  it('stays while only names, labels and colours change, and no data are touched', async () => {
    const renamed = changeBead(withTypes({ A: 'X' }), 'ring', { label: 'phenyl', name: 'R' })
    expect(await save(renamed)).toMatchObject({
      version: 1,
      revision: 2,
      counts: { termsWithData: 1, termsUnfit: 0 },
    })
    expect(await termOf('X–X')).toMatchObject({ standing: 'inverted', unfit: null })
    expect((await get<{ versions: unknown[] }>('/versions')).versions).toEqual([])
  })

  it('stays while there are no data, whatever changes', async () => {
    await client.delete(`/api/distributions/${job.distributionId}`)
    await client.delete(`/api/joint-distributions/${job.jointDistributionId}`)
    expect(await save(MOVED)).toMatchObject({ version: 1, hasData: false })
  })

  it('is one more when the make-up of a bead changes under data; what it was before is kept with who and when', async () => {
    const before = await get<Mapping>('')
    expect(await save(MOVED)).toMatchObject({
      version: 2,
      revision: 2,
      hasData: true,
      counts: { termsWithData: 0, termsUnfit: 1 },
    })
    const { versions } = await get<{ versions: MappingVersion[] }>('/versions')
    expect(versions).toEqual([
      { number: 1, document: before.document, savedAt: before.savedAt, savedBy: before.savedBy, data: 2 },
    ])
  })

  it('is not made by a save over an older revision', async () => {
    await save(changeBead(DOCUMENT, 'ring', { label: 'phenyl' }))
    const body = { revision: 1, name: 'Two beads', document: MOVED }
    expect((await client.put(`/api/mappings/${job.mappingId}`, body)).status).toBe(409)
    expect(await get<Mapping>('')).toMatchObject({ version: 1, revision: 2 })
  })
})

describe('data that no longer fit their mapping', () => {
  it('say so where the terms are listed, and why', async () => {
    await save(MOVED)
    expect(await termOf('A–A')).toMatchObject({
      id: job.bondId,
      standing: 'no data',
      distributionId: job.distributionId,
      unfit: UNFIT,
    })
  })

  it('say so among the pairs', async () => {
    await save(MOVED)
    const { pairs } = await get<PairList>(`/pairs?statePoint=${job.statePointId}`)
    expect(pairs.find(({ jointDistributionId }) => jointDistributionId !== null)?.unfit).toBe(UNFIT)
    expect(pairs.filter(({ unfit }) => unfit !== null)).toHaveLength(1)
  })

  it('give no table, alone or in an archive', async () => {
    await save(MOVED)
    const query = `statePoint=${job.statePointId}`
    const table = await client.get(`/api/terms/${job.bondId}/table?${query}`)
    expect([table.status, table.body]).toMatchObject([409, { code: 'CONFLICT' }])
    expect((await client.get(`/api/mappings/${job.mappingId}/tables.zip?${query}`)).status).toBe(404)
    const joint = await client.get(`/api/joint-distributions/${job.jointDistributionId}/table`)
    expect([joint.status, joint.body]).toMatchObject([409, { code: 'CONFLICT' }])
  })

  it('do not count in a comparison, and are named there', async () => {
    const other = await server.services.mappings.create(group.modeller.member, job.polymerId, {
      name: 'Other',
      document: DOCUMENT,
    })
    await save(MOVED)
    const query = `mappings=${job.mappingId},${other.id}&statePoint=${job.statePointId}`
    const response = await client.get(`/api/polymers/${job.polymerId}/comparison?${query}`)
    const [column] = (response.body as Comparison).mappings
    expect(column.terms.find(({ id }) => id === job.bondId)).toMatchObject({
      coverage: 'unfit',
      unfit: UNFIT,
      basins: null,
      deviation: null,
    })
    expect(column).toMatchObject({ pairs: [], coupling: null })
  })

  it('fit again when the beads are as they were, in a version of its own', async () => {
    await save(MOVED)
    expect(await save(DOCUMENT, 2)).toMatchObject({ version: 3, counts: { termsWithData: 1, termsUnfit: 0 } })
    expect(await termOf('A–A')).toMatchObject({ standing: 'inverted', unfit: null })
  })

  it('make room for new ones, which fit from the version they were measured under', async () => {
    await save(MOVED)
    await measureBond()
    expect(await termOf('A–A')).toMatchObject({ standing: 'data', unfit: null })
    await save(DOCUMENT, 2)
    expect(await termOf('A–A')).toMatchObject({
      unfit: 'Measured on version 2 of the mapping. Bead A was C3H3 and is now C2H3.',
    })
  })

  it('stay when the bead that changed is not in their term', async () => {
    // The ring sits elsewhere; the bond along the backbone does not know of it, nor does the angle.
    expect(await save(changeBead(DOCUMENT, 'ring', { site: { rule: 'geometry' } }))).toMatchObject({
      version: 2,
      counts: { termsWithData: 1, termsUnfit: 0 },
    })
    const { pairs } = await get<PairList>(`/pairs?statePoint=${job.statePointId}`)
    expect(pairs.every(({ unfit }) => unfit === null)).toBe(true)
  })
})

describe('what a save would do to the data', () => {
  it('is told beforehand, and nothing is saved', async () => {
    const fit = await fitOf(MOVED)
    expect(fit).toMatchObject({ version: 2, makesVersion: true, fitting: 0 })
    expect(fit.lost).toEqual([
      { name: 'A–A', kind: 'bond', statePointIds: [job.statePointId], reason: UNFIT },
      { name: 'A–A · A–A–A', kind: null, statePointIds: [job.statePointId], reason: UNFIT },
    ])
    expect(await get<Mapping>('')).toMatchObject({ version: 1, revision: 1 })
  })

  it('is nothing for a name, and names terms that would go', async () => {
    expect(await fitOf(withTypes({ A: 'X' }))).toEqual({
      version: 1,
      makesVersion: false,
      lost: [],
      fitting: 2,
    })
    const { lost } = await fitOf({ version: 1, beads: [DOCUMENT.beads[1]] })
    expect(lost.map(({ reason }) => reason)).toEqual(Array(2).fill('The mapping no longer has this term.'))
  })
})

describe('the coverage of a mapping', () => {
  it('is a row for each term and a cell for each state point, the coldest first', async () => {
    const colder = await server.services.statePoints.create(group.modeller.member, job.polymerId, {
      temperature: 300,
      pressure: null,
      phase: '',
      composition: '',
      notes: '',
    })
    const { statePointIds, terms } = await get<MappingCoverage>('/coverage')
    expect(statePointIds).toEqual([colder.id, job.statePointId])
    expect(terms.map(({ id }) => id)).toEqual(job.terms.map(({ id }) => id))
    const cells = (termId: string) => terms.find(({ id }) => id === termId)?.cells
    expect(cells(job.bondId)).toEqual([
      { statePointId: colder.id, coverage: 'elsewhere', inverted: false, reason: null },
      { statePointId: job.statePointId, coverage: 'here', inverted: true, reason: null },
    ])
    expect(cells(job.angleId)?.map(({ coverage }) => coverage)).toEqual(['missing', 'missing'])
  })

  it('says what no longer fits, and counts it nowhere else', async () => {
    await save(MOVED)
    const { terms } = await get<MappingCoverage>('/coverage')
    expect(terms.find(({ id }) => id === job.bondId)?.cells).toEqual([
      { statePointId: job.statePointId, coverage: 'unfit', inverted: false, reason: UNFIT },
    ])
  })

  it('keeps terms that are left out, with the reason', async () => {
    const left = setTermUse(DOCUMENT, { types: ['A', 'A'], placeKey: '' }, 'left out', 'it is stiff')
    expect(await save(left)).toMatchObject({
      version: 1,
      counts: { terms: job.terms.length - 1, leftOut: 1, termsWithData: 0 },
    })
    const { terms } = await get<MappingCoverage>('/coverage')
    expect(terms.find(({ id }) => id === job.bondId)?.leftOut).toBe('it is stiff')
    expect(terms.filter(({ leftOut }) => leftOut === null)).toHaveLength(job.terms.length - 1)
    const { pairs } = await get<PairList>(`/pairs?statePoint=${job.statePointId}`)
    expect(
      pairs.some(({ firstTermId, secondTermId }) => [firstTermId, secondTermId].includes(job.bondId)),
    ).toBe(false)
  })
})

describe('what decides between terms of one motion', () => {
  it('is how well data sample each and how they are coupled, as long as the data fit', async () => {
    const query = `?statePoint=${job.statePointId}`
    const { samples, couplings } = await get<TermEvidence>(`/evidence${query}`)
    // The counts of the files stand for themselves; the two were made to know nothing of one another.
    expect(samples.map(({ name }) => name)).toEqual(['A–A'])
    expect(samples[0].samples).toBeCloseTo(1e6, -2)
    expect(couplings).toMatchObject([{ first: 'A–A', second: 'A–A–A' }])
    expect(couplings[0].nats).toBeLessThan(0.02)
    await save(MOVED)
    expect(await get<TermEvidence>(`/evidence${query}`)).toEqual({ samples: [], couplings: [] })
  })

  it('is known of terms that are left out, since the choice may change', async () => {
    await save(setTermUse(DOCUMENT, { types: ['A', 'A'], placeKey: '' }, 'left out'))
    const { samples } = await get<TermEvidence>(`/evidence?statePoint=${job.statePointId}`)
    expect(samples.map(({ name }) => name)).toEqual(['A–A'])
  })
})
