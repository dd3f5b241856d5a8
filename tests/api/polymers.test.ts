import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Polymer, StatePoint } from '@shared/contracts/polymer'
import type { ApiClient } from '../support/api-client'
import { type ApiServer, openApiServer } from '../support/api-server'
import { buildGroup, type TestGroup } from '../support/group-builder'
import { buildJob, SMILES } from '../support/job-builder'

let server: ApiServer
let group: TestGroup
let client: ApiClient

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
  client = group.modeller.client
})

afterAll(() => server.close())

async function addPolymer(name: string = randomUUID(), smiles = SMILES): Promise<Polymer> {
  const response = await client.post(`/api/groups/${group.groupId}/polymers`, { name, smiles })
  expect(response.status, response.text).toBe(201)
  return response.body as Polymer
}

describe('a polymer', () => {
  it('is worked out from its SMILES', async () => {
    // n-Hexyl acrylate: C9H16O2, 9 × 12.011 + 16 × 1.008 + 2 × 15.999 (IUPAC abridged atomic weights 2021).
    const polymer = await addPolymer('Poly(n-hexyl acrylate)', ' *CC(*)C(=O)OCCCCCC ')
    expect(polymer).toMatchObject({
      groupId: group.groupId,
      smiles: '*CC(*)C(=O)OCCCCCC',
      formula: 'C9H16O2',
      heavyAtoms: 11,
      revision: 1,
      demo: false,
      counts: { statePoints: 0, mappings: 0, distributions: 0, potentials: 0 },
    })
    expect(polymer.mass).toBeCloseTo(156.225, 6)
  })

  it.each([
    ['*CC(', 'SMILES_UNPARSABLE'],
    ['*CC', 'ATTACHMENT_COUNT'],
    ['*CC*.C', 'FRAGMENTS'],
    ['*CC1*CC1', 'ATTACHMENT_BONDS'],
    [`*${'C'.repeat(201)}*`, 'TOO_MANY_ATOMS'],
  ])('is refused with a sentence when its SMILES is %s', async (smiles, code) => {
    const before = (await client.get(`/api/groups/${group.groupId}/polymers`)).body as { polymers: Polymer[] }
    const response = await client.post(`/api/groups/${group.groupId}/polymers`, {
      name: randomUUID(),
      smiles,
    })
    expect(response.status).toBe(422)
    expect(response.body).toMatchObject({ code })
    expect((response.body as { message: string }).message).toMatch(/\.$/)
    const after = (await client.get(`/api/groups/${group.groupId}/polymers`)).body as { polymers: Polymer[] }
    expect(after.polymers).toHaveLength(before.polymers.length)
  })

  it('says where in the SMILES something is wrong', async () => {
    const body = { name: randomUUID(), smiles: '*CCX(*)C' }
    const response = await client.post(`/api/groups/${group.groupId}/polymers`, body)
    expect(response.body).toMatchObject({ code: 'SMILES_UNPARSABLE', position: 3 })
  })

  it('has a name of its own in its group, and may share it with another group', async () => {
    const { name } = await addPolymer()
    const response = await client.post(`/api/groups/${group.groupId}/polymers`, { name, smiles: SMILES })
    expect(response.status).toBe(409)
    expect(response.body).toMatchObject({ code: 'NAME_TAKEN', field: 'name' })
    const other = await buildGroup(server)
    const elsewhere = await other.owner.client.post(`/api/groups/${other.groupId}/polymers`, {
      name,
      smiles: SMILES,
    })
    expect(elsewhere.status).toBe(201)
  })

  it('stands first in the list when it is the newest, and only in the list of its group', async () => {
    const polymer = await addPolymer()
    const { polymers } = (await client.get(`/api/groups/${group.groupId}/polymers`)).body as {
      polymers: Polymer[]
    }
    expect(polymers[0].id).toBe(polymer.id)
    expect(new Set(polymers.map(({ groupId }) => groupId))).toEqual(new Set([group.groupId]))
  })

  it('changes over the revision one started from, and only over that', async () => {
    const { id } = await addPolymer()
    const changed = await client.patch(`/api/polymers/${id}`, {
      revision: 1,
      name: 'New name',
      smiles: '*CCO*',
    })
    expect(changed.body).toMatchObject({ name: 'New name', formula: 'C2H4O', revision: 2 })
    const late = await client.patch(`/api/polymers/${id}`, { revision: 1, notes: 'Too late' })
    expect(late.status).toBe(409)
    expect(late.body).toMatchObject({
      code: 'CONFLICT',
      details: { name: 'New name', revision: 2, notes: '' },
    })
  })

  it('keeps its SMILES once a mapping stands on it', async () => {
    const { polymerId } = await buildJob(server.services, group.modeller.member, { joint: false })
    const response = await client.patch(`/api/polymers/${polymerId}`, { revision: 1, smiles: '*CC*' })
    expect(response.status).toBe(409)
    expect(response.body).toMatchObject({ code: 'IN_USE', field: 'smiles' })
    const same = await client.patch(`/api/polymers/${polymerId}`, {
      revision: 1,
      smiles: SMILES,
      notes: 'Fine',
    })
    expect(same.body).toMatchObject({ notes: 'Fine', revision: 2 })
  })

  it('takes everything that stands on it along when it is deleted', async () => {
    const job = await buildJob(server.services, group.modeller.member)
    await server.services.jointDistributions.decide(group.modeller.member, job.jointDistributionId, {
      choice: 'joint',
      reason: 'For the test.',
    })
    const polymer = await client.get(`/api/polymers/${job.polymerId}`)
    expect(polymer.body).toMatchObject({
      counts: { statePoints: 1, mappings: 1, distributions: 1, potentials: 1 },
    })
    const before = await rowCounts()
    expect((await client.delete(`/api/polymers/${job.polymerId}`)).status).toBe(204)
    const after = await rowCounts()
    const gone = Object.fromEntries(Object.keys(before).map((table) => [table, before[table] - after[table]]))
    expect(gone).toEqual({
      decision: 1,
      distribution: 1,
      joint_distribution: 1,
      mapping: 1,
      polymer: 1,
      potential: 1,
      source_file: 2,
      state_point: 1,
      term: job.terms.length,
    })
    expect((await client.get(`/api/polymers/${job.polymerId}`)).status).toBe(404)
  })
})

async function rowCounts(): Promise<Record<string, number>> {
  const tables = [
    'decision',
    'distribution',
    'joint_distribution',
    'mapping',
    'polymer',
    'potential',
    'source_file',
    'state_point',
    'term',
  ]
  const counts: Record<string, number> = {}
  for (const table of tables) {
    const rows: { count: number }[] = await server.dataSource.query(
      `select count(*)::int as count from "${table}"`,
    )
    counts[table] = rows[0].count
  }
  return counts
}

describe('a state point', () => {
  const path = async (): Promise<string> => `/api/polymers/${(await addPolymer()).id}/state-points`

  it('needs a temperature above zero and nothing else', async () => {
    const points = await path()
    const created = await client.post(points, { temperature: 298.15 })
    expect(created.status).toBe(201)
    expect(created.body).toMatchObject({ temperature: 298.15, pressure: null, phase: '', distributions: 0 })
    for (const temperature of [0, -1, null, '300', 1e9]) {
      const response = await client.post(points, { temperature })
      expect([temperature, response.status]).toEqual([temperature, 400])
      expect(response.body).toMatchObject({ field: 'temperature' })
    }
  })

  it('is listed from cold to hot', async () => {
    const points = await path()
    for (const temperature of [450, 300, 400]) await client.post(points, { temperature })
    const { statePoints } = (await client.get(points)).body as { statePoints: StatePoint[] }
    expect(statePoints.map(({ temperature }) => temperature)).toEqual([300, 400, 450])
  })

  it('keeps its temperature once data stand on it; all else may change', async () => {
    const { statePointId } = await buildJob(server.services, group.modeller.member, { joint: false })
    const hotter = await client.patch(`/api/state-points/${statePointId}`, { revision: 1, temperature: 500 })
    expect(hotter.status).toBe(409)
    expect(hotter.body).toMatchObject({ code: 'IN_USE', field: 'temperature' })
    const noted = await client.patch(`/api/state-points/${statePointId}`, {
      revision: 1,
      pressure: 1,
      temperature: 400,
    })
    expect(noted.body).toMatchObject({ pressure: 1, temperature: 400, revision: 2, distributions: 1 })
  })

  it('is not saved over what someone else saved in between', async () => {
    const { id } = (await client.post(await path(), { temperature: 300 })).body as StatePoint
    await client.patch(`/api/state-points/${id}`, { revision: 1, phase: 'melt' })
    const late = await client.patch(`/api/state-points/${id}`, { revision: 1, phase: 'solution' })
    expect(late.status).toBe(409)
    expect(late.body).toMatchObject({ code: 'CONFLICT', details: { phase: 'melt', revision: 2 } })
  })

  it('goes when nothing stands on it, and stays while something does', async () => {
    const { statePointId } = await buildJob(server.services, group.modeller.member, { joint: false })
    const used = await client.delete(`/api/state-points/${statePointId}`)
    expect(used.status).toBe(409)
    expect(used.body).toMatchObject({ code: 'IN_USE' })
    const { id } = (await client.post(await path(), { temperature: 300 })).body as StatePoint
    expect((await client.delete(`/api/state-points/${id}`)).status).toBe(204)
    expect((await client.delete(`/api/state-points/${id}`)).status).toBe(404)
  })
})
