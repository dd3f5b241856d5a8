import { type DataSource, type EntityManager, In } from 'typeorm'
import type { FrozenHandOver } from '../../shared/contracts/hand-over'
import type { HandOverRelease } from '../../shared/contracts/hand-over-desk'
import { compareHandOvers } from '../../shared/hand-over'
import { HandOverFile } from '../entities/hand-over-file.entity'
import { HandOverTable } from '../entities/hand-over-table.entity'
import { HandOver } from '../entities/hand-over.entity'
import { User } from '../entities/user.entity'
import { notFound } from '../errors/http-error'
import { tellRecipients } from './delivery/tell-recipients'
import { packFiles, releasedFiles } from './hand-over/archive'
import { comparedNow, comparedThen } from './hand-over/compared'
import { freezeFiles, freezeHead, writeTables } from './hand-over/freeze'
import { findReleased } from './hand-over/find-released'
import { readHandOverBody } from './hand-over/hand-over-body'
import { lockContent, lockHandOver } from './hand-over/hand-over-context'
import { handOverSubject } from './hand-over/hand-over-name'
import { frozenLayout } from './hand-over/layout-of'
import type { ListedFile } from './hand-over/manifest'
import { releaseBody } from './hand-over/release-body'
import { checkComplete, contentChanged, lapse, step } from './hand-over/review-steps'
import type { WrittenTable } from './hand-over/written-table'
import { sha256 } from './hashes'
import type { Download, Member } from './member'
import { recordEvent } from './record-event'

/** Hand-overs that are out: released with a number, downloaded, withdrawn. */
export class HandOverReleaseService {
  constructor(private readonly dataSource: DataSource) {}

  /**
   * Gives a signed-off hand-over its number and freezes all of its content, in one transaction and only if nothing changed since
   * review was asked for.
   *
   * @throws {HttpError} CONTENT_CHANGED: it goes back to its author; CHECKLIST_OPEN; CONFLICT when it is not signed off (any more)
   */
  async release(member: Member, handOverId: string, revision: number): Promise<HandOverRelease> {
    const released = await this.dataSource.transaction(async (manager) => {
      const handOver = await lockHandOver(manager, member.groupId, handOverId, {
        revision,
        from: ['signed off'],
      })
      const content = await lockContent(manager, handOver)
      const now = new Date()
      if (content.sha256 !== handOver.contentSha256 || handOver.signedOffAt === null) {
        await lapse(manager, member, handOver, now)
        return null
      }
      await checkComplete(manager, handOver, content)
      const layout = await frozenLayout(manager, handOver)
      const number = await nextNumber(manager, member.groupId)
      const previous = await findPrevious(manager, handOver)
      const tables = writeTables(content, layout)
      const head = freezeHead(
        handOver,
        content,
        {
          number,
          layout,
          madeBy: await nameOf(manager, handOver.authorId),
          signedOffBy: await nameOf(manager, handOver.signedOffById),
          signedOffAt: handOver.signedOffAt.toISOString(),
          releasedAt: now.toISOString(),
          replaces: previous?.number ?? null,
        },
        tables,
      )
      const before = previous && (await comparedThen(manager, previous))
      const differences = before ? compareHandOvers(before, comparedNow(head, tables)) : []
      const frozen: FrozenHandOver = { ...head, differences }
      await storeContent(manager, handOver, tables, await freezeFiles(frozen, tables, content))
      await step(
        manager,
        handOver,
        {
          standing: 'released',
          number,
          mappingRevision: content.mapping.revision,
          releasedById: member.userId,
          releasedAt: now,
          previousId: previous?.id ?? null,
          frozen,
        },
        now,
      )
      await recordEvent(manager, member, { action: 'released', subject: handOverSubject(handOver) })
      return handOver
    })
    if (!released) throw contentChanged('released')
    return this.get(member, handOverId)
  }

  /** A released hand-over as its page shows it. @throws {HttpError} NOT_FOUND before it is released; FILE_DAMAGED */
  async get({ groupId }: Member, handOverId: string): Promise<HandOverRelease> {
    const { manager } = this.dataSource
    const handOver = await findReleased(manager, groupId, handOverId)
    const files = await releasedFiles(manager, handOver)
    const tables = await manager.find(HandOverTable, { where: { handOverId }, order: { position: 'ASC' } })
    const head = await readHandOverBody(manager, groupId, handOverId)
    return releaseBody(head, handOver.frozen, tables, files, packFiles(handOver, files))
  }

  /** All files with manifest and checksums. @throws {HttpError} NOT_FOUND; FILE_DAMAGED */
  async archive({ groupId }: Member, handOverId: string): Promise<Download> {
    const { manager } = this.dataSource
    const handOver = await findReleased(manager, groupId, handOverId)
    return packFiles(handOver, await releasedFiles(manager, handOver))
  }

  /** One file. @throws {HttpError} NOT_FOUND; FILE_DAMAGED */
  async file({ groupId }: Member, handOverId: string, path: string): Promise<Download> {
    const { manager } = this.dataSource
    const handOver = await findReleased(manager, groupId, handOverId)
    const file = (await releasedFiles(manager, handOver)).find((each) => each.path === path)
    if (!file) throw notFound('file in this hand-over', 'path')
    return { fileName: file.path, bytes: file.bytes }
  }

  /** Says that a hand-over is not to be used any more. Its files stay, and say so. @throws {HttpError} CONFLICT */
  async withdraw(
    member: Member,
    handOverId: string,
    revision: number,
    reason: string,
  ): Promise<HandOverRelease> {
    await this.dataSource.transaction(async (manager) => {
      const handOver = await lockHandOver(manager, member.groupId, handOverId, {
        revision,
        from: ['released'],
      })
      const now = new Date()
      const withdrawal = { withdrawnById: member.userId, withdrawnAt: now, withdrawnReason: reason }
      await step(manager, handOver, { standing: 'withdrawn', ...withdrawal }, now)
      const details = { reason }
      await recordEvent(manager, member, { action: 'withdrawn', subject: handOverSubject(handOver), details })
      await tellRecipients(manager, handOver, reason)
    })
    return this.get(member, handOverId)
  }
}

/** The next number of the group. Two releases at the same time come one after the other. */
async function nextNumber(manager: EntityManager, groupId: string): Promise<number> {
  await manager.query(`select 1 from "group" where "id" = $1 for no key update`, [groupId])
  const [{ last }]: { last: number }[] = await manager.query(
    `select coalesce(max("number"), 0) as "last" from "hand_over" where "group_id" = $1`,
    [groupId],
  )
  return last + 1
}

/** The one that this takes the place of: the last released one of the same mapping and state point, withdrawn or not. */
function findPrevious(
  manager: EntityManager,
  { mappingId, statePointId }: HandOver,
): Promise<HandOver | null> {
  return manager.findOne(HandOver, {
    where: { mappingId, statePointId, standing: In(['released', 'withdrawn']) },
    order: { number: 'DESC' },
  })
}

async function nameOf(manager: EntityManager, id: string | null): Promise<string | null> {
  return id === null ? null : ((await manager.findOneBy(User, { id }))?.name ?? null)
}

async function storeContent(
  manager: EntityManager,
  { id: handOverId, groupId }: HandOver,
  tables: readonly WrittenTable[],
  files: readonly ListedFile[],
): Promise<void> {
  const numbers = (column: Float64Array | null): number[] | null => column && Array.from(column)
  for (const [position, table] of tables.entries()) {
    const { name, path, temperature, meta } = table
    await manager.save(HandOverTable, {
      groupId,
      handOverId,
      position,
      name,
      path,
      temperature,
      meta,
      kinds: [...table.kinds],
      coordinates: Array.from(table.coordinates),
      secondCoordinates: numbers(table.secondCoordinates),
      energies: Array.from(table.energies),
      forces: Array.from(table.forces),
      secondForces: numbers(table.secondForces),
      silhouette: [...table.silhouette],
    })
  }
  for (const [position, { path, mediaType, bytes }] of files.entries()) {
    await manager.insert(HandOverFile, {
      groupId,
      handOverId,
      position,
      path,
      mediaType,
      size: bytes.length,
      sha256: sha256(bytes),
      bytes: Buffer.from(bytes),
    })
  }
}
