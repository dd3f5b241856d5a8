import { In, type EntityManager } from 'typeorm'
import type { DerivedTerm } from '../../shared/mapping'
import { Term } from '../entities/term.entity'
import { planTerms, type TermSync } from './plan-terms'

/**
 * Derives the terms of a mapping anew and carries the stored ones over, so that data stay with the term they belong to.
 * Terms that vanish stay without being current while data stand on them, and are deleted otherwise. Call it in the
 * transaction that saves the mapping, with the mapping's row locked.
 *
 * @throws {InvalidInputError} when the document does not fit the repeat unit
 */
export async function syncTerms(manager: EntityManager, sync: TermSync): Promise<void> {
  const { mapping } = sync
  const { kept, added, vanished, derived } = await planTerms(manager, sync)
  const position = new Map(derived.map((term, index) => [term, index]))

  if (vanished.length > 0) {
    const withData = await termsWithData(manager, vanished)
    await manager.delete(Term, { id: In(vanished.filter((id) => !withData.has(id))) })
    await manager.update(Term, { id: In([...withData]) }, { current: false })
  }
  // Two terms may swap their names: first none of them is current, so that no two are current under one name at a time.
  if (kept.length > 0) await manager.update(Term, { id: In(kept.map(({ id }) => id)) }, { current: false })
  for (const { id, term } of kept)
    await manager.update(Term, { id }, columnsOf(term, position.get(term) ?? 0))
  await manager.insert(
    Term,
    added.map((term) => ({
      groupId: mapping.groupId,
      mappingId: mapping.id,
      ...columnsOf(term, position.get(term) ?? 0),
    })),
  )
}

function columnsOf({ kind, types, places, placeKey }: DerivedTerm, position: number) {
  return { kind, types, places, placeKey, position, current: true }
}

async function termsWithData(manager: EntityManager, ids: readonly string[]): Promise<Set<string>> {
  const rows: { id: string }[] = await manager.query(
    `select t."id" from "term" t
      where t."id" = any($1)
        and (exists (select 1 from "distribution" d where d."term_id" = t."id")
          or exists (select 1 from "joint_distribution" j where t."id" in (j."first_term_id", j."second_term_id")))`,
    [ids],
  )
  return new Set(rows.map(({ id }) => id))
}
