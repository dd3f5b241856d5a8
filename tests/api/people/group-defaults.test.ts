import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type Group, type GroupDefaults, HOUSE_DEFAULTS } from '@shared/contracts/group'
import type { HistoryPage } from '@shared/contracts/history'
import { type ApiServer, openApiServer } from '../../support/api-server'
import { buildGroup, type TestGroup } from '../../support/group-builder'

let server: ApiServer
let group: TestGroup
let path: string

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
  path = `/api/groups/${group.groupId}`
})

afterAll(() => server.close())

const current = async (): Promise<Group> => (await group.collaborator.client.get(path)).body as Group

const thresholds = (changes: Partial<GroupDefaults['thresholds']>): GroupDefaults => ({
  ...HOUSE_DEFAULTS,
  thresholds: { ...HOUSE_DEFAULTS.thresholds, ...changes },
})

describe('the defaults of a group', () => {
  it("are the house's until someone sets others", async () => {
    expect((await current()).defaults).toEqual(HOUSE_DEFAULTS)
  })

  it('are set by an owner, and each change is recorded with the value of before', async () => {
    const { revision } = await current()
    const defaults: GroupDefaults = {
      units: { length: 'angstrom', angle: 'radian', energy: 'kJ/mol' },
      thresholds: { ...HOUSE_DEFAULTS.thresholds, jointAbove: 0.2 },
    }
    const response = await group.owner.client.patch(path, { revision, name: 'Softer matter', defaults })
    expect(response.body).toMatchObject({ name: 'Softer matter', defaults, revision: revision + 1 })
    const history = (await group.reviewer.client.get(`${path}/history`)).body as HistoryPage
    const changes = history.events.filter(({ action }) => action === 'defaults changed')
    expect(changes.map(({ details }) => details).reverse()).toEqual([
      { what: 'length', old: 'nm', new: 'angstrom' },
      { what: 'angle', old: 'degree', new: 'radian' },
      { what: 'jointAbove', old: 0.1, new: 0.2 },
    ])
    expect(history.events.find(({ action }) => action === 'group renamed')?.details).toMatchObject({
      new: 'Softer matter',
    })
  })

  it.each([
    ['separableBelow', thresholds({ separableBelow: 0 })],
    ['separableBelow', thresholds({ separableBelow: 2, jointAbove: 2.5 })],
    ['jointAbove', thresholds({ jointAbove: 4 })],
    ['jointAbove', thresholds({ separableBelow: 0.2, jointAbove: 0.2 })],
    ['flatBelow', thresholds({ flatBelow: 0.01 })],
    ['flatBelow', thresholds({ flatBelow: 50 })],
  ])('are refused out of their range: %s', async (field, defaults) => {
    const { revision } = await current()
    const response = await group.owner.client.patch(path, { revision, defaults })
    expect([response.status, response.body]).toMatchObject([
      400,
      { code: 'VALIDATION_FAILED', field: `defaults.thresholds.${field}` },
    ])
  })

  it('do not overwrite what another owner set in between', async () => {
    const { revision } = await current()
    const change = { revision, defaults: thresholds({ flatBelow: 0.7 }) }
    const responses = await Promise.all([1, 2, 3].map(() => group.owner.client.patch(path, change)))
    expect(responses.map(({ status }) => status).sort()).toEqual([200, 409, 409])
    const refused = responses.find(({ status }) => status === 409)
    expect(refused?.body).toMatchObject({ code: 'CONFLICT', details: { revision: revision + 1 } })
  })
})
