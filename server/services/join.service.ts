import type { DataSource, EntityManager } from 'typeorm'
import type { JoinNew, JoinOffer } from '../../shared/contracts/people'
import { Invitation } from '../entities/invitation.entity'
import { Membership } from '../entities/membership.entity'
import { User } from '../entities/user.entity'
import { HttpError } from '../errors/http-error'
import { sha256 } from './hashes'
import { linkInvalid } from './link-invalid'
import { hashPassword } from './passwords'
import { personOf } from './people'
import { recordEvent } from './record-event'

/** What someone who was invited does with the link. */
export class JoinService {
  constructor(private readonly dataSource: DataSource) {}

  /** What a link leads to. @throws {HttpError} LINK_INVALID with the reason */
  async offer(token: string): Promise<JoinOffer> {
    const { manager } = this.dataSource
    const invitation = await findOpen(manager, token)
    const { email, role, expiresAt, group, invitedBy } = invitation
    return {
      groupName: group?.name ?? '',
      demo: group?.demo ?? false,
      role,
      email,
      invitedBy: personOf(invitedBy),
      expiresAt: expiresAt.toISOString(),
      hasAccount: await manager.existsBy(User, { email }),
    }
  }

  /**
   * Makes an account for the address that was invited, and joins with it. The link proves the address.
   *
   * @returns the id of the person
   * @throws {HttpError} LINK_INVALID with the reason; NAME_TAKEN when the address has an account: sign in with it instead
   */
  async joinNew(token: string, { name, password }: JoinNew): Promise<string> {
    await findOpen(this.dataSource.manager, token)
    const passwordHash = await hashPassword(password)
    return this.dataSource.transaction(async (manager) => {
      const invitation = await lockOpen(manager, token)
      const { email, group } = invitation
      // Whoever comes into the demo is one of its people, and stays there.
      const user = await manager.save(User, { name, email, passwordHash, demo: group?.demo ?? false })
      await join(manager, invitation, user)
      return user.id
    })
  }

  /**
   * Joins as someone who is signed in, whatever their address.
   *
   * @throws {HttpError} LINK_INVALID with the reason; ALREADY_MEMBER; FORBIDDEN for one of the demo's people in a real group
   */
  async join(token: string, userId: string): Promise<void> {
    await this.dataSource.transaction(async (manager) => {
      const invitation = await lockOpen(manager, token)
      const user = await manager.findOneBy(User, { id: userId })
      if (!user) throw new HttpError('NOT_SIGNED_IN', 'Sign in first.')
      if (user.demo && invitation.group?.demo !== true) {
        throw new HttpError('FORBIDDEN', 'The people of the demo are invented: they join no other group.')
      }
      if (await manager.existsBy(Membership, { groupId: invitation.groupId, userId })) {
        throw new HttpError('ALREADY_MEMBER', 'You are in this group.')
      }
      await join(manager, invitation, user)
    })
  }
}

async function join(manager: EntityManager, invitation: Invitation, user: User): Promise<void> {
  const { id, groupId, role, email } = invitation
  await manager.update(Invitation, { id }, { acceptedAt: new Date() })
  await manager.insert(Membership, { groupId, userId: user.id, role })
  await manager.update(User, { id: user.id }, { currentGroupId: groupId })
  await recordEvent(
    manager,
    { groupId, userId: user.id },
    {
      action: 'member joined',
      subject: { kind: 'member', id: user.id, name: user.name },
      details: { role, invited: email },
    },
  )
}

async function lockOpen(manager: EntityManager, token: string): Promise<Invitation> {
  await manager.query('select 1 from "invitation" where "token_sha256" = $1 for update', [sha256(token)])
  return findOpen(manager, token)
}

async function findOpen(manager: EntityManager, token: string): Promise<Invitation> {
  const invitation = await manager.findOne(Invitation, {
    where: { tokenSha256: sha256(token) },
    relations: { group: true, invitedBy: true },
  })
  if (!invitation) throw linkInvalid('unknown')
  if (invitation.acceptedAt) throw linkInvalid('used')
  if (invitation.revokedAt) throw linkInvalid('revoked')
  if (invitation.expiresAt <= new Date()) throw linkInvalid('expired')
  return invitation
}
