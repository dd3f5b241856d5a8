import type { EntityManager } from 'typeorm'
import type { HistoryAction, HistoryDetails } from '../../shared/contracts/history'
import { Event } from '../entities/event.entity'

/** Who did it: a member, or someone without an account, or a script, by the name in `by`. */
export interface Actor {
  readonly groupId: string
  readonly userId: string | null
  readonly by?: string
}

/** What was done, to what. */
export interface EventRecord {
  readonly action: HistoryAction
  readonly subject: { readonly kind: string; readonly id: string | null; readonly name: string }
  readonly details?: HistoryDetails
}

/**
 * Writes one line of the group's history.
 *
 * @param manager the transaction of what is done: the line stands exactly when the deed does
 */
export async function recordEvent(manager: EntityManager, actor: Actor, event: EventRecord): Promise<void> {
  const { groupId, userId, by = null } = actor
  const { action, subject, details = {} } = event
  await manager.insert(Event, {
    groupId,
    userId,
    by,
    action,
    subjectKind: subject.kind,
    subjectId: subject.id,
    subjectName: subject.name,
    details,
  })
}
