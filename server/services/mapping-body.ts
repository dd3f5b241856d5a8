import type { EntityManager } from 'typeorm'
import type { Mapping as MappingBody } from '../../shared/contracts/mapping'
import { usedTerms } from '../../shared/mapping'
import { Mapping } from '../entities/mapping.entity'
import { Term } from '../entities/term.entity'
import { notFound } from '../errors/http-error'
import { currentData, hasData } from './mapping-data'
import { readFit } from './mapping-fit'
import { personOf } from './people'

/** @throws {HttpError} NOT_FOUND */
export async function readMapping(manager: EntityManager, groupId: string, id: string): Promise<MappingBody> {
  const mapping = await manager.findOne(Mapping, { where: { id, groupId }, relations: { savedBy: true } })
  if (!mapping) throw notFound('mapping')
  return mappingBody(manager, mapping)
}

/** A mapping as the API gives it, with how many of its terms have data. */
export async function mappingBody(manager: EntityManager, mapping: Mapping): Promise<MappingBody> {
  const { id, polymerId, name, document, revision, version } = mapping
  return {
    id,
    polymerId,
    name,
    document,
    revision,
    version,
    hasData: await hasData(manager, id),
    savedAt: mapping.savedAt.toISOString(),
    savedBy: personOf(mapping.savedBy),
    counts: { beads: document.beads.length, ...(await termCounts(manager, mapping)) },
  }
}

/** Terms in use, those of them with data that fit at any state point, and those whose data no longer fit anywhere. */
async function termCounts(manager: EntityManager, mapping: Mapping) {
  const stored = await manager.findBy(Term, { mappingId: mapping.id, current: true })
  const used = usedTerms(mapping.document, stored)
  const data = (await currentData(manager, mapping.id)).filter(({ termIds }) => termIds.length === 1)
  const fit = await readFit(manager, mapping)
  const measured = new Set(data.map(({ termIds: [termId] }) => termId))
  const fitting = new Set(
    data
      .filter(({ termIds: [termId], version }) => fit.reason(termId, version) === null)
      .map(({ termIds: [termId] }) => termId),
  )
  return {
    terms: used.length,
    leftOut: stored.length - used.length,
    termsWithData: used.filter(({ id }) => fitting.has(id)).length,
    termsUnfit: used.filter(({ id }) => measured.has(id) && !fitting.has(id)).length,
  }
}
