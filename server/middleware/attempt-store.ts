import type { ClientRateLimitInfo, Options, Store } from 'express-rate-limit'
import type { Logger } from 'pino'
import { HttpError } from '../errors/http-error'
import type { AttemptService } from '../services/attempt.service'

/** Where the limits keep their counts: in the database, one for all server processes, under a name of their own. */
export class AttemptStore implements Store {
  readonly localKeys = false
  private windowMs = 0

  /** @param prefix says what is counted, and keeps the counts of two limits apart */
  constructor(
    private readonly attempts: AttemptService,
    readonly prefix: string,
    private readonly logger: Logger,
  ) {}

  init({ windowMs }: Options): void {
    this.windowMs = windowMs
  }

  /** @throws {HttpError} UNAVAILABLE whenever it cannot be counted, for whatever reason: then nobody passes */
  async increment(key: string): Promise<ClientRateLimitInfo> {
    try {
      const { count, endsAt } = await this.attempts.count(this.keyOf(key), this.windowMs)
      return { totalHits: count, resetTime: endsAt }
    } catch (error) {
      this.logger.error({ err: error }, 'attempt not counted')
      throw new HttpError('UNAVAILABLE', 'This cannot be done at the moment. Try again in a minute.')
    }
  }

  /** Comes after the answer has gone out, where nobody could catch an error: a count too high is the safe side. */
  async decrement(key: string): Promise<void> {
    try {
      await this.attempts.takeBack(this.keyOf(key))
    } catch (error) {
      this.logger.error({ err: error }, 'attempt not taken back')
    }
  }

  async resetKey(key: string): Promise<void> {
    await this.attempts.forget(this.keyOf(key))
  }

  private keyOf(key: string): string {
    return `${this.prefix} ${key}`
  }
}
