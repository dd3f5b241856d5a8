import type { DataSource } from 'typeorm'
import type { UndeliveredMail } from '../../shared/contracts/people'
import type { Member } from './member'

/** Mails shown at most. */
const SHOWN = 100

/** A mail that goes out at once is nothing to tell of: one counts as waiting once a try has failed, or after this. */
const SOON = '2 minutes'

/** What became of a group's e-mails. */
export class MailService {
  constructor(private readonly dataSource: DataSource) {}

  /** Mails that were given up, or wait for the mail server; the newest first. */
  async undelivered({ groupId }: Member): Promise<UndeliveredMail[]> {
    const rows: Row[] = await this.dataSource.query(
      `select "id", "to", "subject", "created_at" as "createdAt", "failed_at" as "failedAt", "last_error" as "lastError"
         from "mail"
        where "group_id" = $1 and "sent_at" is null
          and ("last_error" is not null or "created_at" < now() - interval '${SOON}')
        order by "created_at" desc, "id" limit $2`,
      [groupId, SHOWN],
    )
    return rows.map(({ createdAt, failedAt, ...rest }) => {
      return { ...rest, createdAt: createdAt.toISOString(), failedAt: failedAt?.toISOString() ?? null }
    })
  }
}

type Row = Omit<UndeliveredMail, 'createdAt' | 'failedAt'> & {
  readonly createdAt: Date
  readonly failedAt: Date | null
}
