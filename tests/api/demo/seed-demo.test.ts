import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { DataSource } from 'typeorm'
import { createDataSource } from '../../../server/data-source'
import { seedDemo } from '../../../server/demo/seed-demo'
import { createServices, type Member, type Services } from '../../../server/services'
import type { TestDatabase } from '../../support/databases'
import { createTestDatabase } from '../../support/test-database'

let database: TestDatabase
let dataSource: DataSource
let services: Services

beforeAll(async () => {
  database = await createTestDatabase()
  dataSource = await createDataSource(database.url).initialize()
  services = createServices(dataSource, { demo: true, version: 'test', tray: false, linkTo: (path) => path })
})

afterAll(async () => {
  await dataSource.destroy()
  await database.drop()
})

async function demoMember(): Promise<Member> {
  const modeller = (await services.sessions.demoUsers()).find(({ role }) => role === 'modeller')!
  const { memberships } = (await services.sessions.describe(modeller.id))!
  return { groupId: memberships[0].groupId, userId: modeller.id, role: 'modeller' }
}

/** The tests share one database and follow one another: seeding is the slowest part of them. */
describe('seedDemo', () => {
  it('makes the demonstration again when it was cut short, and one when two servers start at once', async () => {
    const broken: Services = {
      ...services,
      potentials: new Proxy(services.potentials, {
        get: () => () => Promise.reject(new Error('cut short')),
      }),
    }
    await expect(seedDemo(dataSource, broken)).rejects.toThrow('cut short')
    const outcomes = await Promise.all([seedDemo(dataSource, services), seedDemo(dataSource, services)])
    expect(outcomes.toSorted()).toEqual(['already there', 'seeded'])
    expect(await services.polymers.list(await demoMember())).toHaveLength(1)
    expect(await services.sessions.demoUsers()).toHaveLength(4)
    // Seeds twice, and sets a data sheet in type each time.
  }, 60_000)

  it('fills an empty database with two mappings whose every term has data at both state points', async () => {
    const member = await demoMember()
    const [polymer] = await services.polymers.list(member)
    expect(polymer.demo).toBe(true)
    expect(polymer.formula).toBe('C9H16O2')
    const points = await services.statePoints.list(member, polymer.id)
    expect(points.map(({ temperature, phase }) => [temperature, phase])).toEqual([
      [400, 'melt'],
      [450, 'melt'],
    ])
    const mappings = await services.mappings.list(member, polymer.id)
    expect(mappings.map(({ name, counts }) => [name, counts.beads])).toEqual([
      ['3-to-1', 3],
      ['5-to-1', 5],
    ])
    for (const { id } of mappings) {
      const terms = (
        await Promise.all(points.map((point) => services.terms.list(member, id, point.id)))
      ).flat()
      expect(terms.filter(({ standing }) => standing === 'no data')).toEqual([])
    }
    const first = await services.terms.list(member, mappings[0].id, points[0].id)
    const standings = new Set(first.map(({ standing }) => standing))
    expect(standings).toEqual(new Set(['data', 'inverted']))
  })

  it('leaves a verdict on two pairs, a decision on the separable one, and the files as they came', async () => {
    const member = await demoMember()
    const [polymer] = await services.polymers.list(member)
    const [point] = await services.statePoints.list(member, polymer.id)
    const [threeToOne] = await services.mappings.list(member, polymer.id)
    const { pairs } = await services.pairs.list(member, threeToOne.id, point.id)
    const known = pairs.filter(({ jointDistributionId }) => jointDistributionId !== null)
    expect(known.map(({ numbers, decision }) => [numbers?.verdict, decision])).toEqual(
      expect.arrayContaining([
        ['joint', null],
        ['separable', 'separate'],
      ]),
    )
    expect(known).toHaveLength(2)
    const file = await services.jointDistributions.file(member, known[0].jointDistributionId!)
    expect(new TextDecoder().decode(file.bytes)).toMatch(/^# INVENTED data/)
  })

  it('shows side by side that the hexyl bond of 3-to-1 is many-peaked, and what 5-to-1 costs', async () => {
    const member = await demoMember()
    const [polymer] = await services.polymers.list(member)
    const [point] = await services.statePoints.list(member, polymer.id)
    const ids = (await services.mappings.list(member, polymer.id)).map(({ id }) => id)
    const { mappings, summary } = await services.comparisons.compare(member, polymer.id, ids, point.id)
    const [coarse, fine] = mappings
    const hexyl = coarse.terms.find(({ name }) => name === 'E–H')
    expect(hexyl).toMatchObject({ kind: 'bond', coverage: 'here', problem: null })
    expect(hexyl?.basins?.count).toBeGreaterThan(1)
    const bonds = fine.terms.filter(({ kind }) => kind === 'bond')
    expect(bonds.map(({ basins }) => basins?.count)).toEqual(bonds.map(() => 1))
    expect(summary).toHaveLength(1)
    expect(summary[0]).toMatch(/In 3-to-1 the bond E–H has \d+ basins deeper than 0\.5 kT/)
    expect(summary[0]).toContain('5-to-1 costs 2 beads more per unit')
    // The joint potential of the hexyl bond is what the finer mapping does without.
    expect([coarse.pairs.length, fine.pairs.length]).toEqual([2, 9])
    expect(coarse.coupling).toBeGreaterThan(0.3)
    expect(fine.coupling).toBeLessThan(0.05)
    expect(summary[0]).toMatch(
      /Correlation left behind: 0\.\d+ nats over 2 pairs in 3-to-1, [\d.e-]+ nats over 9 pairs in 5-to-1\./,
    )
    // (5/3)² pairs per step, at one density.
    expect([coarse.cost, fine.cost]).toEqual([1, (5 / 3) ** 2])
    expect(mappings.flatMap(({ terms }) => terms.map(({ coverage }) => coverage))).not.toContain('missing')
  })

  it('offers one person per role, none of whom has a password', async () => {
    const people = await services.sessions.demoUsers()
    expect(people.map(({ role }) => role).toSorted()).toEqual([
      'collaborator',
      'modeller',
      'owner',
      'reviewer',
    ])
    await expect(services.sessions.signIn('owner.demo@example.org', '')).rejects.toMatchObject({
      code: 'SIGN_IN_FAILED',
    })
  })

  it('shows one hand-over that is out and one that waits for its reviewer', async () => {
    const member = await demoMember()
    const [polymer] = await services.polymers.list(member)
    const handOvers = await services.handOvers.list(member, polymer.id)
    expect(handOvers.map(({ standing, number }) => [standing, number])).toEqual([
      ['in review', null],
      ['released', 1],
    ])
    const review = await services.handOvers.get(member, handOvers[0].id)
    expect(review.changed).toBe(false)
    expect(review.checklist.filter(({ met }) => !met)).toEqual([])
  })

  it('does nothing the second time, when someone deleted it, or beside a group that is there', async () => {
    expect(await seedDemo(dataSource, services)).toBe('already there')
    const member = await demoMember()
    await dataSource.query('delete from "group" where "id" = $1', [member.groupId])
    expect(await seedDemo(dataSource, services)).toBe('already there')
    await dataSource.query('delete from "setting"')
    const owner = { name: 'Ada', email: 'ada@example.org', role: 'owner', password: 'long enough 1' } as const
    await services.groups.found({ name: 'Real', demo: false, people: [owner] })
    expect(await seedDemo(dataSource, services)).toBe('groups there')
  })
})
