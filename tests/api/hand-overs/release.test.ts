import { execFileSync } from 'node:child_process'
import { createHash } from 'node:crypto'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { unzipSync } from 'fflate'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { handOverReleaseSchema } from '@shared/contracts/hand-over-desk'
import { DEFAULT_INVERSION_SETTINGS } from '@shared/inversion'
import { type ApiServer, openApiServer } from '../../support/api-server'
import { buildGroup, type TestGroup } from '../../support/group-builder'
import { buildReleased, buildSignedOff } from '../../support/hand-over-builder'
import { BOND_SETTINGS, bondFile, uploaded } from '../../support/job-builder'

let server: ApiServer
let group: TestGroup

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
})

afterAll(() => server.close())

async function archiveOf(id: string): Promise<Record<string, Uint8Array>> {
  const response = await group.modeller.client
    .raw('get', `/api/hand-overs/${id}/archive.zip`)
    .buffer()
    .parse((stream, done) => {
      const parts: Buffer[] = []
      stream.on('data', (part: Buffer) => parts.push(part))
      stream.on('end', () => done(null, Buffer.concat(parts)))
    })
  expect(response.status).toBe(200)
  return unzipSync(response.body as Buffer)
}

const text = (bytes: Uint8Array): string => Buffer.from(bytes).toString()

/** What sha256sum says of the files of an archive, laid out in a folder. */
function sumsHold(files: Record<string, Uint8Array>): boolean {
  const folder = mkdtempSync(join(tmpdir(), 'hand-over-'))
  try {
    for (const [path, bytes] of Object.entries(files)) writeFileSync(join(folder, path), bytes)
    execFileSync('sha256sum', ['--check', '--strict', 'SHA256SUMS'], { cwd: folder, stdio: 'ignore' })
    return true
  } catch {
    return false
  } finally {
    rmSync(folder, { recursive: true })
  }
}

describe('a release', () => {
  it('freezes tables, mapping, picture, README, manifest and checksums, and sha256sum finds them whole', async () => {
    const { handOver } = await buildReleased(server.services, group)
    const files = await archiveOf(handOver.id)
    expect(Object.keys(files)).toEqual([
      'README.txt',
      'bond_A-A_400K.txt',
      'mapping.json',
      'mapping.svg',
      'data-sheet.pdf',
      'data-sheet.json',
      'manifest.json',
      'SHA256SUMS',
    ])
    expect(sumsHold(files)).toBe(true)
    expect(sumsHold({ ...files, 'README.txt': Buffer.from('another') })).toBe(false)
    const manifest = JSON.parse(text(files['manifest.json'])) as {
      standing: string
      handOver: number
      files: { path: string; size: number; sha256: string }[]
    }
    expect(manifest).toMatchObject({ standing: 'released', handOver: handOver.number })
    for (const { path, size, sha256 } of manifest.files) {
      expect([path, size, sha256]).toEqual([
        path,
        files[path].length,
        createHash('sha256').update(files[path]).digest('hex'),
      ])
    }
    expect(manifest.files.map(({ path }) => path)).toEqual(Object.keys(files).slice(0, -2))
  })

  it('gives the same archive each time, with the checksum that its page shows', async () => {
    const { handOver } = await buildReleased(server.services, group)
    const { member } = group.reviewer
    const archives = [
      await server.services.releases.archive(member, handOver.id),
      await server.services.releases.archive(member, handOver.id),
    ]
    const sums = archives.map(({ bytes }) => createHash('sha256').update(bytes).digest('hex'))
    expect(sums).toEqual([handOver.archive.sha256, handOver.archive.sha256])
  })

  it('keeps the numbers of its tables in full precision', async () => {
    const { handOver } = await buildReleased(server.services, group)
    const [table] = await server.dataSource.query<
      { coordinates: number[]; energies: number[]; forces: number[]; kinds: string[] }[]
    >(
      `select "coordinates", "energies", "forces", "kinds" from "hand_over_table" where "hand_over_id" = $1`,
      [handOver.id],
    )
    expect(table.kinds).toEqual(['bond'])
    expect(table.coordinates).toHaveLength(DEFAULT_INVERSION_SETTINGS.table.rows)
    expect(Math.min(...table.energies)).toBeGreaterThanOrEqual(0)
    expect(table.energies.some((energy) => Number(energy.toPrecision(7)) !== energy)).toBe(true)
    expect(table.forces).toHaveLength(table.coordinates.length)
  })

  it('numbers the hand-overs of a group without gaps, also when several are released at the same moment', async () => {
    const crowd = await buildGroup(server)
    const ready = await Promise.all(Array.from({ length: 4 }, () => buildSignedOff(server.services, crowd)))
    const answers = await Promise.all(
      ready.map(({ handOver: { id, revision } }) =>
        crowd.modeller.client.post(`/api/hand-overs/${id}/release`, { revision }),
      ),
    )
    expect(answers.map(({ status }) => status)).toEqual([200, 200, 200, 200])
    const numbers = answers.map(({ body }) => handOverReleaseSchema.parse(body).number)
    expect(numbers.sort()).toEqual([1, 2, 3, 4])
  })

  it('happens once when asked for twice at the same moment', async () => {
    const { handOver } = await buildSignedOff(server.services, group)
    const { id, revision } = handOver
    const answers = await Promise.all(
      [group.modeller, group.owner].map(({ client }) =>
        client.post(`/api/hand-overs/${id}/release`, { revision }),
      ),
    )
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409])
    expect(answers.find(({ status }) => status === 409)?.body).toMatchObject({
      code: 'CONFLICT',
      details: { id, standing: 'released' },
    })
  })

  it('is refused when data changed after sign-off; the hand-over goes back to its author', async () => {
    const { handOver, job } = await buildSignedOff(server.services, group)
    const upload = { statePointId: job.statePointId, settings: BOND_SETTINGS }
    await server.services.distributions.add(
      group.modeller.member,
      job.bondId,
      upload,
      uploaded(bondFile('b', 2e6)),
    )
    const { id, revision } = handOver
    const answer = await group.modeller.client.post(`/api/hand-overs/${id}/release`, { revision })
    expect(answer.status).toBe(409)
    expect(answer.body).toMatchObject({ code: 'CONTENT_CHANGED' })
    const after = await server.services.handOvers.get(group.modeller.member, id)
    expect(after).toMatchObject({ standing: 'sent back', number: null, signedOffAt: null })
    expect(after.reviews.at(-1)).toMatchObject({ outcome: 'signed off' })
  })

  it('holds either what was reviewed or nothing while a potential is saved at the same moment', async () => {
    for (let round = 0; round < 4; round++) {
      const { handOver, job } = await buildSignedOff(server.services, group)
      const settings = { ...DEFAULT_INVERSION_SETTINGS, tails: { stiffness: 3 } }
      const [released, saved] = await Promise.all([
        group.modeller.client.post(`/api/hand-overs/${handOver.id}/release`, { revision: handOver.revision }),
        group.owner.client.put(`/api/terms/${job.bondId}/potential`, {
          statePointId: job.statePointId,
          revision: 1,
          settings,
        }),
      ])
      expect(saved.status).toBe(200)
      expect([200, 409]).toContain(released.status)
      if (released.status === 409) expect(released.body).toMatchObject({ code: 'CONTENT_CHANGED' })
      else {
        const { frozen, tables } = handOverReleaseSchema.parse(released.body)
        expect(frozen.contentSha256).toBe(await reviewedSha256(handOver.id))
        expect(tables).toHaveLength(1)
      }
    }
  })

  async function reviewedSha256(id: string): Promise<string> {
    const [row] = await server.dataSource.query<{ sum: string }[]>(
      `select "content_sha256" as sum from "hand_over_review" where "hand_over_id" = $1`,
      [id],
    )
    return row.sum
  }

  it('is seen by the group, but not by a collaborator of it: nothing was handed to them', async () => {
    const { handOver } = await buildReleased(server.services, group)
    for (const path of ['', '/release', '/archive.zip', '/files/README.txt']) {
      const answer = await group.collaborator.client.get(`/api/hand-overs/${handOver.id}${path}`)
      expect([path, answer.status]).toEqual([path, 403])
    }
  })

  it('keeps mapping, state point and polymer from being deleted', async () => {
    const { job } = await buildReleased(server.services, group)
    for (const path of [
      `mappings/${job.mappingId}`,
      `state-points/${job.statePointId}`,
      `polymers/${job.polymerId}`,
    ]) {
      const answer = await group.owner.client.delete(`/api/${path}`)
      expect([path, answer.status]).toEqual([path, 409])
      expect(answer.body).toMatchObject({ code: 'IN_USE' })
    }
  })
})

describe('released content', () => {
  it('never changes: the database itself refuses it', async () => {
    const { handOver } = await buildReleased(server.services, group)
    const { id } = handOver
    for (const statement of [
      `update "hand_over_file" set "bytes" = '' where "hand_over_id" = $1`,
      `delete from "hand_over_file" where "hand_over_id" = $1`,
      `update "hand_over_table" set "energies" = "forces" where "hand_over_id" = $1`,
      `delete from "hand_over_table" where "hand_over_id" = $1`,
      `insert into "hand_over_file" ("group_id", "hand_over_id", "position", "path", "media_type", "size", "sha256", "bytes")
         select "group_id", "hand_over_id", 99, 'more', "media_type", "size", "sha256", "bytes" from "hand_over_file"
          where "hand_over_id" = $1 limit 1`,
      `update "hand_over" set "title" = 'another' where "id" = $1`,
      `update "hand_over" set "frozen" = '{}' where "id" = $1`,
      `update "hand_over" set "number" = 999 where "id" = $1`,
      `update "hand_over" set "standing" = 'draft', "number" = null where "id" = $1`,
      `delete from "hand_over" where "id" = $1`,
    ]) {
      await expect(server.dataSource.query(statement, [id]), statement).rejects.toMatchObject({
        driverError: { code: '23001', constraint: 'hand_over_immutable' },
      })
    }
  })

  it('goes only with its whole group', async () => {
    const gone = await buildGroup(server)
    const { handOver } = await buildReleased(server.services, gone)
    await server.dataSource.query(`delete from "group" where "id" = $1`, [gone.groupId])
    const left: unknown[] = await server.dataSource.query(
      `select "id" from "hand_over_file" where "hand_over_id" = $1`,
      [handOver.id],
    )
    expect(left).toEqual([])
  })

  it('is not given out once it is damaged, and the damage is logged', async () => {
    const { handOver } = await buildReleased(server.services, group)
    const { id } = handOver
    await server.dataSource.transaction(async (manager) => {
      await manager.query(`set local session_replication_role = replica`)
      await manager.query(
        `update "hand_over_file" set "bytes" = "bytes" || ' '::bytea where "hand_over_id" = $1 and "path" = 'mapping.json'`,
        [id],
      )
    })
    const before = server.log().length
    for (const path of ['archive.zip', 'files/README.txt', 'release']) {
      const answer = await group.modeller.client.get(`/api/hand-overs/${id}/${path}`)
      expect([path, answer.status]).toEqual([path, 500])
      expect(answer.body).toMatchObject({ code: 'FILE_DAMAGED' })
    }
    expect(server.log().slice(before)).toContain('mapping.json')
  })

  it('is not given out when a file and its checksum were exchanged together', async () => {
    const { handOver } = await buildReleased(server.services, group)
    const sum = createHash('sha256').update('forged').digest('hex')
    await server.dataSource.transaction(async (manager) => {
      await manager.query(`set local session_replication_role = replica`)
      await manager.query(
        `update "hand_over_file" set "bytes" = 'forged', "sha256" = $2 where "hand_over_id" = $1 and "path" = 'README.txt'`,
        [handOver.id, sum],
      )
    })
    const answer = await group.modeller.client.get(`/api/hand-overs/${handOver.id}/archive.zip`)
    expect(answer.body).toMatchObject({ code: 'FILE_DAMAGED' })
  })
})

describe('a withdrawal', () => {
  it('stays on record with its reason; page, manifest and a file in the archive say so, and the checksums hold', async () => {
    const { handOver } = await buildReleased(server.services, group)
    const { id, revision } = handOver
    const before = await archiveOf(id)
    const reason = 'The state point was 410 K.'
    const answer = await group.owner.client.post(`/api/hand-overs/${id}/withdrawal`, { revision, reason })
    expect(answer.body).toMatchObject({ standing: 'withdrawn', withdrawn: { reason } })
    const after = await archiveOf(id)
    expect(text(after['WITHDRAWN.txt'])).toContain(reason)
    expect(JSON.parse(text(after['manifest.json']))).toMatchObject({
      standing: 'withdrawn',
      withdrawn: { reason },
    })
    expect(sumsHold(after)).toBe(true)
    const same = ['README.txt', 'bond_A-A_400K.txt', 'mapping.json', 'mapping.svg']
    for (const path of same) expect(text(after[path])).toBe(text(before[path]))
    const again = { revision: handOver.revision + 1, reason }
    const second = await group.owner.client.post(`/api/hand-overs/${id}/withdrawal`, again)
    expect(second.body).toMatchObject({ code: 'CONFLICT' })
  })

  it('stays when the group changes its layout: the files are as they were', async () => {
    const { handOver, job } = await buildReleased(server.services, group)
    const before = await archiveOf(handOver.id)
    const draft = await server.services.handOvers.create(group.modeller.member, job.polymerId, {
      mappingId: job.mappingId,
      statePointId: job.statePointId,
      title: 'In commas',
      notes: '',
    })
    const layout = { ...draft.layout, layoutId: 'three-columns-comma' as const }
    const { revision } = draft
    const changed = await server.services.handOvers.update(group.modeller.member, draft.id, {
      revision,
      layout,
    })
    expect(changed.layout.name).toBe('Three columns, commas')
    const preview = await server.services.handOvers.preview(group.modeller.member, draft.id, 'A–A')
    const row = preview.text.split('\n').find((line) => /^\s*[\d.]+,/.test(line))
    expect(row?.split(',')).toHaveLength(3)
    expect(await archiveOf(handOver.id)).toEqual(before)
  })

  it('needs a reason', async () => {
    const { handOver } = await buildReleased(server.services, group)
    const body = { revision: handOver.revision, reason: '  ' }
    const answer = await group.owner.client.post(`/api/hand-overs/${handOver.id}/withdrawal`, body)
    expect(answer.body).toMatchObject({ code: 'VALIDATION_FAILED', field: 'reason' })
  })
})

describe('the next hand-over', () => {
  it('says what changed against the one before: settings, and the largest change with its place', async () => {
    const first = await buildReleased(server.services, group)
    const { job } = first
    const settings = { ...DEFAULT_INVERSION_SETTINGS, form: 'harmonic' }
    const potential = { statePointId: job.statePointId, revision: 1, settings }
    await server.services.potentials.save(group.modeller.member, job.bondId, potential)
    const second = await buildReleased(server.services, group, { job })
    expect(second.handOver).toMatchObject({ replaces: first.handOver.number })
    const [change] = second.handOver.frozen.differences
    expect(change).toMatchObject({ about: 'A–A', change: 'changed' })
    expect(change.largest?.kT).toBeLessThan(0.2)
    expect(await server.services.releases.get(group.modeller.member, first.handOver.id)).toMatchObject({
      replacedBy: { id: second.handOver.id, number: second.handOver.number },
    })
  })

  it('of the same content is byte for byte the same', async () => {
    const { job } = await buildReleased(server.services, group)
    const second = await buildReleased(server.services, group, { job })
    expect(second.handOver.frozen.differences).toEqual([
      { about: 'All tables', change: 'same', text: 'Byte for byte the same.', largest: null },
    ])
  })

  it('of another state point compares with nothing', async () => {
    const { handOver } = await buildReleased(server.services, group)
    expect(handOver.replaces).toBeNull()
    expect(handOver.frozen.differences).toEqual([])
  })
})
