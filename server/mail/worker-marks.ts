import { Client, type Pool } from 'pg'

/** Any number, the same for every process on one database: the first part of a living worker's mark. */
const MARK = 4_300_102

/**
 * Marks the workers of this process as alive: each by an advisory lock on a connection of their own, which the database takes
 * away when the process is gone, however it went. The queue itself would leave the jobs of a killed worker alone for four hours.
 */
export interface WorkerMarks {
  /** Marks a worker. */
  add(workerId: string): Promise<void>
  /** Takes all marks away. */
  close(): Promise<void>
}

/**
 * @param onLost told once when the connection breaks: the workers are alive but no longer marked
 */
export async function openWorkerMarks(
  databaseUrl: string,
  onLost: (error: Error) => void,
): Promise<WorkerMarks> {
  const client = new Client({ connectionString: databaseUrl, application_name: 'beadwright worker' })
  client.on('error', onLost)
  await client.connect()
  // Of a machine that vanished without a word the database learns within about a minute.
  await client.query('set tcp_keepalives_idle = 30')
  await client.query('set tcp_keepalives_interval = 10')
  await client.query('set tcp_keepalives_count = 3')
  return {
    add: async (workerId) => {
      await client.query('select pg_advisory_lock($1, hashtext($2))', [MARK, workerId])
    },
    close: () => client.end(),
  }
}

/** Gives the jobs of workers that bear no mark back to the queue, and says of how many workers. */
export async function freeJobsOfTheDead(pool: Pool): Promise<number> {
  const client = await pool.connect()
  try {
    await client.query('begin')
    const { rows } = await client.query<{ dead: string[] | null }>(
      `select array_agg("worker") as "dead"
         from (select distinct "locked_by" as "worker" from graphile_worker.jobs where "locked_by" is not null) held
        where pg_try_advisory_xact_lock($1, hashtext("worker"))`,
      [MARK],
    )
    const dead = rows[0]?.dead ?? []
    if (dead.length > 0) await client.query('select graphile_worker.force_unlock_workers($1)', [dead])
    await client.query('commit')
    client.release()
    return dead.length
  } catch (error) {
    client.release(true)
    throw error
  }
}
