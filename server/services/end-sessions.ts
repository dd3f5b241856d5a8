import type { EntityManager } from 'typeorm'

/** Signs a person out in every browser. */
export async function endSessionsOf(manager: EntityManager, userId: string): Promise<void> {
  await manager.query(`delete from "session" where "sess" ->> 'userId' = $1`, [userId])
}
