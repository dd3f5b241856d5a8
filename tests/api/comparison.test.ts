import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { Comparison } from '@shared/contracts/comparison'
import { setTermUse } from '@shared/mapping'
import type { ApiClient } from '../support/api-client'
import { type ApiServer, openApiServer } from '../support/api-server'
import { buildGroup, type TestGroup } from '../support/group-builder'
import {
  ANGLE_SETTINGS,
  angleFile,
  BOND,
  buildJob,
  DOCUMENT,
  type Job,
  TEMPERATURE,
} from '../support/job-builder'
import { GAS_CONSTANT } from '@shared/units'

let server: ApiServer
let group: TestGroup
let client: ApiClient
let job: Job
let otherId: string

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
  client = group.modeller.client
})

beforeEach(async () => {
  job = await buildJob(server.services, group.modeller.member)
  const document = { ...DOCUMENT, beads: DOCUMENT.beads.slice(0, 1) }
  const other = await client.post(`/api/polymers/${job.polymerId}/mappings`, { name: 'One bead', document })
  otherId = (other.body as { id: string }).id
})

afterAll(() => server.close())

const ask = (mappings: readonly string[], statePoint = job.statePointId) =>
  client.get(
    `/api/polymers/${job.polymerId}/comparison?mappings=${mappings.join(',')}&statePoint=${statePoint}`,
  )

async function compare(mappings: readonly string[] = [job.mappingId, otherId]): Promise<Comparison> {
  const response = await ask(mappings)
  expect(response.status, response.text).toBe(200)
  return response.body as Comparison
}

describe('comparing mappings', () => {
  it('keeps the order asked for and says what a finer mapping costs', async () => {
    const { mappings, summary } = await compare([otherId, job.mappingId])
    expect(mappings.map(({ name, numbers }) => [name, numbers?.beads])).toEqual([
      ['One bead', 1],
      ['Two beads', 2],
    ])
    // Twice the beads at one density: four times the pairs.
    expect(mappings.map(({ cost }) => cost)).toEqual([1, 4])
    expect(summary).toHaveLength(1)
    expect(summary[0]).toContain('Two beads costs 1 bead more per unit')
  })

  it('counts basins and width of what has data, and claims nothing of the rest', async () => {
    const [{ terms }] = (await compare()).mappings
    const bond = terms.find(({ id }) => id === job.bondId)
    expect(bond).toMatchObject({
      coverage: 'here',
      basins: { count: 1, depth: 0.5 },
      flatness: null,
      problem: null,
    })
    // Analytic: √(kT/k); the r² of the volume element moves it by (σ/r₀)², one per cent.
    const width = Math.sqrt((GAS_CONSTANT * TEMPERATURE) / BOND.stiffness)
    expect((bond?.deviation ?? 0) / width).toBeCloseTo(1, 1)
    const bare = terms.filter(({ id }) => id !== job.bondId)
    expect(bare.length).toBeGreaterThan(0)
    for (const term of bare) {
      expect(term).toMatchObject({ coverage: 'missing', basins: null, deviation: null, flatness: null })
    }
  })

  it('tells data at another state point from none', async () => {
    const cold = await client.post(`/api/polymers/${job.polymerId}/state-points`, { temperature: 300 })
    const statePointId = (cold.body as { id: string }).id
    const stored = await client.upload(
      `/api/terms/${job.angleId}/distributions`,
      { statePointId, settings: ANGLE_SETTINGS },
      angleFile(),
    )
    expect(stored.status).toBe(201)
    const [{ terms }] = (await compare()).mappings
    const angle = terms.find(({ id }) => id === job.angleId)
    expect(angle).toMatchObject({ coverage: 'elsewhere', elsewhere: [statePointId], basins: null })
    const there = (await ask([job.mappingId, otherId], statePointId)).body as Comparison
    const [at] = there.mappings
    expect(at.terms.find(({ id }) => id === job.angleId)).toMatchObject({ coverage: 'here', elsewhere: [] })
    expect(at.terms.find(({ id }) => id === job.bondId)).toMatchObject({
      coverage: 'elsewhere',
      elsewhere: [job.statePointId],
    })
  })

  it('says why basins were not counted where nobody knows what is noise', async () => {
    await client.upload(
      `/api/terms/${job.angleId}/distributions`,
      { statePointId: job.statePointId, settings: { ...ANGLE_SETTINGS, value: 'density' } },
      angleFile(),
    )
    const [{ terms }] = (await compare()).mappings
    const angle = terms.find(({ id }) => id === job.angleId)
    expect(angle).toMatchObject({ coverage: 'here', basins: null })
    expect(angle?.deviation).toBeGreaterThan(0)
    expect(angle?.problem).toMatch(/independent samples is not stated/)
  })

  it('gives the correlation left behind with its pair, its decision and the pairs that nobody measured', async () => {
    const decided = await client.put(`/api/joint-distributions/${job.jointDistributionId}/decision`, {
      choice: 'separate',
      reason: 'They move on their own.',
    })
    expect(decided.status).toBe(200)
    const [mapping, other] = (await compare()).mappings
    expect(mapping.pairs).toHaveLength(1)
    expect(mapping.pairs[0]).toMatchObject({
      firstTermId: job.bondId,
      secondTermId: job.angleId,
      first: 'A–A',
      second: 'A–A–A',
      corrected: true,
      decision: 'separate',
    })
    expect(mapping.coupling).toBe(mapping.pairs[0].nats)
    expect(mapping.pairsWithoutData).toBeGreaterThan(0)
    expect(other).toMatchObject({ pairs: [], coupling: null })
  })

  it('leaves out terms that the mapping does not use, and their pairs', async () => {
    const document = setTermUse(DOCUMENT, { types: ['A', 'A'], placeKey: '' }, 'left out', 'to see')
    const saved = await client.put(`/api/mappings/${job.mappingId}`, {
      revision: 1,
      name: 'Two beads',
      document,
    })
    expect(saved.status).toBe(200)
    const [mapping] = (await compare()).mappings
    expect(mapping.terms.map(({ id }) => id)).not.toContain(job.bondId)
    expect(mapping).toMatchObject({ leftOut: 1, pairs: [], coupling: null })
  })

  it('follows new data, although it keeps what it found', async () => {
    await compare()
    await server.services.distributions.remove(group.owner.member, job.distributionId)
    const [{ terms }] = (await compare()).mappings
    expect(terms.find(({ id }) => id === job.bondId)).toMatchObject({ coverage: 'missing', basins: null })
  })

  it.each([
    ['one mapping', () => [job.mappingId], /at least 2/],
    ['one mapping twice', () => [job.mappingId, job.mappingId], /named twice/],
    ['seven mappings', () => Array.from({ length: 7 }, () => randomUUID()), /At most 6/],
    ['what is no id', () => [job.mappingId, 'coarse'], /by their ids/],
  ])('refuses %s and says why', async (_, mappings, message) => {
    const response = await ask(mappings())
    expect(response.status).toBe(400)
    expect(response.body).toMatchObject({ code: 'VALIDATION_FAILED' })
    expect(JSON.stringify(response.body)).toMatch(message)
  })

  it('does not find mappings and state points of another polymer', async () => {
    const stranger = await buildJob(server.services, group.modeller.member, { joint: false })
    const mapping = await ask([job.mappingId, stranger.mappingId])
    expect(mapping.status).toBe(404)
    expect(mapping.body).toMatchObject({ field: 'mappings' })
    const point = await ask([job.mappingId, otherId], stranger.statePointId)
    expect(point.status).toBe(404)
    expect(point.body).toMatchObject({ field: 'statePoint' })
  })
})
