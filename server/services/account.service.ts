import type { DataSource } from 'typeorm'
import type { PasswordChange } from '../../shared/contracts/people'
import { Membership } from '../entities/membership.entity'
import { User } from '../entities/user.entity'
import { HttpError, notFound } from '../errors/http-error'
import { endSessionsOf } from './end-sessions'
import { hashPassword, verifyPassword } from './passwords'

/** What a person changes about their own account. */
export class AccountService {
  constructor(private readonly dataSource: DataSource) {}

  /** Takes another name. What was recorded before keeps showing who did it, under the new name. */
  async rename(userId: string, name: string): Promise<void> {
    await this.dataSource.manager.update(User, { id: userId }, { name })
  }

  /**
   * Sets another password and signs the person out everywhere.
   *
   * @throws {HttpError} SIGN_IN_FAILED when `current` is not the password of today; FORBIDDEN for people of the demo
   */
  async changePassword(userId: string, { current, password }: PasswordChange): Promise<void> {
    const user = await this.dataSource.manager.findOneOrFail(User, {
      where: { id: userId },
      select: { id: true, demo: true, passwordHash: true },
    })
    if (user.demo) throw new HttpError('FORBIDDEN', 'The people of the demo sign in without a password.')
    if (!(await verifyPassword(current, user.passwordHash))) {
      throw new HttpError('SIGN_IN_FAILED', 'This is not your password of today.', { field: 'current' })
    }
    const passwordHash = await hashPassword(password)
    await this.dataSource.transaction(async (manager) => {
      await manager.update(User, { id: userId }, { passwordHash })
      await endSessionsOf(manager, userId)
    })
  }

  /** Remembers whose work the person looks at. @throws {HttpError} NOT_FOUND for a group they are not in */
  async chooseGroup(userId: string, groupId: string): Promise<void> {
    if (!(await this.dataSource.manager.existsBy(Membership, { userId, groupId }))) throw notFound('group')
    await this.dataSource.manager.update(User, { id: userId }, { currentGroupId: groupId })
  }
}
