import type { DataSource } from 'typeorm'
import { sha256 } from './hashes'

/** Where a count stands. */
export interface AttemptCount {
  readonly count: number
  /** When the window ends and counting starts anew. */
  readonly endsAt: Date
}

/** Rows taken away each time a window begins, so that those of windows long over do not pile up. */
const CLEARED_AT_ONCE = 100

/** Counts attempts for all server processes together. */
export class AttemptService {
  constructor(private readonly dataSource: DataSource) {}

  /**
   * Counts one more, in one statement: of two at once each gets its own number.
   *
   * @param key what is counted
   * @param milliseconds length of a window, from its first attempt on
   */
  async count(key: string, milliseconds: number): Promise<AttemptCount> {
    const rows: AttemptCount[] = await this.dataSource.query(
      `insert into "attempt" as a ("key", "count", "ends_at")
       values ($1, 1, now() + $2 * interval '1 millisecond')
       on conflict ("key") do update set
         "count" = case when a."ends_at" <= now() then 1 else a."count" + 1 end,
         "ends_at" = case when a."ends_at" <= now() then excluded."ends_at" else a."ends_at" end
       returning "count", "ends_at" as "endsAt"`,
      [sha256(key), milliseconds],
    )
    if (rows[0].count === 1) await this.clearEnded()
    return rows[0]
  }

  /** Takes one back: it was not what is counted after all. */
  async takeBack(key: string): Promise<void> {
    await this.dataSource.query(
      `update "attempt" set "count" = "count" - 1 where "key" = $1 and "count" > 0`,
      [sha256(key)],
    )
  }

  /** Begins anew. */
  async forget(key: string): Promise<void> {
    await this.dataSource.query(`delete from "attempt" where "key" = $1`, [sha256(key)])
  }

  private async clearEnded(): Promise<void> {
    await this.dataSource.query(
      `delete from "attempt" where "key" in (
         select "key" from "attempt" where "ends_at" <= now() order by "ends_at" limit $1 for update skip locked)`,
      [CLEARED_AT_ONCE],
    )
  }
}
