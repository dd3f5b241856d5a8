import request from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Received } from '@shared/contracts/delivery'
import { builtInLayout } from '@shared/layouts'
import { DEFAULT_INVERSION_SETTINGS } from '@shared/inversion'
import { type ApiServer, openApiServer } from '../../support/api-server'
import { receivedToken, sendTo } from '../../support/delivery-builder'
import { buildGroup, type TestGroup } from '../../support/group-builder'
import { answerWarnings } from '../../support/hand-over-builder'
import { ANGLE_SETTINGS, angleFile, buildJob, uploaded } from '../../support/job-builder'
import { newAddress } from '../../support/mail-texts'

let server: ApiServer
let group: TestGroup
let token: string

/** Releases a hand-over of a bond and an angle that share a joint table, and sends it. */
async function deliverJoint(): Promise<string> {
  const { services } = server
  const { modeller, reviewer } = group
  const { member } = modeller
  const job = await buildJob(services, member)
  const { polymerId, mappingId, statePointId, bondId, angleId, jointDistributionId } = job
  await services.distributions.add(
    member,
    angleId,
    { statePointId, settings: ANGLE_SETTINGS },
    uploaded(angleFile()),
  )
  await services.potentials.save(member, angleId, {
    statePointId,
    revision: null,
    settings: DEFAULT_INVERSION_SETTINGS,
  })
  const decision = { choice: 'joint', reason: 'They move together.' } as const
  await services.jointDistributions.decide(member, jointDistributionId, decision)
  const what = { mappingId, statePointId, title: 'Joint', notes: '' }
  const { id, revision } = await services.handOvers.create(member, polymerId, what)
  const leftOut = job.terms
    .filter((term) => term.id !== bondId && term.id !== angleId)
    .map((term) => ({ termId: term.id, reason: 'Not asked for.' }))
  const selection = { version: 1 as const, leftOut, apart: [] }
  await answerWarnings(services, member, await services.handOvers.update(member, id, { revision, selection }))
  const draft = await services.handOvers.get(member, id)
  const reviewerId = reviewer.member.userId
  const asked = await services.reviews.ask(member, id, { revision: draft.revision, reviewerId, note: '' })
  const signed = await services.reviews.decide(reviewer.member, id, {
    outcome: 'signed off',
    revision: asked.revision,
    note: '',
  })
  await services.releases.release(member, id, signed.revision)
  const email = newAddress()
  await sendTo(server, group, id, email)
  return receivedToken(server, email)
}

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
  token = await deliverJoint()
}, 90_000)

afterAll(() => server.close())

const textOf = async (call: request.Test): Promise<string> => {
  const response = await call.buffer(true)
  expect(response.status, response.text).toBe(200)
  return Buffer.from(response.body as Buffer).toString()
}
const rowsOf = (text: string): number[][] =>
  text
    .split('\n')
    .filter((line) => line.trim() !== '' && !line.startsWith('#'))
    .map((line) =>
      line
        .trim()
        .split(/[\s,]+/)
        .map(Number),
    )

describe('a joint table of a hand-over', () => {
  it('comes in another layout with the numbers, the ranges and the words that were released', async () => {
    const page = (await request(server.app).get(`/api/received/${token}`)).body as Received
    expect(page.tables.map(({ kinds }) => kinds)).toEqual([['bond', 'angle']])
    const file = `/api/received/${token}/file?path=${page.tables[0].path}`
    const released = await textOf(request(server.app).get(file))
    const again = await textOf(request(server.app).get(`${file}&layout=three-columns`))
    expect(rowsOf(again)).toEqual(rowsOf(released))
    const measured = (text: string) => text.split('\n').find((line) => line.startsWith('# measured'))
    expect(measured(again)).toBe(measured(released))
    expect(measured(released)).toMatch(/x from .* nm, y from .* deg/)
    const other = `${file}&layout=four-columns-comma&length=angstrom&energy=kcal%2Fmol`
    const scaled = rowsOf(await textOf(request(server.app).get(other)))
    const [first, last] = [rowsOf(released)[0], rowsOf(released).at(-1) ?? []]
    for (const [row, original] of [
      [scaled[0], first],
      [scaled.at(-1) ?? [], last],
    ]) {
      expect(row[1]).toBeCloseTo(original[0] * 10, 5)
      expect(row[2]).toBeCloseTo(original[1], 5)
      // Seven digits are written; 4.184 kJ are a kcal by definition.
      expect(row[3] / (original[2] / 4.184)).toBeCloseTo(1, 5)
    }
  })

  it('comes in a layout of the recipient’s own', async () => {
    const layout = builtInLayout('json', { length: 'nm', angle: 'radian', energy: 'kT' })
    const answer = await request(server.app)
      .post(`/api/received/${token}/written`)
      .send({ name: 'Ours', document: layout })
    expect(answer.status, answer.text).toBe(200)
    expect(answer.body).toMatchObject({
      tables: [{ written: expect.stringMatching(/^joint_.*\.json$/) as string }],
    })
  })
})
