import type { DataSource, EntityManager } from 'typeorm'
import type { z } from 'zod'
import type {
  Mapping as MappingBody,
  mappingCreateSchema,
  MappingUpdate,
} from '../../shared/contracts/mapping'
import { Mapping } from '../entities/mapping.entity'
import { Polymer } from '../entities/polymer.entity'
import { HttpError, notFound } from '../errors/http-error'
import type { Member } from './member'
import { personOf } from './people'
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
    { groupId, userId }: Member,
    polymerId: string,
    { name, document }: z.output<typeof mappingCreateSchema>,
  ): Promise<MappingBody> {
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
      return readMapping(manager, groupId, mapping.id)
    })
  }

  /**
   * Saves the mapping and its terms together.
   *
   * @throws {HttpError} CONFLICT with the current mapping when someone saved in between; NAME_TAKEN
   * @throws {InvalidInputError} when the document does not fit the repeat unit
   */
  async update(
    { groupId, userId }: Member,
    mappingId: string,
    { revision, name, document }: MappingUpdate,
  ): Promise<MappingBody> {
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
      await syncTerms(manager, { mapping, smiles, before: mapping.document, after: document })
      const changes = { name, document, revision: revision + 1, savedAt: new Date(), savedById: userId }
      await manager.update(Mapping, where, changes)
      return readMapping(manager, groupId, mappingId)
    })
  }

  /** Deletes the mapping with everything that stands on it: terms, distributions, files, potentials, decisions. */
  async remove({ groupId }: Member, mappingId: string): Promise<void> {
    const { affected } = await this.dataSource.manager.delete(Mapping, { id: mappingId, groupId })
    if (affected !== 1) throw notFound('mapping')
  }
}

async function readMapping(manager: EntityManager, groupId: string, id: string): Promise<MappingBody> {
  const mapping = await manager.findOne(Mapping, { where: { id, groupId }, relations: { savedBy: true } })
  if (!mapping) throw notFound('mapping')
  return mappingBody(manager, mapping)
}

async function mappingBody(manager: EntityManager, mapping: Mapping): Promise<MappingBody> {
  const { id, polymerId, name, document, revision, version } = mapping
  const [counts]: { terms: number; termsWithData: number }[] = await manager.query(
    `select count(*)::int as "terms",
            (count(*) filter (where exists (select 1 from "distribution" d
               where d."term_id" = t."id" and d."superseded_at" is null)))::int as "termsWithData"
       from "term" t where t."mapping_id" = $1 and t."current"`,
    [id],
  )
  return {
    id,
    polymerId,
    name,
    document,
    revision,
    version,
    savedAt: mapping.savedAt.toISOString(),
    savedBy: personOf(mapping.savedBy),
    counts: { beads: document.beads.length, ...counts },
  }
}
