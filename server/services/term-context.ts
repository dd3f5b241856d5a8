import type { EntityManager } from 'typeorm'
import { Mapping } from '../entities/mapping.entity'
import { StatePoint } from '../entities/state-point.entity'
import { Term } from '../entities/term.entity'
import { HttpError, notFound } from '../errors/http-error'

/** A term that data may be written to, with its mapping held still. */
export interface TermContext {
  readonly mapping: Mapping
  readonly term: Term
}

/**
 * Locks a term for writing data to it. The mapping is locked against saving first, so that a save cannot make the term
 * vanish under the data; then the term, so that two uploads come one after the other.
 *
 * @throws {HttpError} NOT_FOUND; TERM_GONE when the mapping no longer has the term
 */
export async function lockTerm(
  manager: EntityManager,
  groupId: string,
  termId: string,
): Promise<TermContext> {
  const { mappingId } = await findTerm(manager, groupId, termId)
  const mapping = await manager.findOne(Mapping, {
    where: { id: mappingId, groupId },
    lock: { mode: 'pessimistic_read' },
  })
  const term = await manager.findOne(Term, {
    where: { id: termId, groupId },
    lock: { mode: 'pessimistic_write' },
  })
  if (!mapping || !term) throw notFound('term')
  if (!term.current) {
    throw new HttpError(
      'TERM_GONE',
      'The mapping no longer has this term. What stands on it can be read, but nothing new goes in.',
    )
  }
  return { mapping, term }
}

/** @throws {HttpError} NOT_FOUND */
export async function findTerm(manager: EntityManager, groupId: string, termId: string): Promise<Term> {
  const term = await manager.findOneBy(Term, { id: termId, groupId })
  if (!term) throw notFound('term')
  return term
}

/**
 * A state point named in a request, which must belong to the polymer at hand.
 *
 * @throws {HttpError} NOT_FOUND with the field that named it
 */
export async function findStatePoint(
  manager: EntityManager,
  groupId: string,
  polymerId: string,
  statePointId: string,
  field: string,
): Promise<StatePoint> {
  const point = await manager.findOneBy(StatePoint, { id: statePointId, groupId, polymerId })
  if (!point) throw notFound('state point of this polymer', field)
  return point
}

/** The mapping of a term. */
export async function mappingOf(manager: EntityManager, { mappingId }: Term): Promise<Mapping> {
  return manager.findOneByOrFail(Mapping, { id: mappingId })
}
