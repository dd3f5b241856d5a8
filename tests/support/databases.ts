import { randomBytes } from 'node:crypto'
import { Client } from 'pg'

export interface TestDatabase {
  readonly name: string
  readonly url: string
  /** Removes the database. Close your own connections first: those still open are cut. */
  readonly drop: () => Promise<void>
}

/**
 * Creates a database with a name of its own.
 *
 * @param adminUrl of a role that may create databases
 * @param template what to copy; nobody may be connected to it. null: nothing, an empty database
 */
export async function createDatabase(adminUrl: string, template: string | null): Promise<TestDatabase> {
  const name = `beadwright_test_${randomBytes(6).toString('hex')}`
  await execute(adminUrl, `create database ${name} template ${template ?? 'template0'}`)
  const url = new URL(adminUrl)
  url.pathname = `/${name}`
  return { name, url: url.href, drop: () => execute(adminUrl, `drop database ${name} with (force)`) }
}

async function execute(url: string, statement: string): Promise<void> {
  const client = new Client({ connectionString: url })
  await client.connect()
  try {
    await client.query(statement)
  } finally {
    await client.end()
  }
}
