import { chmodSync, mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import type { TestProject } from 'vitest/node'
import { createDataSource, migrate } from '../../server/data-source'
import { openCluster } from '../../server/start/cluster.mjs'
import { databaseUser } from '../../server/start/database-user.mjs'
import { ensurePostgres } from '../../server/start/postgres-programs.mjs'
import { createDatabase, type TestDatabase } from './databases'

interface TestPostgres {
  readonly databaseUrl: string
  readonly template: TestDatabase
  readonly close: () => Promise<void>
}

/** Each project loads this file anew, so what they share hangs on the process. */
const shared = globalThis as typeof globalThis & {
  beadwrightTestPostgres?: { users: number; readonly opened: Promise<TestPostgres> }
}

/**
 * One PostgreSQL for all projects of a run: that of TEST_DATABASE_URL, or a throw-away one that is fast and not durable.
 */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const postgres = (shared.beadwrightTestPostgres ??= { users: 0, opened: openPostgres() })
  postgres.users++
  const { databaseUrl, template, close } = await postgres.opened
  project.provide('databaseUrl', databaseUrl)
  project.provide('templateDatabase', template.name)
  return async () => {
    postgres.users--
    if (postgres.users > 0) return
    delete shared.beadwrightTestPostgres
    await close()
  }
}

async function openPostgres(): Promise<TestPostgres> {
  const given = process.env.TEST_DATABASE_URL
  const server = given ? { databaseUrl: given, close: () => Promise.resolve() } : await openThrowAwayCluster()
  try {
    const template = await createDatabase(server.databaseUrl, null)
    await bringUpToDate(template.url)
    return {
      databaseUrl: server.databaseUrl,
      template,
      close: async () => {
        await template.drop()
        await server.close()
      },
    }
  } catch (error) {
    await server.close()
    throw error
  }
}

async function openThrowAwayCluster() {
  const folder = mkdtempSync(join(tmpdir(), 'beadwright-test-'))
  chmodSync(folder, 0o755) // the database's user walks through
  const cluster = await openCluster({
    folder: join(folder, 'postgres'),
    installed: await ensurePostgres(),
    user: databaseUser(),
    logFile: join(folder, 'logs', 'postgres.log'),
    fast: true,
  })
  return {
    databaseUrl: cluster.superuserUrl,
    close: async () => {
      await cluster.close()
      rmSync(folder, { recursive: true, force: true })
    },
  }
}

async function bringUpToDate(url: string): Promise<void> {
  const dataSource = createDataSource(url)
  await dataSource.initialize()
  try {
    await migrate(dataSource)
  } finally {
    await dataSource.destroy()
  }
}
