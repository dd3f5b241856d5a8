import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { HistoryEvent, HistoryPage } from '@shared/contracts/history'
import { recordEvent } from '../../../server/services/record-event'
import { type ApiServer, openApiServer } from '../../support/api-server'
import { buildGroup, type TestGroup } from '../../support/group-builder'
import { buildJob } from '../../support/job-builder'

let server: ApiServer
let group: TestGroup
let path: string

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
  path = `/api/groups/${group.groupId}/history`
})

afterAll(() => server.close())

async function ask(query = ''): Promise<HistoryPage> {
  const response = await group.reviewer.client.get(`${path}?${query}`)
  expect(response.status, response.text).toBe(200)
  return response.body as HistoryPage
}

const names = ({ events }: HistoryPage): string[] => events.map(({ subject }) => subject.name)

function record(name: string, by?: string): Promise<void> {
  const actor = { groupId: group.groupId, userId: by === undefined ? group.modeller.member.userId : null, by }
  const subject = { kind: 'polymer', id: null, name }
  return recordEvent(server.dataSource.manager, actor, {
    action: 'polymer changed',
    subject,
    details: { what: 'notes', count: 3 },
  })
}

describe('the history of a group', () => {
  it('begins with who founded it', async () => {
    const { events, more } = await ask('action=group%20founded')
    expect(more).toBe(false)
    expect(events).toMatchObject([
      { action: 'group founded', person: { name: 'The owner' }, by: null, subject: { kind: 'group' } },
    ])
  })

  it('can be searched by person, action, subject and time, all at once', async () => {
    await record('Poly(100%_ethylene)')
    await record('Poly(styrene)', 'a key')
    const modeller = `person=${group.modeller.member.userId}`
    expect(names(await ask(modeller))).toEqual(['Poly(100%_ethylene)'])
    expect(names(await ask('action=polymer%20changed'))).toEqual(['Poly(styrene)', 'Poly(100%_ethylene)'])
    expect(names(await ask('subject=100%25_ETHYL'))).toEqual(['Poly(100%_ethylene)'])
    expect(names(await ask('subject=%25'))).toEqual(['Poly(100%_ethylene)'])
    const [event] = (await ask('subject=styrene')).events
    expect(event).toMatchObject({ person: null, by: 'a key', details: { what: 'notes', count: 3 } })
    const later = new Date(Date.parse(event.at) + 1).toISOString()
    expect(names(await ask(`from=${event.at}&to=${later}&subject=styrene`))).toEqual(['Poly(styrene)'])
    expect(names(await ask(`from=${later}&subject=styrene`))).toEqual([])
    expect(names(await ask(`to=${event.at}&subject=styrene`))).toEqual([])
  })

  it('comes in pages that hold every event once', async () => {
    for (let number = 0; number < 120; number++) await record(`Many ${number}`)
    const seen: HistoryEvent[] = []
    let page = await ask('subject=many')
    seen.push(...page.events)
    while (page.more) {
      page = await ask(`subject=many&before=${seen[seen.length - 1].id}`)
      seen.push(...page.events)
    }
    expect(seen.map(({ subject }) => subject.name)).toEqual(
      Array.from({ length: 120 }, (_, index) => `Many ${119 - index}`),
    )
  })

  it.each(['person=x', 'action=gone', 'from=yesterday', 'before=x', 'before=-1'])(
    'refuses to be searched by %s',
    async (query) => {
      const response = await group.owner.client.get(`${path}?${query}`)
      expect([response.status, response.body]).toMatchObject([400, { code: 'VALIDATION_FAILED' }])
    },
  )

  it('shows nothing of another group', async () => {
    const other = await buildGroup(server)
    const page = (await other.owner.client.get(`/api/groups/${other.groupId}/history`)).body as HistoryPage
    expect(page.events.map(({ action }) => action)).toEqual(['group founded'])
  })

  it('keeps what was done when whoever did it is gone', async () => {
    const other = await buildGroup(server)
    const founder = other.owner.member.userId
    await server.dataSource.query(
      `update "membership" set "role" = 'owner' where "group_id" = $1 and "user_id" = $2`,
      [other.groupId, other.modeller.member.userId],
    )
    await server.dataSource.query('delete from "user" where "id" = $1', [founder])
    const page = (await other.modeller.client.get(`/api/groups/${other.groupId}/history`)).body as HistoryPage
    expect(page.events).toMatchObject([{ action: 'group founded', person: null }])
  })

  it('is exported as CSV in which nothing runs', async () => {
    await record('=1+1')
    await record('@SUM(A1)', '+1')
    await record('-2, "quoted"', '\t=1')
    const response = await group.owner.client.get(`${path}.csv?action=polymer%20changed`)
    expect(response.headers['content-type']).toContain('text/csv')
    expect(response.headers['content-disposition']).toContain('history.csv')
    const [head, ...lines] = response.text.trimEnd().split('\r\n')
    expect(head).toBe('time (UTC),person,by,action,kind,subject,details')
    const cells = lines.slice(0, 3).map((line) => line.replace(/^[^,]+,/, ''))
    expect(cells).toEqual([
      `"'\t'=1",,polymer changed,polymer,"'-2, ""quoted""","what: notes, count: 3"`,
      `'+1,,polymer changed,polymer,'@SUM(A1),"what: notes, count: 3"`,
      `The modeller,,polymer changed,polymer,'=1+1,"what: notes, count: 3"`,
    ])
    expect(lines).toHaveLength((await ask('action=polymer%20changed')).events.length === 50 ? 125 : 0)
  })
})

describe('the work of a group', () => {
  it('is recorded as it is done, with its subject as it was called then', async () => {
    const other = await buildGroup(server)
    const { member } = other.modeller
    const job = await buildJob(server.services, member)
    await server.services.jointDistributions.decide(member, job.jointDistributionId, {
      choice: 'separate',
      reason: 'They move on their own.',
    })
    await server.services.potentials.remove(member, job.potentialId)
    await server.services.distributions.update(member, job.distributionId, { independentSamples: 100 })
    await server.services.distributions.remove(member, job.distributionId)
    await server.services.jointDistributions.remove(member, job.jointDistributionId)
    await server.services.mappings.remove(member, job.mappingId)
    await server.services.statePoints.remove(member, job.statePointId)
    await server.services.polymers.remove(member, job.polymerId)
    const response = await other.reviewer.client.get(`/api/groups/${other.groupId}/history`)
    const { events } = response.body as HistoryPage
    expect(events.map(({ action }) => action).reverse()).toEqual([
      'group founded',
      'polymer added',
      'state point added',
      'mapping added',
      'data brought in',
      'potential saved',
      'data brought in',
      'decision recorded',
      'potential deleted',
      'data changed',
      'data deleted',
      'data deleted',
      'mapping deleted',
      'state point deleted',
      'polymer deleted',
    ])
    const saved = events.find(({ action }) => action === 'potential saved')
    expect(saved).toMatchObject({ person: { name: 'The modeller' }, subject: { kind: 'term' } })
    expect(saved?.details.temperature).toMatch(/^\d+ K$/)
  })

  it('is not recorded when it is refused', async () => {
    const other = await buildGroup(server)
    const { client } = other.modeller
    const polymers = `/api/groups/${other.groupId}/polymers`
    expect((await client.post(polymers, { name: 'One', smiles: '*CC*' })).status).toBe(201)
    expect((await client.post(polymers, { name: 'One', smiles: '*CC*' })).status).toBe(409)
    const response = await client.get(`/api/groups/${other.groupId}/history?action=polymer%20added`)
    expect((response.body as HistoryPage).events).toHaveLength(1)
  })
})
