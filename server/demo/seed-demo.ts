import type { DataSource } from 'typeorm'
import { Group } from '../entities/group.entity'
import { Setting } from '../entities/setting.entity'
import { User } from '../entities/user.entity'
import type { Services } from '../services'
import { writeDemo } from './write-demo'

/** Whoever holds this lock seeds: two servers that start on one database make one demonstration. */
const SEED_LOCK = 4_300_102

const MARKER = 'demo'

/** What seeding found and did. */
export type SeedOutcome = 'seeded' | 'already there' | 'groups there'

/**
 * Seeds the demonstration into a database without groups. A marker is set before and changed after, so that a seeding that
 * was cut short is taken away and done again at the next start, and a demonstration that someone deleted does not return.
 *
 * @throws whatever writing throws; the marker then stays as it is
 */
export async function seedDemo(dataSource: DataSource, services: Services): Promise<SeedOutcome> {
  const runner = dataSource.createQueryRunner()
  await runner.query('select pg_advisory_lock($1)', [SEED_LOCK])
  try {
    return await seedLocked(dataSource, services)
  } finally {
    await runner.query('select pg_advisory_unlock($1)', [SEED_LOCK])
    await runner.release()
  }
}

async function seedLocked(dataSource: DataSource, services: Services): Promise<SeedOutcome> {
  const marker = await readMarker(dataSource)
  if (marker === 'seeded') return 'already there'
  if (marker === 'seeding') await removeDemo(dataSource)
  else if (await services.groups.exists()) return 'groups there'
  await writeMarker(dataSource, 'seeding')
  await writeDemo(services)
  await writeMarker(dataSource, 'seeded')
  return 'seeded'
}

async function readMarker(dataSource: DataSource): Promise<string | null> {
  const found = await dataSource.manager.findOne(Setting, {
    where: { key: MARKER },
    select: { key: true, value: true },
  })
  return found?.value ?? null
}

async function writeMarker(dataSource: DataSource, value: 'seeding' | 'seeded'): Promise<void> {
  await dataSource.manager.upsert(Setting, { key: MARKER, value }, ['key'])
}

/** Takes away what a seeding left that was cut short: everything hangs on the group. */
async function removeDemo(dataSource: DataSource): Promise<void> {
  await dataSource.transaction(async (manager) => {
    await manager.delete(Group, { demo: true })
    await manager.delete(User, { demo: true })
  })
}
