import { afterEach, describe, expect, it } from 'vitest'
import type { DataSource } from 'typeorm'
import { createDataSource, migrate } from '../../server/data-source'
import type { TestDatabase } from '../support/databases'
import { createEmptyTestDatabase } from '../support/test-database'

let database: TestDatabase
let open: DataSource[] = []

async function connect(): Promise<DataSource> {
  const dataSource = await createDataSource(database.url).initialize()
  open.push(dataSource)
  return dataSource
}

afterEach(async () => {
  for (const dataSource of open) await dataSource.destroy()
  open = []
  await database.drop()
})

/** Names of tables, sequences, types and functions in the schema. */
async function objects(dataSource: DataSource): Promise<string[]> {
  const rows: { name: string }[] = await dataSource.query(
    `select relname as name from pg_class where relnamespace = 'public'::regnamespace and relkind <> 'i'
     union select typname from pg_type where typnamespace = 'public'::regnamespace
     union select proname from pg_proc where pronamespace = 'public'::regnamespace`,
  )
  return rows.map(({ name }) => name).filter((name) => !/^_?migration/.test(name))
}

async function appliedMigrations(dataSource: DataSource): Promise<number> {
  const rows: unknown[] = await dataSource.query('select * from "migration"')
  return rows.length
}

describe('the migrations', () => {
  it('make the schema that the entities describe, to the last name', async () => {
    database = await createEmptyTestDatabase()
    const dataSource = await connect()
    await migrate(dataSource)
    const { upQueries } = await dataSource.driver.createSchemaBuilder().log()
    expect(upQueries.map(({ query }) => query)).toEqual([])
  })

  it('leave nothing behind when all of them are taken back', async () => {
    database = await createEmptyTestDatabase()
    const dataSource = await connect()
    await migrate(dataSource)
    expect(await objects(dataSource)).toContain('polymer')
    while ((await appliedMigrations(dataSource)) > 0) await dataSource.undoLastMigration()
    expect(await objects(dataSource)).toEqual([])
  })

  it('run once when several servers start at the same time', async () => {
    database = await createEmptyTestDatabase()
    const sources = await Promise.all([connect(), connect(), connect()])
    await Promise.all(sources.map(migrate))
    expect(await appliedMigrations(sources[0])).toBe(sources[0].migrations.length)
  })

  it('do nothing on a database that is up to date', async () => {
    database = await createEmptyTestDatabase()
    const dataSource = await connect()
    await migrate(dataSource)
    await migrate(dataSource)
    expect(await dataSource.showMigrations()).toBe(false)
  })
})
