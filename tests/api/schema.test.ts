import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type ApiServer, openApiServer } from '../support/api-server'
import { buildGroup, type TestGroup } from '../support/group-builder'
import { buildJob, type Job } from '../support/job-builder'

let server: ApiServer
let ours: TestGroup
let theirs: TestGroup
let job: Job

beforeAll(async () => {
  server = await openApiServer()
  ours = await buildGroup(server)
  theirs = await buildGroup(server)
  job = await buildJob(server.services, ours.modeller.member)
})

afterAll(() => server.close())

describe('the database itself', () => {
  it('ties every record to records of its own group: each key between them holds the group too', async () => {
    const keys: { name: string; columns: string }[] = await server.dataSource.query(
      `select c.conname as name, pg_get_constraintdef(c.oid) as columns from pg_constraint c
        where c.contype = 'f' and c.connamespace = 'public'::regnamespace
          and c.confrelid not in ('"user"'::regclass, '"group"'::regclass)`,
    )
    expect(keys.length).toBeGreaterThanOrEqual(12)
    for (const { columns } of keys)
      expect(columns).toMatch(/KEY \(\w+, group_id\) REFERENCES \w+\(id, group_id\)/)
  })

  it('refuses a term of ours under a mapping of theirs', async () => {
    const insert = server.dataSource.query(
      `insert into "term" ("group_id", "mapping_id", "kind", "types", "places", "place_key", "position", "current")
       values ($1, $2, 'bond', '{X,Y}', '[]', '', 0, true)`,
      [theirs.groupId, job.mappingId],
    )
    await expect(insert).rejects.toMatchObject({ driverError: { constraint: 'FK_term_mapping' } })
  })

  it('gives every table of the science a group that cannot be empty', async () => {
    const without: { name: string }[] = await server.dataSource.query(
      `select t.table_name as name from information_schema.tables t
        where t.table_schema = 'public' and not exists (
          select 1 from information_schema.columns c where c.table_name = t.table_name
             and c.table_schema = 'public' and c.column_name = 'group_id' and c.is_nullable = 'NO')`,
    )
    const names = without.map(({ name }) => name).sort()
    expect(names).toEqual([
      'api_key',
      'attempt',
      'caught_mail',
      'group',
      'mail',
      'migration',
      'password_reset',
      'session',
      'set_up_link',
      'setting',
      'user',
    ])
  })

  it('keeps a file with exactly one distribution', async () => {
    const insert = server.dataSource.query(
      `insert into "source_file" ("group_id", "name", "size", "sha256", "gzip") values ($1, 'x', 1, 'y', '')`,
      [ours.groupId],
    )
    await expect(insert).rejects.toMatchObject({ driverError: { constraint: 'CK_source_file_owner' } })
  })

  it('refuses a membership in a group that is not there', async () => {
    const insert = server.dataSource.query(
      `insert into "membership" ("group_id", "user_id", "role") values ($1, $2, 'owner')`,
      [randomUUID(), ours.owner.member.userId],
    )
    await expect(insert).rejects.toMatchObject({ driverError: { code: '23503' } })
  })
})
