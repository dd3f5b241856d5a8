import type { EntityManager } from 'typeorm'
import { parseRepeatUnit } from '../../shared/chemistry'
import { type DerivedTerm, deriveTerms, type MappingDocument } from '../../shared/mapping'
import type { Mapping } from '../entities/mapping.entity'
import { Term } from '../entities/term.entity'
import { matchTerms, type TermChanges } from './match-terms'

/** The mapping whose terms are brought up to date, and the two documents between which it changes. */
export interface TermSync {
  readonly mapping: Pick<Mapping, 'id' | 'groupId'>
  readonly smiles: string
  readonly before: MappingDocument
  readonly after: MappingDocument
}

/** What a change of the document does to the terms of a mapping. */
export interface TermPlan extends TermChanges {
  readonly derived: readonly DerivedTerm[]
  readonly stored: readonly Term[]
}

/**
 * Derives the terms of a mapping anew and finds which stored one each of them is. Nothing is written.
 *
 * @throws {InvalidInputError} when the document does not fit the repeat unit
 */
export async function planTerms(manager: EntityManager, sync: TermSync): Promise<TermPlan> {
  const { mapping, before, after } = sync
  const derived = deriveTerms(await parseRepeatUnit(sync.smiles), after)
  const stored = await manager.findBy(Term, { mappingId: mapping.id })
  return { ...matchTerms(stored, derived, before, after), derived, stored }
}
