import type { DataSource } from 'typeorm'
import { HOUSE_DEFAULTS } from '../../shared/contracts/group'
import type { DemoUser, Membership as MembershipBody, SignedInUser } from '../../shared/contracts/session'
import { Membership } from '../entities/membership.entity'
import { User } from '../entities/user.entity'
import { HttpError, notFound } from '../errors/http-error'
import { defaultsOf } from './group.service'
import { verifyPassword } from './passwords'

/** Who signs in, and what a browser may know about it. */
export class SessionService {
  /** @param demo the demo's people may sign in without a password */
  constructor(
    private readonly dataSource: DataSource,
    private readonly demo: boolean,
  ) {}

  /**
   * The person behind an address and a password.
   *
   * @returns their id
   * @throws {HttpError} SIGN_IN_FAILED, the same for an unknown address and a wrong password
   */
  async signIn(email: string, password: string): Promise<string> {
    const user = await this.dataSource.manager.findOne(User, {
      where: { email },
      select: { id: true, passwordHash: true },
    })
    if (!(await verifyPassword(password, user?.passwordHash ?? null)) || !user) {
      throw new HttpError('SIGN_IN_FAILED', 'The e-mail address and the password do not belong together.')
    }
    return user.id
  }

  /** One of the demo's people; there are none when the demo is off. */
  async signInDemo(userId: string): Promise<string> {
    const user = this.demo && (await this.dataSource.manager.findOneBy(User, { id: userId, demo: true }))
    if (!user) throw notFound('demo user')
    return user.id
  }

  /** The signed-in person with the groups they belong to; null when the account is gone. */
  async describe(userId: string): Promise<SignedInUser | null> {
    const user = await this.dataSource.manager.findOneBy(User, { id: userId })
    if (!user) return null
    const memberships = await this.dataSource.manager.find(Membership, {
      where: { userId },
      relations: { group: true },
      order: { createdAt: 'ASC' },
    })
    const { id, name, email, currentGroupId } = user
    const current = memberships.find(({ groupId }) => groupId === currentGroupId) ?? memberships.at(0)
    return {
      id,
      name,
      email,
      memberships: memberships.map(membershipBody),
      currentGroupId: current?.groupId ?? null,
    }
  }

  /** The people the sign-in page offers: the demo's, and only while the demo is on. */
  async demoUsers(): Promise<DemoUser[]> {
    if (!this.demo) return []
    const memberships = await this.dataSource.manager.find(Membership, {
      where: { user: { demo: true } },
      relations: { user: true },
      order: { role: 'ASC' },
    })
    return memberships.flatMap(({ user, role }) => (user ? [{ id: user.id, name: user.name, role }] : []))
  }

  /** Signs the demo's people out everywhere: whoever came in without a password goes when the demo is switched off. */
  async endDemoSessions(): Promise<void> {
    await this.dataSource.query(
      `delete from "session" s using "user" u where u."demo" and s."sess" ->> 'userId' = u."id"::text`,
    )
  }
}

function membershipBody({ group, groupId, role }: Membership): MembershipBody {
  const { name = '', demo = false } = group ?? {}
  return { groupId, groupName: name, role, demo, defaults: group ? defaultsOf(group) : HOUSE_DEFAULTS }
}
