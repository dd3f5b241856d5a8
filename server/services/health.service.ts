import type { DataSource } from 'typeorm'
import type { Health } from '../../shared/contracts/health'

const PATIENCE = 3_000

/** Whether the server can do its work. */
export class HealthService {
  constructor(
    private readonly dataSource: DataSource,
    private readonly version: string,
  ) {}

  /** Asks the database a question; one that does not answer within three seconds counts as down. */
  async check(): Promise<Health> {
    const database = await Promise.race([this.databaseAnswers(), patienceEnds()])
    return { status: database ? 'ok' : 'unavailable', database, version: this.version }
  }

  private async databaseAnswers(): Promise<boolean> {
    try {
      await this.dataSource.query('select 1')
      return true
    } catch {
      return false
    }
  }
}

function patienceEnds(): Promise<false> {
  return new Promise((resolve) => setTimeout(() => resolve(false), PATIENCE).unref())
}
