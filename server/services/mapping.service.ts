import type { DataSource } from 'typeorm'
import type { z } from 'zod'
import type {
  Mapping as MappingBody,
  mappingCreateSchema,
  MappingUpdate,
} from '../../shared/contracts/mapping'
import { sameMakeUp } from '../../shared/mapping'
import { Mapping } from '../entities/mapping.entity'
import { Polymer } from '../entities/polymer.entity'
import { HttpError, notFound } from '../errors/http-error'
import { mappingBody, readMapping } from './mapping-body'
import { hasData } from './mapping-data'
import { freezeVersion } from './mapping-versions'
import type { Member } from './member'
import { recordMapping } from './record-work'
import { syncTerms } from './sync-terms'

const NO_BEADS = { version: 1, beads: [] } as const satisfies MappingBody['document']

/** Mappings of a polymer. Saving one keeps its terms in step. */
export class MappingService {
  constructor(private readonly dataSource: DataSource) {}

  /** The polymer's mappings, by name. */
  async list({ groupId }: Member, polymerId: string): Promise<MappingBody[]> {
    const { manager } = this.dataSource
    const mappings = await manager.find(Mapping, {
      where: { groupId, polymerId },
      relations: { savedBy: true },
      order: { name: 'ASC' },
    })
    return Promise.all(mappings.map((mapping) => mappingBody(manager, mapping)))
  }

  /** @throws {HttpError} NOT_FOUND */
  get({ groupId }: Member, mappingId: string): Promise<MappingBody> {
    return readMapping(this.dataSource.manager, groupId, mappingId)
  }

  /**
   * @throws {InvalidInputError} when the document does not fit the repeat unit
   * @throws {HttpError} NAME_TAKEN (by the database's constraint)
   */
  async create(
    member: Member,
    polymerId: string,
    { name, document }: z.output<typeof mappingCreateSchema>,
  ): Promise<MappingBody> {
    const { groupId, userId } = member
    return this.dataSource.transaction(async (manager) => {
      // A shared lock on the polymer keeps its SMILES as it is while beads are counted on it.
      const polymer = await manager.findOne(Polymer, {
        where: { id: polymerId, groupId },
        lock: { mode: 'pessimistic_read' },
      })
      if (!polymer) throw notFound('polymer')
      const record = { groupId, polymerId, name, document, revision: 1, version: 1, savedAt: new Date() }
      const mapping = await manager.save(Mapping, { ...record, savedById: userId })
      await syncTerms(manager, { mapping, smiles: polymer.smiles, before: NO_BEADS, after: document })
      await recordMapping(manager, member, 'mapping added', mapping)
      return readMapping(manager, groupId, mapping.id)
    })
  }

  /**
   * Saves the mapping and its terms together. When the make-up of its beads changes while data stand on it, what it was before is
   * kept as a version and it becomes the next one.
   *
   * @throws {HttpError} CONFLICT with the current mapping when someone saved in between; NAME_TAKEN
   * @throws {InvalidInputError} when the document does not fit the repeat unit
   */
  async update(
    member: Member,
    mappingId: string,
    { revision, name, document }: MappingUpdate,
  ): Promise<MappingBody> {
    const { groupId, userId } = member
    return this.dataSource.transaction(async (manager) => {
      const where = { id: mappingId, groupId }
      const mapping = await manager.findOne(Mapping, { where, lock: { mode: 'pessimistic_write' } })
      if (!mapping) throw notFound('mapping')
      if (mapping.revision !== revision) {
        const details = await readMapping(manager, groupId, mappingId)
        const who = details.savedBy?.name ?? 'Someone'
        throw new HttpError(
          'CONFLICT',
          `${who} saved this mapping in between. Nothing of yours is lost: compare the two and save again.`,
          { details },
        )
      }
      const { smiles } = await manager.findOneByOrFail(Polymer, { id: mapping.polymerId })
      const makesVersion = !sameMakeUp(mapping.document, document) && (await hasData(manager, mappingId))
      if (makesVersion) await freezeVersion(manager, mapping)
      await syncTerms(manager, { mapping, smiles, before: mapping.document, after: document })
      const version = mapping.version + (makesVersion ? 1 : 0)
      const saved = { revision: revision + 1, version, savedAt: new Date(), savedById: userId }
      await manager.update(Mapping, where, { name, document, ...saved })
      const details = { version, ...(name === mapping.name ? {} : { old: mapping.name }) }
      await recordMapping(manager, member, 'mapping changed', { ...mapping, name }, details)
      return readMapping(manager, groupId, mappingId)
    })
  }

  /** Deletes the mapping with everything that stands on it: terms, distributions, files, potentials, decisions. */
  async remove(member: Member, mappingId: string): Promise<void> {
    await this.dataSource.transaction(async (manager) => {
      const where = { id: mappingId, groupId: member.groupId }
      const mapping = await manager.findOne(Mapping, { where, lock: { mode: 'pessimistic_write' } })
      if (!mapping) throw notFound('mapping')
      await recordMapping(manager, member, 'mapping deleted', mapping)
      await manager.delete(Mapping, where)
    })
  }
}
