import { randomBytes } from 'node:crypto'
import type { DataSource, EntityManager } from 'typeorm'
import type { SetUp } from '../../shared/contracts/session'
import { SetUpLink } from '../entities/set-up-link.entity'
import { User } from '../entities/user.entity'
import { HttpError } from '../errors/http-error'
import type { GroupService } from './group.service'
import { sha256 } from './hashes'

/** Whoever holds this lock decides whether the first owner is in. */
const SET_UP_LOCK = 4_300_101

/** The first owner and the first group, by a link that works once. */
export class SetUpService {
  constructor(
    private readonly dataSource: DataSource,
    private readonly groups: GroupService,
  ) {}

  /**
   * Makes a link as long as nobody but the demo's people is here. Links made before stay good until one of them is used.
   *
   * @returns the token, which is kept nowhere; null when the first owner is in
   */
  async offer(): Promise<string | null> {
    if (!(await isOpen(this.dataSource.manager))) return null
    const token = randomBytes(32).toString('base64url')
    await this.dataSource.manager.insert(SetUpLink, { tokenSha256: sha256(token) })
    return token
  }

  /** @throws {HttpError} SET_UP_LINK_INVALID when the link was never good or has been used */
  async check(token: string): Promise<void> {
    const known = await this.dataSource.manager.existsBy(SetUpLink, { tokenSha256: sha256(token) })
    if (!known || !(await isOpen(this.dataSource.manager))) throw linkInvalid()
  }

  /**
   * Founds the first group with its owner and uses up the link, in one transaction.
   *
   * @returns the id of the owner
   * @throws {HttpError} SET_UP_LINK_INVALID; NAME_TAKEN when one of the demo's people has the address
   */
  async complete({ token, groupName, name, email, password }: SetUp): Promise<string> {
    await this.check(token)
    return this.dataSource.transaction(async (manager) => {
      await manager.query('select pg_advisory_xact_lock($1)', [SET_UP_LOCK])
      const used = await manager.delete(SetUpLink, { tokenSha256: sha256(token) })
      if (used.affected !== 1 || !(await isOpen(manager))) throw linkInvalid()
      const people = [{ name, email, password, role: 'owner' as const }]
      const [owner] = await this.groups.found({ name: groupName, demo: false, people }, manager)
      await manager.deleteAll(SetUpLink)
      return owner.userId
    })
  }
}

async function isOpen(manager: EntityManager): Promise<boolean> {
  return !(await manager.existsBy(User, { demo: false }))
}

function linkInvalid(): HttpError {
  return new HttpError(
    'SET_UP_LINK_INVALID',
    'This set-up link does not work, or it has been used. Start the server again for a new one, or sign in.',
  )
}
