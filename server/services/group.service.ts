import { In, type DataSource, type EntityManager } from 'typeorm'
import type { Role } from '../../shared/contracts/common'
import { Group } from '../entities/group.entity'
import { Membership } from '../entities/membership.entity'
import { User } from '../entities/user.entity'
import type { Member } from './member'
import { hashPassword } from './passwords'

/** A new group with the people it starts with. */
export interface Founding {
  readonly name: string
  /** The group, its people and all its data are invented. */
  readonly demo: boolean
  readonly people: readonly {
    readonly name: string
    readonly email: string
    readonly role: Role
    /** null only for the people of a demo. */
    readonly password: string | null
  }[]
}

/** Groups and who founds them. */
export class GroupService {
  constructor(private readonly dataSource: DataSource) {}

  /** Whether any group exists, invented or not. */
  exists(): Promise<boolean> {
    return this.dataSource.manager.exists(Group)
  }

  /**
   * Founds a group with its people, all or nothing.
   *
   * @param manager the transaction to do it in; its own when left out
   * @returns one member per person, in their order
   */
  async found(founding: Founding, manager?: EntityManager): Promise<Member[]> {
    const hashes = await Promise.all(
      founding.people.map(async ({ password }) => (password === null ? null : hashPassword(password))),
    )
    const write = async (transaction: EntityManager): Promise<Member[]> => {
      const { name, demo } = founding
      const group = await transaction.save(Group, { name, demo })
      const users = await transaction.save(
        User,
        founding.people.map((person, index) => ({
          name: person.name,
          email: person.email,
          passwordHash: hashes[index],
          demo,
        })),
      )
      const members = users.map((user, index) => ({
        groupId: group.id,
        userId: user.id,
        role: founding.people[index].role,
      }))
      await transaction.insert(Membership, members)
      return members
    }
    return manager ? write(manager) : this.dataSource.transaction(write)
  }

  /** The names of groups, by id. */
  async byId(ids: readonly string[]): Promise<Map<string, Group>> {
    const groups = await this.dataSource.manager.findBy(Group, { id: In([...ids]) })
    return new Map(groups.map((group) => [group.id, group]))
  }
}
