import { In, type DataSource, type EntityManager } from 'typeorm'
import type { Role } from '../../shared/contracts/common'
import {
  type Group as GroupBody,
  type GroupDefaults,
  type GroupThresholds,
  type GroupUpdate,
  HOUSE_DEFAULTS,
} from '../../shared/contracts/group'
import { Group } from '../entities/group.entity'
import { Membership } from '../entities/membership.entity'
import { User } from '../entities/user.entity'
import { HttpError, notFound } from '../errors/http-error'
import type { Member } from './member'
import { hashPassword } from './passwords'
import { recordEvent } from './record-event'

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
      const [founder] = members
      if (founder) {
        const subject = { kind: 'group', id: group.id, name }
        await recordEvent(transaction, founder, { action: 'group founded', subject })
      }
      return members
    }
    return manager ? write(manager) : this.dataSource.transaction(write)
  }

  /** The group with what holds in it. */
  async get(
    { groupId }: Pick<Member, 'groupId'>,
    manager: EntityManager = this.dataSource.manager,
  ): Promise<GroupBody> {
    return groupBody(await readGroup(manager, groupId))
  }

  /**
   * Changes the name or the defaults. Each value that changes is recorded, old and new.
   *
   * @throws {HttpError} CONFLICT with the group when someone else saved in between
   */
  async update(owner: Member, { revision, name, defaults }: GroupUpdate): Promise<GroupBody> {
    return this.dataSource.transaction(async (manager) => {
      await manager.query('select 1 from "group" where "id" = $1 for no key update', [owner.groupId])
      const group = await readGroup(manager, owner.groupId)
      if (group.revision !== revision) {
        throw new HttpError('CONFLICT', 'Someone else changed this in between. Look at it again first.', {
          details: groupBody(group),
        })
      }
      const before = defaultsOf(group)
      const after = { name: name ?? group.name, defaults: defaults ?? before, revision: revision + 1 }
      await manager.update(Group, { id: group.id }, after)
      const subject = { kind: 'group', id: group.id, name: after.name }
      if (after.name !== group.name) {
        const details = { old: group.name, new: after.name }
        await recordEvent(manager, owner, { action: 'group renamed', subject, details })
      }
      for (const change of changedDefaults(before, after.defaults)) {
        await recordEvent(manager, owner, { action: 'defaults changed', subject, details: change })
      }
      return this.get(owner, manager)
    })
  }

  /** The names of groups, by id. */
  async byId(ids: readonly string[]): Promise<Map<string, Group>> {
    const groups = await this.dataSource.manager.findBy(Group, { id: In([...ids]) })
    return new Map(groups.map((group) => [group.id, group]))
  }
}

/** The thresholds at which the verdicts of a group speak. */
export async function thresholdsOf(manager: EntityManager, groupId: string): Promise<GroupThresholds> {
  return defaultsOf(await readGroup(manager, groupId)).thresholds
}

async function readGroup(manager: EntityManager, groupId: string): Promise<Group> {
  const group = await manager.findOneBy(Group, { id: groupId })
  if (!group) throw notFound('group')
  return group
}

/** What a group has set, and for the rest what holds in the house. */
export function defaultsOf({ defaults }: Group): GroupDefaults {
  return {
    units: { ...HOUSE_DEFAULTS.units, ...defaults.units },
    thresholds: { ...HOUSE_DEFAULTS.thresholds, ...defaults.thresholds },
  }
}

function groupBody(group: Group): GroupBody {
  const { id, name, demo, revision } = group
  return { id, name, demo, defaults: defaultsOf(group), revision }
}

/** One entry per value that differs, named as in the contract. */
function changedDefaults(before: GroupDefaults, after: GroupDefaults) {
  return (['units', 'thresholds'] as const).flatMap((part) =>
    Object.entries(after[part]).flatMap(([name, value]: [string, string | number]) => {
      const old = (before[part] as Record<string, string | number>)[name]
      return old === value ? [] : [{ what: name, old, new: value }]
    }),
  )
}
