import { randomBytes } from 'node:crypto'
import { IsNull, type DataSource, type EntityManager } from 'typeorm'
import {
  type ApiKey as KeyBody,
  type ApiKeyCreate,
  type ApiKeyMade,
  KEY_MARK,
  type KeyHolder,
  type KeyScope,
  MAX_KEYS,
} from '../../shared/contracts/key'
import type { HistoryAction } from '../../shared/contracts/history'
import { ApiKey } from '../entities/api-key.entity'
import { Membership } from '../entities/membership.entity'
import { HttpError, notFound } from '../errors/http-error'
import { sha256 } from './hashes'
import { recordEvent } from './record-event'
import type { SessionService } from './session.service'

/** Random bits of a key: what nobody guesses. */
const RANDOM_BYTES = 32
/** Signs of a key that stay visible, its mark included: 48 of the random bits beyond the 256 of the rest. */
const PREFIX_BYTES = 6
const MAX_LENGTH = 200

/** Whom a script acts for, by a key that works. */
export interface ActingKey {
  readonly id: string
  readonly name: string
  readonly userId: string
  readonly scopes: readonly KeyScope[]
}

/** Keys by which scripts act for people. */
export class KeyService {
  /** @param demo keys of the demo's people work, as they themselves may sign in, only while the demo is on */
  constructor(
    private readonly dataSource: DataSource,
    private readonly sessions: SessionService,
    private readonly demo: boolean,
  ) {}

  /** Keys of a person, the newest first, revoked ones too. */
  async list(userId: string): Promise<KeyBody[]> {
    const keys = await this.dataSource.manager.find(ApiKey, {
      where: { userId },
      order: { createdAt: 'DESC', id: 'ASC' },
    })
    return keys.map(keyBody)
  }

  /**
   * Makes a key. The history of each group of the person says so, since the key reaches all of them.
   *
   * @returns with the key itself, which is kept nowhere
   * @throws {HttpError} VALIDATION_FAILED for an end in the past; TOO_MANY_KEYS
   */
  async make(userId: string, { name, scopes, expiresAt }: ApiKeyCreate): Promise<ApiKeyMade> {
    const end = expiresAt === null ? null : new Date(expiresAt)
    if (end !== null && end.getTime() <= Date.now()) {
      throw new HttpError('VALIDATION_FAILED', 'Choose a day to come.', { field: 'expiresAt' })
    }
    const prefix = KEY_MARK + randomBytes(PREFIX_BYTES).toString('base64url')
    const key = prefix + randomBytes(RANDOM_BYTES).toString('base64url')
    return this.dataSource.transaction(async (manager) => {
      // Two requests at once would both find room for one more.
      await manager.query('select 1 from "user" where "id" = $1 for update', [userId])
      const working = await manager.query<{ count: number }[]>(
        `select count(*)::int as count from "api_key"
          where "user_id" = $1 and "revoked_at" is null and ("expires_at" is null or "expires_at" > now())`,
        [userId],
      )
      if (working[0].count >= MAX_KEYS) {
        throw new HttpError('TOO_MANY_KEYS', `You have ${MAX_KEYS} keys that work. Revoke one first.`)
      }
      const row = { userId, name, scopes, prefix, sha256: sha256(key), expiresAt: end }
      const saved = await manager.save(ApiKey, manager.create(ApiKey, row))
      await record(manager, 'key made', saved)
      const made = await manager.findOneByOrFail(ApiKey, { id: saved.id })
      return { key, made: keyBody(made) }
    })
  }

  /**
   * Ends a key at once and for good.
   *
   * @throws {HttpError} NOT_FOUND for someone else's, and for one revoked before
   */
  async revoke(userId: string, id: string): Promise<void> {
    await this.dataSource.transaction(async (manager) => {
      const key = await manager.findOneBy(ApiKey, { id, userId, revokedAt: IsNull() })
      const revoked =
        key && (await manager.update(ApiKey, { id, revokedAt: IsNull() }, { revokedAt: new Date() }))
      if (!key || revoked?.affected !== 1) throw notFound('key')
      await record(manager, 'key revoked', key)
    })
  }

  /**
   * The person behind a key.
   *
   * @throws {HttpError} KEY_INVALID, KEY_REVOKED, KEY_EXPIRED
   */
  async authenticate(secret: string): Promise<ActingKey> {
    const key = secret.length <= MAX_LENGTH ? await this.find(secret) : null
    if (!key || (key.user?.demo && !this.demo))
      throw new HttpError('KEY_INVALID', 'This key is not known here.')
    if (key.revokedAt !== null) throw new HttpError('KEY_REVOKED', 'This key was revoked. Make a new one.')
    if (key.expiresAt !== null && key.expiresAt.getTime() <= Date.now()) {
      throw new HttpError('KEY_EXPIRED', 'This key is out of date. Make a new one.')
    }
    await this.dataSource.query(
      `update "api_key" set "last_used_at" = now()
        where "id" = $1 and ("last_used_at" is null or "last_used_at" < now() - interval '1 minute')`,
      [key.id],
    )
    return { id: key.id, name: key.name, userId: key.userId, scopes: key.scopes }
  }

  /** For whom a script acts, and in which groups. */
  async holder({ id, userId }: ActingKey): Promise<KeyHolder> {
    const key = await this.dataSource.manager.findOneByOrFail(ApiKey, { id })
    const person = await this.sessions.describe(userId)
    if (!person) throw new HttpError('KEY_INVALID', 'This key is not known here.')
    return {
      key: keyBody(key),
      person: { id: person.id, name: person.name, memberships: person.memberships },
    }
  }

  private find(secret: string): Promise<ApiKey | null> {
    return this.dataSource.manager.findOne(ApiKey, {
      where: { sha256: sha256(secret) },
      relations: { user: true },
    })
  }
}

async function record(manager: EntityManager, action: HistoryAction, key: ApiKey): Promise<void> {
  const { id, userId, name, prefix, scopes, expiresAt } = key
  for (const { groupId } of await manager.findBy(Membership, { userId })) {
    await recordEvent(
      manager,
      { groupId, userId },
      {
        action,
        subject: { kind: 'key', id, name },
        details: { prefix, scopes: scopes.join(', '), expires: expiresAt?.toISOString() ?? null },
      },
    )
  }
}

function keyBody({ id, name, scopes, prefix, createdAt, expiresAt, lastUsedAt, revokedAt }: ApiKey): KeyBody {
  return {
    id,
    name,
    scopes,
    prefix,
    createdAt: createdAt.toISOString(),
    expiresAt: expiresAt?.toISOString() ?? null,
    lastUsedAt: lastUsedAt?.toISOString() ?? null,
    revokedAt: revokedAt?.toISOString() ?? null,
  }
}
