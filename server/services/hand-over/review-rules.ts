import type { Role } from '../../../shared/contracts/common'
import type { HandOver } from '../../entities/hand-over.entity'

/** Roles whose word may sign off or send back. */
export const REVIEWING_ROLES: readonly Role[] = ['owner', 'reviewer']

/** Out of the group, or once was: it has a number and never changes. */
export function isReleased({ number }: Pick<HandOver, 'number'>): boolean {
  return number !== null
}

/**
 * Nobody signs off their own: neither who made the hand-over nor who asked for the review of it. Whoever saved a potential in it
 * may: in a small group an owner does both, and the tables were chosen and defended by another.
 */
export function isOwnWork(
  userId: string,
  handOver: Pick<HandOver, 'authorId'>,
  askedById: string | null,
): boolean {
  return userId === handOver.authorId || userId === askedById
}
