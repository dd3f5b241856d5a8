import type { EntityManager } from 'typeorm'
import { MappingVersion } from '../entities/mapping-version.entity'
import type { Mapping } from '../entities/mapping.entity'
import { Term } from '../entities/term.entity'

/**
 * Keeps a mapping as it is stored, with the places of its terms, as one of its versions. Call it in the transaction that then
 * changes it, with the mapping's row locked and before its terms change.
 */
export async function freezeVersion(manager: EntityManager, mapping: Mapping): Promise<void> {
  const { id, groupId, version, document, savedAt, savedById } = mapping
  // Terms that are not current may come back: data of theirs were measured on the places they left with.
  const terms = await manager.findBy(Term, { mappingId: id })
  await manager.insert(MappingVersion, {
    groupId,
    mappingId: id,
    number: version,
    document,
    terms: terms.map(({ id: termId, places }) => ({ termId, places })),
    savedAt,
    savedById,
  })
}
