import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { JointDistribution, Pair } from '@shared/contracts/distribution'
import { correlate, DEFAULT_SEED } from '@shared/correlation'
import { createJointHistogram } from '@shared/histogram'
import type { ApiClient, TextFile } from '../support/api-client'
import { type ApiServer, openApiServer } from '../support/api-server'
import { buildGroup, type TestGroup } from '../support/group-builder'
import { buildJob, JOINT_SETTINGS, type Job, jointFile, termId } from '../support/job-builder'

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

function bring(file: TextFile, changes: object = {}) {
  const { bondId, angleId, statePointId, mappingId } = job
  const upload = {
    firstTermId: bondId,
    secondTermId: angleId,
    statePointId,
    settings: JOINT_SETTINGS,
    ...changes,
  }
  return client.upload(`/api/mappings/${mappingId}/joint-distributions`, upload, file)
}

async function pairs(): Promise<Pair[]> {
  const response = await client.get(`/api/mappings/${job.mappingId}/pairs?statePoint=${job.statePointId}`)
  return (response.body as { pairs: Pair[] }).pairs
}

describe('a joint distribution', () => {
  it('is read by the server and kept with its file', async () => {
    const response = await bring(jointFile({ name: 'map.txt' }))
    expect(response.status).toBe(201)
    const joint = response.body as JointDistribution
    expect(joint).toMatchObject({
      kinds: ['bond', 'angle'],
      content: 'count',
      decision: null,
      file: { name: 'map.txt' },
    })
    expect([joint.xEdges.length, joint.yEdges.length, joint.weights.length]).toEqual([21, 21, 400])
    expect((await client.get(`/api/joint-distributions/${joint.id}`)).body).toEqual(joint)
  })

  it('has the verdict that the core gives, listed with its pair', async () => {
    const separable = (await bring(jointFile())).body as JointDistribution
    const [pair] = await pairs()
    expect(pair).toMatchObject({
      firstTermId: job.bondId,
      secondTermId: job.angleId,
      name: 'A–A · A–A–A',
      jointDistributionId: separable.id,
      numbers: { verdict: 'separable' },
      decision: null,
    })
    const coupled = (await bring(jointFile({ coupled: true }))).body as JointDistribution
    const [after] = await pairs()
    expect(after).toMatchObject({ jointDistributionId: coupled.id, numbers: { verdict: 'joint' } })
    const { kinds, xEdges, yEdges, weights, content, independentSamples } = coupled
    const histogram = createJointHistogram({ kinds, xEdges, yEdges, weights, content, independentSamples })
    const expected = correlate(histogram, { seed: DEFAULT_SEED, independentSamples })
    expect(after.numbers).toEqual({
      verdict: expected.verdict,
      mutualInformation: expected.mutualInformation,
      mutualInformationCorrected: expected.mutualInformationCorrected,
      nullMean: expected.nullMean,
      pValue: expected.pValue,
      independentSamples: expected.independentSamples,
      nullPercentile99: expected.nullPercentile99,
      basinsBeyondProduct: expected.basins?.mapOnly ?? null,
    })
  })

  it('of a density without a number of samples stays undecided', async () => {
    const settings = { ...JOINT_SETTINGS, value: 'density' }
    expect((await bring(jointFile({ coupled: true }), { settings })).status).toBe(201)
    expect((await pairs())[0].numbers).toMatchObject({
      verdict: 'undecided',
      mutualInformationCorrected: null,
      pValue: null,
      independentSamples: null,
    })
  })

  it('takes a decision with its reason and the numbers that stood beside it, and keeps earlier ones', async () => {
    const { id } = (await bring(jointFile({ coupled: true }))).body as JointDistribution
    const path = `/api/joint-distributions/${id}/decision`
    await client.put(path, { choice: 'joint', reason: 'They move together.' })
    const second = await client.put(path, { choice: 'change mapping', reason: 'Five beads will do better.' })
    expect(second.body).toMatchObject({
      decision: {
        choice: 'change mapping',
        reason: 'Five beads will do better.',
        decidedBy: { name: 'The modeller' },
        numbers: { verdict: 'joint' },
      },
    })
    expect((await pairs())[0].decision).toBe('change mapping')
    const rows: { choice: string }[] = await server.dataSource.query(
      'select "choice" from "decision" where "joint_distribution_id" = $1 order by "decided_at"',
      [id],
    )
    expect(rows.map(({ choice }) => choice)).toEqual(['joint', 'change mapping'])
    const without = await client.put(path, { choice: 'joint', reason: ' ' })
    expect(without.status).toBe(400)
    expect(without.body).toMatchObject({ field: 'reason' })
  })

  it('that is replaced takes no decision along to the new data', async () => {
    const { id } = (await bring(jointFile())).body as JointDistribution
    await client.put(`/api/joint-distributions/${id}/decision`, { choice: 'separate', reason: 'Separable.' })
    await bring(jointFile({ coupled: true }))
    expect((await pairs())[0]).toMatchObject({ decision: null })
    expect((await client.get(`/api/joint-distributions/${id}`)).body).toMatchObject({
      decision: { choice: 'separate' },
    })
  })

  it('goes with its file and decisions', async () => {
    const { id } = (await bring(jointFile())).body as JointDistribution
    await client.put(`/api/joint-distributions/${id}/decision`, { choice: 'separate', reason: 'Separable.' })
    expect((await client.delete(`/api/joint-distributions/${id}`)).status).toBe(204)
    expect((await client.get(`/api/joint-distributions/${id}/file`)).status).toBe(404)
    expect((await pairs())[0]).toMatchObject({ jointDistributionId: null, numbers: null })
  })

  it('is refused with the line when its file is wrong, and nothing is stored', async () => {
    const { text } = jointFile()
    const lines = text.split('\n')
    lines[3] = '0.200 106 -4'
    const response = await bring({ name: 'wrong.txt', text: lines.join('\n') })
    expect(response.status).toBe(422)
    expect(response.body).toMatchObject({ code: 'COUNT_NEGATIVE', line: 4, column: 3 })
    lines[3] = lines[2]
    const twice = await bring({ name: 'wrong.txt', text: lines.join('\n') })
    expect(twice.body).toMatchObject({ code: 'BINS_OVERLAP', line: 4 })
    expect((await pairs())[0]).toMatchObject({ jointDistributionId: null })
  })

  it('is of two different terms whose kinds are those of the file', async () => {
    const same = await bring(jointFile(), {
      secondTermId: job.bondId,
      settings: { ...JOINT_SETTINGS, kinds: ['bond', 'bond'], units: ['nm', 'nm'] },
    })
    expect(same.status).toBe(400)
    expect(same.body).toMatchObject({ field: 'secondTermId' })
    const swapped = await bring(jointFile(), { firstTermId: job.angleId, secondTermId: job.bondId })
    expect(swapped.status).toBe(400)
    expect(swapped.body).toMatchObject({ field: 'settings.kinds' })
  })

  it('is found under its pair whichever term was named first', async () => {
    const { text } = jointFile()
    const swapped = text.replace(/^(\S+) (\S+) /gm, '$2 $1 ')
    const settings = { ...JOINT_SETTINGS, kinds: ['angle', 'bond'], units: ['degree', 'nm'] }
    const response = await bring(
      { name: 'swapped.txt', text: swapped },
      { firstTermId: job.angleId, secondTermId: job.bondId, settings },
    )
    expect(response.status, response.text).toBe(201)
    const { id } = response.body as JointDistribution
    expect((await pairs()).find(({ jointDistributionId }) => jointDistributionId === id)).toMatchObject({
      firstTermId: job.angleId,
      secondTermId: job.bondId,
    })
  })

  it('is one when several are brought in at the same moment', async () => {
    const responses = await Promise.all([1, 2, 3].map((each) => bring(jointFile({ name: `map${each}.txt` }))))
    expect(responses.map(({ status }) => status)).toEqual([201, 201, 201])
    const [{ count }]: { count: number }[] = await server.dataSource.query(
      'select count(*)::int as count from "joint_distribution" where "mapping_id" = $1 and "superseded_at" is null',
      [job.mappingId],
    )
    expect(count).toBe(1)
  })
})

describe('the pairs of a mapping', () => {
  it('are bonds and angles that share a bead, those first whose bond is a side of the angle, then all other kinds', async () => {
    const all = await pairs()
    const names = all.map(({ name }) => name)
    expect(names.slice(0, 4)).toEqual(['A–A · A–A–A', 'A–A · A–A–B', 'A–B · A–A–B', 'A–B · A–A–A'])
    expect(all[0].firstTermId).toBe(termId(job.terms, 'A–A'))
    const kindOf = (id: string) => job.terms.find((term) => term.id === id)?.kind
    const kinds = all.map(({ firstTermId, secondTermId }) => `${kindOf(firstTermId)} ${kindOf(secondTermId)}`)
    const blocks = kinds.filter((kind, index) => kind !== kinds[index - 1])
    // Each combination in one block, and none of a term with itself.
    expect(blocks).toEqual([
      'bond angle',
      'bond bond',
      'angle angle',
      'angle dihedral',
      'dihedral dihedral',
      'bond dihedral',
    ])
    expect(all.every(({ firstTermId, secondTermId }) => firstTermId !== secondTermId)).toBe(true)
  })

  it('of two angles, and of a dihedral with an angle, take their data and get a verdict', async () => {
    const all = await pairs()
    const termOf = (id: string) => job.terms.find((term) => term.id === id)!
    for (const wanted of ['angle angle', 'angle dihedral']) {
      const pair = all.find(
        ({ firstTermId, secondTermId }) =>
          `${termOf(firstTermId).kind} ${termOf(secondTermId).kind}` === wanted,
      )!
      const { text } = jointFile()
      const degrees = text.replace(/^(\d\S*) /gm, (_, bond: string) => `${Math.round(Number(bond) * 400)} `)
      const kinds = wanted.split(' ')
      const response = await bring(
        { name: `${kinds.join('-')}.txt`, text: degrees },
        {
          firstTermId: pair.firstTermId,
          secondTermId: pair.secondTermId,
          settings: { ...JOINT_SETTINGS, kinds, units: ['degree', 'degree'] },
        },
      )
      expect(response.status, response.text).toBe(201)
      const { id } = response.body as JointDistribution
      const known = (await pairs()).find(({ jointDistributionId }) => jointDistributionId === id)
      expect(known?.numbers?.verdict).toBeDefined()
    }
  })
})
