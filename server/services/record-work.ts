import { In, type EntityManager } from 'typeorm'
import type { HistoryAction, HistoryDetails } from '../../shared/contracts/history'
import { Mapping } from '../entities/mapping.entity'
import { Polymer } from '../entities/polymer.entity'
import { StatePoint } from '../entities/state-point.entity'
import { Term } from '../entities/term.entity'
import { type Actor, recordEvent } from './record-event'
import { storedTermName } from './stored-term-name'

/** Writes a line of the history about a polymer. */
export async function recordPolymer(
  manager: EntityManager,
  actor: Actor,
  action: HistoryAction,
  { id, name }: Pick<Polymer, 'id' | 'name'>,
  details: HistoryDetails = {},
): Promise<void> {
  await recordEvent(manager, actor, { action, subject: { kind: 'polymer', id, name }, details })
}

/** Writes a line of the history about a state point, named by its temperature and its polymer. */
export async function recordStatePoint(
  manager: EntityManager,
  actor: Actor,
  action: HistoryAction,
  { id, polymerId, temperature }: StatePoint,
): Promise<void> {
  const polymer = await manager.findOneByOrFail(Polymer, { id: polymerId })
  const name = `${temperature} K of ${polymer.name}`
  await recordEvent(manager, actor, { action, subject: { kind: 'state point', id, name } })
}

/** Writes a line of the history about a mapping, named with its polymer. */
export async function recordMapping(
  manager: EntityManager,
  actor: Actor,
  action: HistoryAction,
  mapping: Pick<Mapping, 'id' | 'name' | 'polymerId'>,
  details: HistoryDetails = {},
): Promise<void> {
  const subject = { kind: 'mapping', id: mapping.id, name: await mappingName(manager, mapping) }
  await recordEvent(manager, actor, { action, subject, details })
}

/** What was done to a term, or to two terms together, at a state point. */
export interface TermWork {
  readonly termIds: readonly string[]
  readonly statePointId: string
  readonly details?: HistoryDetails
}

/** Writes a line of the history about terms, named with their mapping and polymer. Call it before anything is deleted. */
export async function recordTerms(
  manager: EntityManager,
  actor: Actor,
  action: HistoryAction,
  { termIds, statePointId, details = {} }: TermWork,
): Promise<void> {
  const [id] = termIds
  const { mappingId } = await manager.findOneByOrFail(Term, { id: In([...termIds]) })
  const mapping = await manager.findOneByOrFail(Mapping, { id: mappingId })
  const terms = await manager.find(Term, {
    where: { mappingId },
    order: { current: 'DESC', position: 'ASC', id: 'ASC' },
  })
  const names = termIds.flatMap((termId) => {
    const term = terms.find((each) => each.id === termId)
    return term ? [storedTermName(term, terms)] : []
  })
  const { temperature } = await manager.findOneByOrFail(StatePoint, { id: statePointId })
  const name = `${names.join(' and ')} of ${await mappingName(manager, mapping)}`
  const place = { temperature: `${temperature} K` }
  await recordEvent(manager, actor, {
    action,
    subject: { kind: 'term', id, name },
    details: { ...place, ...details },
  })
}

async function mappingName(
  manager: EntityManager,
  { name, polymerId }: Pick<Mapping, 'name' | 'polymerId'>,
): Promise<string> {
  const polymer = await manager.findOneByOrFail(Polymer, { id: polymerId })
  return `${polymer.name}, ${name}`
}
