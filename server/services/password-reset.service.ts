import { setTimeout as delay } from 'node:timers/promises'
import { type DataSource, type EntityManager, LessThanOrEqual, MoreThan } from 'typeorm'
import { RESET_MINUTES } from '../../shared/contracts/people'
import { PasswordReset } from '../entities/password-reset.entity'
import { User } from '../entities/user.entity'
import type { LinkTo } from '../mail/links'
import { queueMail } from '../mail/queue-mail'
import { endSessionsOf } from './end-sessions'
import { sha256 } from './hashes'
import { linkInvalid } from './link-invalid'
import { hashPassword } from './passwords'
import { makeToken } from './tokens'

/** Every request takes this long, in milliseconds: its time does not tell whether the address is known. */
const EVEN_TIME = 250

/** New passwords by a link in an e-mail. */
export class PasswordResetService {
  constructor(
    private readonly dataSource: DataSource,
    private readonly linkTo: LinkTo,
  ) {}

  /** Sends a link to the address if someone signs in with it. Says nothing of whether. */
  async request(email: string): Promise<void> {
    await Promise.all([this.send(email), delay(EVEN_TIME)])
  }

  /** @throws {HttpError} LINK_INVALID */
  async check(token: string): Promise<void> {
    await findOpen(this.dataSource.manager, token)
  }

  /**
   * Sets the new password, ends all links and all sessions of the person, and tells them by e-mail.
   *
   * @throws {HttpError} LINK_INVALID
   */
  async complete(token: string, password: string): Promise<void> {
    await this.check(token)
    const passwordHash = await hashPassword(password)
    await this.dataSource.transaction(async (manager) => {
      await manager.query('select 1 from "password_reset" where "token_sha256" = $1 for update', [
        sha256(token),
      ])
      const { userId, tokenSha256 } = await findOpen(manager, token)
      await manager.update(User, { id: userId }, { passwordHash })
      await manager.delete(PasswordReset, { userId })
      await endSessionsOf(manager, userId)
      const { email } = await manager.findOneByOrFail(User, { id: userId })
      await queueMail(manager, {
        eventKey: `password set, ${tokenSha256}`,
        groupId: null,
        to: email,
        subject: 'Your password was changed',
        text:
          'A new password was set for your account on Beadwright, and all browsers were signed out.\n\n' +
          `If it was not you, set another one now:\n${this.linkTo('/forgot')}`,
      })
    })
  }

  /** The demo's people have no password: whoever looks at the demo signs in as one of them. */
  private async send(email: string): Promise<void> {
    await this.dataSource.transaction(async (manager) => {
      await manager.delete(PasswordReset, { expiresAt: LessThanOrEqual(new Date()) })
      const user = await manager.findOneBy(User, { email, demo: false })
      if (!user) return
      const { token, tokenSha256 } = makeToken()
      const expiresAt = new Date(Date.now() + RESET_MINUTES * 60_000)
      await manager.insert(PasswordReset, { tokenSha256, userId: user.id, expiresAt })
      await queueMail(manager, {
        eventKey: `password reset, ${tokenSha256}`,
        groupId: null,
        to: email,
        subject: 'Set a new password',
        text: [
          'Someone asked for a new password for your account on Beadwright.',
          `Set it here:\n${this.linkTo(`/reset/${token}`)}`,
          `The link works once, for ${RESET_MINUTES} minutes. If it was not you, leave it: nothing changes.`,
        ].join('\n\n'),
      })
    })
  }
}

/** Used and out-of-date links are gone, so that one word must do for all that does not work. */
async function findOpen(manager: EntityManager, token: string): Promise<PasswordReset> {
  const reset = await manager.findOneBy(PasswordReset, {
    tokenSha256: sha256(token),
    expiresAt: MoreThan(new Date()),
  })
  if (!reset) throw linkInvalid('expired')
  return reset
}
