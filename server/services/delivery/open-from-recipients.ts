import type { EntityManager } from 'typeorm'
import type { Waiting } from '../../../shared/contracts/hand-over-desk'
import type { Member } from '../member'

type Who = Pick<Member, 'groupId' | 'userId'>

/** Hand-overs that somebody answers for: their own, and for an owner those whose author has left. */
const MINE = `h."group_id" = $1 and (h."author_id" = $2 or exists (
    select 1 from "membership" m where m."group_id" = $1 and m."user_id" = $2 and m."role" = 'owner'
       and not exists (select 1 from "membership" a where a."group_id" = $1 and a."user_id" = h."author_id")))`

/** Questions on somebody's tables that nobody has answered, the oldest first. */
export function openQuestions(
  manager: EntityManager,
  { groupId, userId }: Who,
): Promise<Waiting['questions']> {
  return manager.query(
    `select q."id", h."id" as "handOverId", h."number", q."table_name" as "table", q."text"
       from "question" q join "hand_over" h on h."id" = q."hand_over_id"
      where q."answered_at" is null and ${MINE} order by q."asked_at"`,
    [groupId, userId],
  )
}

/** Files sent back for somebody's tables that nobody has looked at, the oldest first. */
export function openReturns(manager: EntityManager, { groupId, userId }: Who): Promise<Waiting['returned']> {
  return manager.query(
    `select f."id", h."id" as "handOverId", h."number", f."table_name" as "table", f."name"
       from "returned_file" f join "recipient" r on r."id" = f."recipient_id"
       join "hand_over" h on h."id" = r."hand_over_id"
      where f."standing" = 'new' and ${MINE} order by f."returned_at"`,
    [groupId, userId],
  )
}
