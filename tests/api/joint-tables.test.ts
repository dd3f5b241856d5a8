import { createHash } from 'node:crypto'
import { strFromU8, unzipSync } from 'fflate'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { JointDistribution } from '@shared/contracts/distribution'
import { createJointHistogram } from '@shared/histogram'
import {
  DEFAULT_JOINT_SETTINGS,
  DEFAULT_JOINT_TABLE,
  formatJointRows,
  jointPotential,
  jointTable,
} from '@shared/joint-potential'
import type { ApiClient } from '../support/api-client'
import { type ApiServer, openApiServer } from '../support/api-server'
import { buildGroup, type TestGroup } from '../support/group-builder'
import { buildJob, JOINT_SETTINGS, type Job, jointFile, TEMPERATURE } from '../support/job-builder'

let server: ApiServer
let group: TestGroup
let client: ApiClient
let job: Job

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
  client = group.reviewer.client
  job = await buildJob(server.services, group.modeller.member, { joint: false })
})

afterAll(() => server.close())

/** Brings in the joint distribution of bond and angle, in place of the one before. */
async function bring(changes: object = {}): Promise<JointDistribution> {
  const upload = {
    firstTermId: job.bondId,
    secondTermId: job.angleId,
    statePointId: job.statePointId,
    settings: { ...JOINT_SETTINGS, ...changes },
  }
  const path = `/api/mappings/${job.mappingId}/joint-distributions`
  const response = await group.modeller.client.upload(path, upload, jointFile({ coupled: true }))
  expect(response.status, response.text).toBe(201)
  return response.body as JointDistribution
}

const decide = ({ id }: JointDistribution, choice: string) =>
  group.modeller.client.put(`/api/joint-distributions/${id}/decision`, {
    choice,
    reason: 'They move together.',
  })

const table = ({ id }: JointDistribution, units = '') =>
  client.get(`/api/joint-distributions/${id}/table${units}`)

const rowsOf = (text: string): string => text.replace(/^#.*\n/gm, '')

async function archive(): Promise<Record<string, string>> {
  const { bytes } = await server.services.tables.archive(
    group.reviewer.member,
    job.mappingId,
    job.statePointId,
    { length: 'nm', angle: 'degree', energy: 'kJ/mol' },
  )
  return Object.fromEntries(
    Object.entries(unzipSync(bytes)).map(([name, content]) => [name, strFromU8(content)]),
  )
}

describe('the table of a joint distribution', () => {
  it('holds the very numbers that the core works out from the stored counts, in the units asked for', async () => {
    const joint = await bring()
    const { surface } = jointPotential(createJointHistogram(joint), TEMPERATURE, DEFAULT_JOINT_SETTINGS)
    const expected = jointTable(surface, DEFAULT_JOINT_TABLE)
    for (const [units, coordinateUnits, energyUnit] of [
      ['', ['nm', 'degree'], 'kJ/mol'],
      ['?length=angstrom&angle=radian&energy=kT', ['angstrom', 'radian'], 'kT'],
    ] as const) {
      const response = await table(joint, units)
      expect(response.status, response.text).toBe(200)
      expect(rowsOf(response.text)).toBe(formatJointRows(expected, { coordinateUnits, energyUnit }))
    }
  })

  it('says what it is, where it comes from and what it wants, with the checksum of its rows', async () => {
    const { text, headers } = await table(await bring())
    for (const line of [
      'A–A (x) with A–A–A (y)',
      'state point: 400 K, melt',
      'Two beads, revision 1',
      createHash('sha256')
        .update(jointFile({ coupled: true }).text)
        .digest('hex'),
      createHash('sha256').update(rowsOf(text)).digest('hex'),
      'Validate it in a simulation',
    ]) {
      expect(text).toContain(line)
    }
    expect(headers['content-type']).toBe('text/plain; charset=utf-8')
    expect(headers['content-disposition']).toBe('attachment; filename=joint_A-A_A-A-A_400K.txt')
  })

  it('is refused for a density that nobody stated a number of samples for, and made where somebody did', async () => {
    const refused = await table(await bring({ value: 'density' }))
    expect(refused.status).toBe(422)
    expect(refused.body).toMatchObject({ code: 'SAMPLE_SIZE_UNKNOWN', field: 'independentSamples' })
    const made = await table(await bring({ value: 'density', independentSamples: 5000 }))
    expect(made.status).toBe(200)
    expect(made.text).toContain('5000 independent samples')
  })

  it('is refused in units that are none', async () => {
    const joint = await bring()
    for (const units of ['?length=inch', '?angle=gon', '?energy=eV']) {
      expect((await table(joint, units)).status).toBe(400)
    }
  })
})

describe('the archive of all tables', () => {
  it('holds the joint table of a pair that it was decided for, and explains it', async () => {
    const joint = await bring()
    expect(Object.keys(await archive())).not.toContain('joint_A-A_A-A-A_400K.txt')
    await decide(joint, 'joint')
    const files = await archive()
    expect(files['joint_A-A_A-A-A_400K.txt']).toBe((await table(joint)).text)
    const readme = files['README.txt']
    expect(readme).toContain('joint potential of bond A–A (x) with angle A–A–A (y)')
    expect(readme).toContain('in place of both single tables')
    await decide(joint, 'separate')
    expect(Object.keys(await archive())).not.toContain('joint_A-A_A-A-A_400K.txt')
  })

  it('says why a pair has none, and keeps the other tables', async () => {
    await decide(await bring({ value: 'density' }), 'joint')
    const files = await archive()
    expect(Object.keys(files)).toEqual(['README.txt', 'bond_A-A_400K.txt'])
    expect(files['README.txt']).toMatch(/decided for bond A–A with angle A–A–A, but there is no table/)
    expect(files['README.txt']).toMatch(/State the number of independent samples/)
  })
})
