import type { EntityManager } from 'typeorm'
import type { ReceivedEntry } from '../../../shared/contracts/delivery'

/** The hand-overs that were sent to an account or its address and not revoked, the newest first. */
export async function receivedEntries(manager: EntityManager, userId: string): Promise<ReceivedEntry[]> {
  const rows: Row[] = await manager.query(
    `select distinct on (h."released_at", h."id") h."id", h."number", h."title", h."frozen"->>'group' as "group",
            h."frozen"->'polymer'->>'name' as "polymer", r."sent_at" as "sentAt", r."acknowledged_at" as "acknowledgedAt",
            h."standing" = 'withdrawn' as "withdrawn",
            (select max(n."number") from "hand_over" n
              where n."previous_id" = h."id" and n."standing" = 'released') as "replacedBy"
       from "recipient" r join "hand_over" h on h."id" = r."hand_over_id"
      where r."revoked_at" is null
        and (r."user_id" = $1 or r."email" = (select u."email" from "user" u where u."id" = $1))
      order by h."released_at" desc, h."id", r."sent_at" desc`,
    [userId],
  )
  return rows.map(({ sentAt, acknowledgedAt, ...rest }) => ({
    ...rest,
    sentAt: sentAt.toISOString(),
    acknowledgedAt: acknowledgedAt?.toISOString() ?? null,
  }))
}

type Row = Omit<ReceivedEntry, 'sentAt' | 'acknowledgedAt'> & {
  readonly sentAt: Date
  readonly acknowledgedAt: Date | null
}
