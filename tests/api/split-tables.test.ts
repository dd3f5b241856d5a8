import { strFromU8, unzipSync } from 'fflate'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { setPooling } from '@shared/mapping'
import { DEFAULT_INVERSION_SETTINGS } from '@shared/inversion'
import { type ApiServer, openApiServer } from '../support/api-server'
import { buildGroup, type TestGroup } from '../support/group-builder'
import {
  ANGLE_SETTINGS,
  angleFile,
  buildJob,
  DOCUMENT,
  type Job,
  termId,
  uploaded,
} from '../support/job-builder'

let server: ApiServer
let group: TestGroup
let job: Job
let files: Record<string, string>
const UNITS = { length: 'nm', angle: 'degree', energy: 'kJ/mol' } as const

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
  const { member } = group.modeller
  const { services } = server
  job = await buildJob(services, member, { joint: false })
  const document = setPooling(DOCUMENT, ['A', 'A', 'B'], 'split')
  await services.mappings.update(member, job.mappingId, { revision: 1, name: 'Two beads', document })
  const terms = await services.terms.list(member, job.mappingId, null)
  for (const name of ['A–A–B (1)', 'A–A–B (2)']) {
    const id = termId(terms, name)
    const { statePointId } = job
    const upload = { statePointId, settings: ANGLE_SETTINGS }
    await services.distributions.add(member, id, upload, uploaded(angleFile()))
    await services.potentials.save(member, id, {
      statePointId,
      revision: null,
      settings: DEFAULT_INVERSION_SETTINGS,
    })
  }
  const { bytes } = await services.tables.archive(member, job.mappingId, job.statePointId, UNITS)
  files = Object.fromEntries(Object.entries(unzipSync(bytes)).map(([name, text]) => [name, strFromU8(text)]))
})
afterAll(() => server.close())

describe('tables of a sequence that is split by its places', () => {
  it('carry the place in their names', () => {
    expect(Object.keys(files).sort()).toEqual([
      'README.txt',
      'angle_A-A-B_place1_400K.txt',
      'angle_A-A-B_place2_400K.txt',
      'bond_A-A_400K.txt',
    ])
  })

  it('say in their comment lines which of the terms they are', () => {
    const [first, second] = [1, 2].map((place) => files[`angle_A-A-B_place${place}_400K.txt`])
    expect(first).toContain('A–A–B (1)')
    expect(second).toContain('A–A–B (2)')
    const order = (text: string): string | undefined => /^# .*bead order.*$/im.exec(text)?.[0]
    expect(order(first)).toBeDefined()
    expect(order(first)).not.toBe(order(second))
  })

  it('are explained in the README', () => {
    expect(files['README.txt']).toContain('angle A–A–B (1)')
    expect(files['README.txt']).toContain('Terms with a number')
  })

  it('have the same names alone', async () => {
    const { member } = group.modeller
    const id = termId(await server.services.terms.list(member, job.mappingId, null), 'A–A–B (2)')
    const { fileName } = await server.services.tables.forTerm(member, id, job.statePointId, UNITS)
    expect(fileName).toBe('angle_A-A-B_place2_400K.txt')
  })
})
