import type { EntityManager } from 'typeorm'
import { Membership } from '../entities/membership.entity'
import { HttpError } from '../errors/http-error'
import type { Member } from './member'

/**
 * The memberships of a group, held still until the transaction ends: whoever else changes them waits, so that two owners who
 * leave at the same moment cannot both be told that the other one stays.
 */
export async function lockMembers(manager: EntityManager, groupId: string): Promise<Membership[]> {
  await manager.query('select 1 from "group" where "id" = $1 for no key update', [groupId])
  return manager.find(Membership, { where: { groupId }, relations: { user: true } })
}

/**
 * As `lockMembers`, for an owner: the role was checked before the wait and may have changed during it.
 *
 * @throws {HttpError} FORBIDDEN
 */
export async function lockMembersAsOwner(manager: EntityManager, owner: Member): Promise<Membership[]> {
  const members = await lockMembers(manager, owner.groupId)
  const self = members.find(({ userId }) => userId === owner.userId)
  if (self?.role !== 'owner') throw new HttpError('FORBIDDEN', 'You are no longer an owner of this group.')
  return members
}

/**
 * Refuses what would leave the group without an owner.
 *
 * @param userId who would be one no more
 * @throws {HttpError} LAST_OWNER
 */
export function keepAnOwner(members: readonly Membership[], userId: string): void {
  const owners = members.filter(({ role }) => role === 'owner')
  if (owners.length === 1 && owners[0].userId === userId) {
    throw new HttpError(
      'LAST_OWNER',
      'The group would be left without an owner. Make someone else an owner first.',
    )
  }
}
