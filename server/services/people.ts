import type { Person } from '../../shared/contracts/common'
import type { User } from '../entities/user.entity'

/** A person as other people's screens show them; null when their account is gone. */
export function personOf(user: User | null | undefined): Person | null {
  return user ? { id: user.id, name: user.name } : null
}
