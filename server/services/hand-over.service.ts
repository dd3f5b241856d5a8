import type { DataSource, EntityManager } from 'typeorm'
import type { z } from 'zod'
import { HOUSE_DEFAULTS } from '../../shared/contracts/group'
import { EVERYTHING, type handOverCreateSchema, type HandOverUpdate } from '../../shared/contracts/hand-over'
import type { HandOver as HandOverBody, HandOverDetail } from '../../shared/contracts/hand-over-desk'
import { Group } from '../entities/group.entity'
import { HandOver } from '../entities/hand-over.entity'
import { Mapping } from '../entities/mapping.entity'
import { StatePoint } from '../entities/state-point.entity'
import { notFound } from '../errors/http-error'
import { readContent } from './hand-over/content'
import { detailBody } from './hand-over/detail-body'
import { findHandOverBodies, readHandOverBody } from './hand-over/hand-over-body'
import { findHandOver, lockHandOver } from './hand-over/hand-over-context'
import { handOverSubject } from './hand-over/hand-over-name'
import { frozenLayout, heldLayout } from './hand-over/layout-of'
import { previewText } from './hand-over/preview-text'
import { defaultOf } from './layout.service'
import type { Member } from './member'
import { recordEvent } from './record-event'

/** Standings in which a hand-over is its author's to change. */
export const OPEN = ['draft', 'sent back'] as const

/** Hand-overs as drafts: made, changed, looked at, thrown away. */
export class HandOverService {
  constructor(private readonly dataSource: DataSource) {}

  /** The hand-overs of a polymer over all its mappings and state points; what changed last comes first. */
  list({ groupId }: Member, polymerId: string): Promise<HandOverBody[]> {
    return findHandOverBodies(this.dataSource.manager, { groupId, polymerId })
  }

  /** A hand-over with checklist, evidence and reviews. @throws {HttpError} NOT_FOUND */
  async get(member: Member, handOverId: string): Promise<HandOverDetail> {
    return this.detail(this.dataSource.manager, member, handOverId)
  }

  /**
   * Starts a draft that holds all the mapping asks for, in the group's units.
   *
   * @throws {HttpError} NOT_FOUND with the field that names a mapping or state point of another polymer
   */
  async create(
    member: Member,
    polymerId: string,
    { mappingId, statePointId, title, notes }: z.output<typeof handOverCreateSchema>,
  ): Promise<HandOverDetail> {
    const { groupId, userId } = member
    return this.dataSource.transaction(async (manager) => {
      // Shared locks: neither can be deleted before the draft that stands on them is there.
      const lock = { mode: 'pessimistic_read' } as const
      const mapping = await manager.findOne(Mapping, { where: { id: mappingId, groupId, polymerId }, lock })
      if (!mapping) throw notFound('mapping of this polymer', 'mappingId')
      const point = await manager.findOne(StatePoint, {
        where: { id: statePointId, groupId, polymerId },
        lock,
      })
      if (!point) throw notFound('state point of this polymer', 'statePointId')
      const group = await manager.findOneByOrFail(Group, { id: groupId })
      const handOver = await manager.save(HandOver, {
        groupId,
        polymerId,
        mappingId,
        mappingRevision: mapping.revision,
        statePointId,
        title,
        notes,
        selection: EVERYTHING,
        layout: await heldLayout(manager, {
          groupId,
          layout: {
            layoutId: await defaultOf(manager, groupId),
            ...HOUSE_DEFAULTS.units,
            ...group.defaults.units,
          },
        }),
        standing: 'draft',
        revision: 1,
        changedAt: new Date(),
        authorId: userId,
      })
      await recordEvent(manager, member, { action: 'hand-over created', subject: handOverSubject(handOver) })
      return this.detail(manager, member, handOver.id)
    })
  }

  /**
   * Changes a draft, or one that was sent back.
   *
   * @throws {HttpError} CONFLICT with the current hand-over when someone else changed it, or when it is out of the author's hands
   */
  async update(
    member: Member,
    handOverId: string,
    { revision, ...changes }: HandOverUpdate,
  ): Promise<HandOverDetail> {
    return this.dataSource.transaction(async (manager) => {
      const handOver = await lockHandOver(manager, member.groupId, handOverId, { revision, from: OPEN })
      const mapping = await manager.findOneByOrFail(Mapping, { id: handOver.mappingId })
      Object.assign(handOver, changes, {
        mappingRevision: mapping.revision,
        revision: revision + 1,
        changedAt: new Date(),
      })
      if (changes.layout) handOver.layout = await heldLayout(manager, handOver)
      await manager.save(HandOver, handOver)
      await recordEvent(manager, member, { action: 'hand-over changed', subject: handOverSubject(handOver) })
      return this.detail(manager, member, handOverId)
    })
  }

  /** Throws a draft away. @throws {HttpError} CONFLICT for one that is under review or out: it stays for the record */
  async remove(member: Member, handOverId: string): Promise<void> {
    await this.dataSource.transaction(async (manager) => {
      const { revision } = await findHandOver(manager, member.groupId, handOverId)
      const handOver = await lockHandOver(manager, member.groupId, handOverId, { revision, from: OPEN })
      await recordEvent(manager, member, { action: 'hand-over deleted', subject: handOverSubject(handOver) })
      await manager.delete(HandOver, { id: handOver.id })
    })
  }

  /**
   * The file of one table as a release would write it now.
   *
   * @param name of the term, or of both for a joint table
   * @throws {HttpError} NOT_FOUND when there is no such table yet
   */
  async preview({ groupId }: Member, handOverId: string, name: string): Promise<{ text: string }> {
    const { manager } = this.dataSource
    const handOver = await findHandOver(manager, groupId, handOverId)
    const options = await frozenLayout(manager, handOver)
    return { text: previewText(await readContent(manager, handOver), options, name) }
  }

  private async detail(manager: EntityManager, member: Member, id: string): Promise<HandOverDetail> {
    const handOver = await findHandOver(manager, member.groupId, id)
    const head = await readHandOverBody(manager, member.groupId, id)
    return detailBody(manager, member, handOver, head)
  }
}
