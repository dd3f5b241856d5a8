import type { DataSource, EntityManager } from 'typeorm'
import type { Role } from '../../shared/contracts/common'
import type { GroupMember } from '../../shared/contracts/people'
import { Membership } from '../entities/membership.entity'
import { User } from '../entities/user.entity'
import { notFound } from '../errors/http-error'
import { keepAnOwner, lockMembers, lockMembersAsOwner } from './lock-members'
import type { Member } from './member'
import { recordEvent } from './record-event'

/** The people of a group. */
export class MemberService {
  constructor(private readonly dataSource: DataSource) {}

  /** The people of the group, the longest in it first. A collaborator sees themselves only. */
  async list({ groupId, userId, role }: Member): Promise<GroupMember[]> {
    const memberships = await this.dataSource.manager.find(Membership, {
      where: role === 'collaborator' ? { groupId, userId } : { groupId },
      relations: { user: true },
      order: { createdAt: 'ASC', user: { name: 'ASC' } },
    })
    return memberships.flatMap((membership) => memberBody(membership))
  }

  /**
   * Gives someone another role.
   *
   * @throws {HttpError} NOT_FOUND; LAST_OWNER when nobody would be left to run the group; FORBIDDEN for an owner of before
   */
  async changeRole(owner: Member, userId: string, role: Role): Promise<GroupMember> {
    return this.dataSource.transaction(async (manager) => {
      const members = await lockMembersAsOwner(manager, owner)
      const membership = find(members, userId)
      if (membership.role !== role) {
        if (role !== 'owner') keepAnOwner(members, userId)
        await manager.update(Membership, { groupId: owner.groupId, userId }, { role })
        await recordEvent(manager, owner, {
          action: 'role changed',
          subject: subjectOf(membership),
          details: { old: membership.role, new: role },
        })
      }
      return memberBody({ ...membership, role })[0]
    })
  }

  /**
   * Takes someone out of the group. What they did stays.
   *
   * @throws {HttpError} NOT_FOUND; LAST_OWNER; FORBIDDEN for an owner of before
   */
  async remove(owner: Member, userId: string): Promise<void> {
    await this.dataSource.transaction(async (manager) => {
      const members = await lockMembersAsOwner(manager, owner)
      const membership = find(members, userId)
      keepAnOwner(members, userId)
      await end(manager, membership)
      await recordEvent(manager, owner, {
        action: 'member removed',
        subject: subjectOf(membership),
        details: { role: membership.role },
      })
    })
  }

  /**
   * Leaves the group.
   *
   * @throws {HttpError} LAST_OWNER: the last owner stays
   */
  async leave(member: Member): Promise<void> {
    await this.dataSource.transaction(async (manager) => {
      const members = await lockMembers(manager, member.groupId)
      const membership = find(members, member.userId)
      keepAnOwner(members, member.userId)
      await end(manager, membership)
      await recordEvent(manager, member, {
        action: 'member left',
        subject: subjectOf(membership),
        details: { role: membership.role },
      })
    })
  }
}

function find(members: readonly Membership[], userId: string): Membership {
  const membership = members.find((each) => each.userId === userId)
  if (!membership) throw notFound('member')
  return membership
}

async function end(manager: EntityManager, { groupId, userId }: Membership): Promise<void> {
  await manager.delete(Membership, { groupId, userId })
  await manager.update(User, { id: userId, currentGroupId: groupId }, { currentGroupId: null })
}

function subjectOf({ userId, user }: Membership) {
  return { kind: 'member', id: userId, name: user?.name ?? '' }
}

function memberBody({ user, role, createdAt }: Membership): GroupMember[] {
  if (!user) return []
  const { id, name, email } = user
  return [{ person: { id, name }, email, role, since: createdAt.toISOString() }]
}
