import { inject } from 'vitest'
import { createDatabase, type TestDatabase } from './databases'

/** A database for one test file: the schema of today without rows. Drop it when the file is done. */
export function createTestDatabase(): Promise<TestDatabase> {
  return createDatabase(inject('databaseUrl'), inject('templateDatabase'))
}

/** A database without anything in it, for tests of the migrations. */
export function createEmptyTestDatabase(): Promise<TestDatabase> {
  return createDatabase(inject('databaseUrl'), null)
}
