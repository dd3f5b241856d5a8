import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { Mapping, MappingDocument, Term } from '@shared/contracts/mapping'
import type { ApiClient } from '../support/api-client'
import { type ApiServer, openApiServer } from '../support/api-server'
import { buildGroup, type TestGroup } from '../support/group-builder'
import {
  ANGLE_SETTINGS,
  angleFile,
  BOND_SETTINGS,
  bondFile,
  buildJob,
  DOCUMENT,
  type Job,
  termId,
  withTypes,
} from '../support/job-builder'

let server: ApiServer
let group: TestGroup
let client: ApiClient
let job: Job

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
  client = group.modeller.client
})

beforeEach(async () => {
  job = await buildJob(server.services, group.modeller.member, { joint: false })
})

afterAll(() => server.close())

async function save(document: MappingDocument, revision: number, name = 'Two beads') {
  return client.put(`/api/mappings/${job.mappingId}`, { revision, name, document })
}

async function terms(statePoint = ''): Promise<Term[]> {
  const query = statePoint === '' ? '' : `?statePoint=${statePoint}`
  const response = await client.get(`/api/mappings/${job.mappingId}/terms${query}`)
  return (response.body as { terms: Term[] }).terms
}

const oneBead: MappingDocument = {
  version: 1,
  beads: [
    { ...DOCUMENT.beads[0], atoms: [0, 1, 2, 3, 4, 5, 6, 7].map((atom) => ({ atom, weight: 1, unit: 0 })) },
  ],
}

describe('a mapping', () => {
  it('starts without beads unless it is given some', async () => {
    const response = await client.post(`/api/polymers/${job.polymerId}/mappings`, { name: 'Empty' })
    expect(response.status).toBe(201)
    expect(response.body).toMatchObject({
      document: { version: 1, beads: [] },
      revision: 1,
      savedBy: { name: 'The modeller' },
      counts: { beads: 0, terms: 0, termsWithData: 0 },
    })
  })

  it('tells how many of its terms have data', async () => {
    const response = await client.get(`/api/mappings/${job.mappingId}`)
    expect(response.body).toMatchObject({ counts: { beads: 2, terms: job.terms.length, termsWithData: 1 } })
  })

  it('has a name of its own on its polymer', async () => {
    const response = await client.post(`/api/polymers/${job.polymerId}/mappings`, { name: 'Two beads' })
    expect(response.status).toBe(409)
    expect(response.body).toMatchObject({ code: 'NAME_TAKEN', field: 'name' })
  })

  it('that names atoms the repeat unit does not have is refused, and nothing changes', async () => {
    const beads = [{ ...DOCUMENT.beads[0], atoms: [{ atom: 99, weight: 1, unit: 0 }] }]
    const response = await save({ version: 1, beads }, 1)
    expect(response.status).toBe(422)
    expect(response.body).toMatchObject({ code: 'MAPPING_INVALID' })
    expect((await client.get(`/api/mappings/${job.mappingId}`)).body).toMatchObject({ revision: 1 })
    expect(await terms()).toEqual(job.terms)
  })

  it('with two beads of one id is refused', async () => {
    const response = await save({ version: 1, beads: [DOCUMENT.beads[0], DOCUMENT.beads[0]] }, 1)
    expect(response.status).toBe(400)
    expect(response.body).toMatchObject({ code: 'VALIDATION_FAILED', field: 'document.beads' })
  })

  it('saved over an older revision is a conflict that shows what is there now', async () => {
    await save(withTypes({ B: 'R' }), 1, 'Saved first')
    const late = await save(oneBead, 1, 'Saved too late')
    expect(late.status).toBe(409)
    expect(late.body).toMatchObject({ code: 'CONFLICT', details: { name: 'Saved first', revision: 2 } })
    expect((late.body as { details: Mapping }).details.document.beads.map(({ type }) => type)).toEqual([
      'A',
      'R',
    ])
  })

  it('saved by several people at the same moment is saved by exactly one of them', async () => {
    const responses = await Promise.all(
      ['C', 'D', 'E', 'F', 'G'].map((type) => save(withTypes({ B: type }), 1, `With ${type}`)),
    )
    expect(responses.map(({ status }) => status).sort()).toEqual([200, 409, 409, 409, 409])
    const saved = responses.find(({ status }) => status === 200)?.body as Mapping
    const now = (await client.get(`/api/mappings/${job.mappingId}`)).body as Mapping
    expect(now).toEqual(saved)
    expect(now.revision).toBe(2)
    const type = now.document.beads[1].type
    expect((await terms()).some(({ types }) => types.includes(type))).toBe(true)
  })

  it('takes its terms, data and files along when it is deleted, and leaves the polymer', async () => {
    expect((await client.delete(`/api/mappings/${job.mappingId}`)).status).toBe(204)
    expect((await client.get(`/api/distributions/${job.distributionId}/file`)).status).toBe(404)
    const polymer = await client.get(`/api/polymers/${job.polymerId}`)
    expect(polymer.body).toMatchObject({
      counts: { mappings: 0, distributions: 0, potentials: 0, statePoints: 1 },
    })
  })
})

describe('the terms of a mapping', () => {
  it('follow from its beads across the border of the unit', () => {
    expect(job.terms.map(({ kind, name }) => `${kind} ${name}`)).toEqual([
      'bond A–A',
      'bond A–B',
      'angle A–A–A',
      'angle A–A–B',
      'dihedral A–A–A–A',
      'dihedral A–A–A–B',
      'dihedral B–A–A–B',
    ])
  })

  it('have a standing that comes from facts, with an outline for the rail', async () => {
    const all = await terms(job.statePointId)
    const bond = all.find(({ id }) => id === job.bondId)
    expect(bond).toMatchObject({ standing: 'inverted', distributionId: job.distributionId })
    expect(bond?.silhouette?.measured).toHaveLength(40)
    expect(Math.max(...(bond?.silhouette?.measured ?? []))).toBe(1)
    expect(bond?.silhouette?.derived).toHaveLength(40)
    expect(Math.min(...(bond?.silhouette?.derived ?? []))).toBeLessThan(0.05)
    expect(all.filter(({ standing }) => standing === 'no data')).toHaveLength(all.length - 1)
    const elsewhere = await client.post(`/api/polymers/${job.polymerId}/state-points`, { temperature: 500 })
    const there = await terms((elsewhere.body as { id: string }).id)
    expect(there.every(({ standing, silhouette }) => standing === 'no data' && silhouette === null)).toBe(
      true,
    )
  })

  it('keep their ids when a bead moves, gets a name, or gives an atom away', async () => {
    const beads = DOCUMENT.beads.map((bead) => ({ ...bead, label: 'renamed', colour: 3 }))
    const [backbone, ring] = beads
    const moved = [ring, { ...backbone, atoms: [{ atom: 0, weight: 1, unit: 0 }] }]
    expect((await save({ version: 1, beads: moved }, 1)).status).toBe(200)
    const now = await terms()
    for (const { id, name } of job.terms) {
      const same = now.find((term) => term.name === name)
      if (same) expect(same.id).toBe(id)
    }
    expect(now.find(({ id }) => id === job.bondId)).toBeDefined()
  })

  it('keep their ids and data when a bead type is renamed throughout', async () => {
    await save(withTypes({ A: 'BB', B: 'RING' }), 1)
    const now = await terms(job.statePointId)
    expect(now.map(({ id }) => id).sort()).toEqual(job.terms.map(({ id }) => id).sort())
    expect(now.find(({ id }) => id === job.bondId)).toMatchObject({
      name: 'BB–BB',
      standing: 'inverted',
      current: true,
    })
  })

  it('go with their beads when two types swap their names', async () => {
    await save(withTypes({ A: 'B', B: 'A' }), 1)
    expect((await terms()).find(({ id }) => id === job.bondId)).toMatchObject({ name: 'B–B' })
  })

  it('stay for their data when the mapping has them no more, take nothing new, and come back with it', async () => {
    const ringBond = termId(job.terms, 'A–B')
    const settings = { statePointId: job.statePointId, settings: BOND_SETTINGS }
    const added = await client.upload(`/api/terms/${ringBond}/distributions`, settings, bondFile())
    expect(added.status).toBe(201)
    expect((await save(oneBead, 1)).body).toMatchObject({
      counts: { beads: 1, terms: 3, termsWithData: 0, termsUnfit: 1 },
    })
    const without = await terms(job.statePointId)
    expect(without.map(({ name, current }) => [name, current])).toEqual([
      ['A–A', true],
      ['A–A–A', true],
      ['A–A–A–A', true],
      ['A–B', false],
    ])
    expect(without.find(({ id }) => id === ringBond)).toMatchObject({ standing: 'data', current: false })
    const refused = await client.upload(`/api/terms/${ringBond}/distributions`, settings, bondFile())
    expect(refused.status).toBe(409)
    expect(refused.body).toMatchObject({ code: 'TERM_GONE' })
    expect(
      (await client.get(`/api/terms/${ringBond}/distribution?statePoint=${job.statePointId}`)).status,
    ).toBe(200)

    await save(DOCUMENT, 2)
    const back = await terms(job.statePointId)
    expect(back.find(({ id }) => id === ringBond)).toMatchObject({
      name: 'A–B',
      current: true,
      standing: 'data',
    })
    expect(back.every(({ current }) => current)).toBe(true)
  })

  it('that vanish without data are gone', async () => {
    await save(oneBead, 1)
    const dihedral = termId(job.terms, 'B–A–A–B')
    expect(
      (await client.get(`/api/terms/${dihedral}/distribution?statePoint=${job.statePointId}`)).status,
    ).toBe(404)
  })

  it('are several where their sequence is split by its places, and one again when it is pooled', async () => {
    const flagged = ['A', 'A', 'B']
    const splitting = { types: flagged, choice: 'split', reason: '' } as const
    const split: MappingDocument = { ...DOCUMENT, poolings: [{ ...splitting, types: flagged }] }
    const before = await terms()
    expect((await save(split, 1)).status).toBe(200)
    const parts = (await terms()).filter(({ types }) => types.join() === flagged.join())
    expect(parts.map(({ name }) => name)).toEqual(['A–A–B (1)', 'A–A–B (2)'])
    expect(new Set(parts.map(({ placeKey }) => placeKey)).size).toBe(2)
    const renamed = {
      ...split,
      beads: withTypes({ B: 'C' }).beads,
      poolings: [{ ...splitting, types: ['A', 'A', 'C'] }],
    }
    expect((await save(renamed, 2)).status).toBe(200)
    const kept = (await terms()).filter(({ types }) => types.join() === 'A,A,C')
    expect(kept.map(({ id, placeKey }) => [id, placeKey])).toEqual(
      parts.map(({ id, placeKey }) => [id, placeKey]),
    )
    expect((await save(DOCUMENT, 3)).status).toBe(200)
    expect((await terms()).map(({ name }) => name)).toEqual(before.map(({ name }) => name))
  })

  it('never lose data to a save at the same moment', async () => {
    const ringAngle = termId(job.terms, 'A–A–B')
    const upload = { statePointId: job.statePointId, settings: ANGLE_SETTINGS }
    const [stored, saved] = await Promise.all([
      client.upload(`/api/terms/${ringAngle}/distributions`, upload, angleFile()),
      save(oneBead, 1),
    ])
    expect(saved.status).toBe(200)
    const kept = (await terms(job.statePointId)).find(({ id }) => id === ringAngle)
    // Either the data came first, and the term stays for them; or the term was gone first, and nothing was stored.
    if (stored.status === 201) expect(kept).toMatchObject({ current: false, standing: 'data' })
    else expect([stored.status, kept]).toEqual([404, undefined])
  })
})
