import type { EntityManager } from 'typeorm'
import { parseRepeatUnit } from '../../shared/chemistry'
import { makeUpChange, type MappingDocument } from '../../shared/mapping'
import { MappingVersion } from '../entities/mapping-version.entity'
import type { Mapping } from '../entities/mapping.entity'
import { Polymer } from '../entities/polymer.entity'
import { Term } from '../entities/term.entity'

/** Begins the reason why there is no table. */
export const UNFIT_DATA = 'its data no longer fit the mapping.'

/** A mapping as far as its versions go. */
export type VersionedMapping = Pick<Mapping, 'id' | 'polymerId' | 'version' | 'document'>

/** A state of a mapping: its document, and where its terms stand in it. */
export interface MappingState {
  readonly document: MappingDocument
  readonly terms: readonly Pick<Term, 'id' | 'places'>[]
}

/** Tells of data whether they fit the mapping. */
export interface Fit {
  /**
   * Why data of a term that were measured under a version do not fit the mapping: a sentence or two, null where they fit.
   *
   * @param termId of a term that the mapping has
   */
  readonly reason: (termId: string, version: number) => string | null
}

/** The same for data of two terms together. */
export function pairReason(fit: Fit, termIds: readonly string[], version: number): string | null {
  const reasons = new Set(termIds.map((termId) => fit.reason(termId, version)))
  return [...reasons].find((reason) => reason !== null) ?? null
}

/** How data fit the mapping as it is stored. */
export async function readFit(manager: EntityManager, mapping: VersionedMapping): Promise<Fit> {
  if (mapping.version === 1) return { reason: () => null }
  const terms = await manager.findBy(Term, { mappingId: mapping.id })
  return fitAfter(manager, mapping, { document: mapping.document, terms }, terms)
}

/**
 * How data would fit the mapping after a change.
 *
 * @param mapping as it is stored, with its terms in `stored`
 * @param after the mapping as it would be; terms it would not have are absent
 */
export async function fitAfter(
  manager: EntityManager,
  mapping: VersionedMapping,
  after: MappingState,
  stored: readonly Pick<Term, 'id' | 'places'>[],
): Promise<Fit> {
  const { smiles } = await manager.findOneByOrFail(Polymer, { id: mapping.polymerId })
  const unit = await parseRepeatUnit(smiles)
  const states = await statesOf(manager, mapping, stored)
  const placesAfter = new Map(after.terms.map(({ id, places }) => [id, places]))
  const known = new Map<string, string | null>()

  const find = (termId: string, version: number): string | null => {
    const [before, places] = [states.get(version), placesAfter.get(termId)]
    if (places === undefined) return 'The mapping no longer has this term.'
    const placesBefore = before?.terms.find(({ id }) => id === termId)?.places ?? []
    const then = { document: before?.document ?? after.document, places: placesBefore }
    const change = makeUpChange(unit, then, { document: after.document, places })
    return change === null ? null : `Measured on version ${version} of the mapping. ${change}`
  }
  return {
    reason: (termId, version) => {
      const key = `${termId} ${version}`
      const reason = known.has(key) ? (known.get(key) as string | null) : find(termId, version)
      known.set(key, reason)
      return reason
    },
  }
}

/** Every version of a mapping by its number, the newest as it is stored. */
async function statesOf(
  manager: EntityManager,
  { id, version, document }: VersionedMapping,
  stored: MappingState['terms'],
): Promise<Map<number, MappingState>> {
  const versions = version === 1 ? [] : await manager.findBy(MappingVersion, { mappingId: id })
  const states = versions.map(({ number, document: frozen, terms }): [number, MappingState] => [
    number,
    { document: frozen, terms: terms.map(({ termId, places }) => ({ id: termId, places: [...places] })) },
  ])
  return new Map([...states, [version, { document, terms: stored }]])
}
