import type { DataSource } from 'typeorm'
import type { Role } from '../../shared/contracts/common'
import type { Member } from './member'

/** What a path can name, and the table it stands in. */
export const RESOURCES = {
  group: 'group',
  polymer: 'polymer',
  statePoint: 'state_point',
  mapping: 'mapping',
  term: 'term',
  distribution: 'distribution',
  jointDistribution: 'joint_distribution',
  potential: 'potential',
  invitation: 'invitation',
  handOver: 'hand_over',
  recipient: 'recipient',
  question: 'question',
  returnedFile: 'returned_file',
  layout: 'layout',
} as const
export type Resource = keyof typeof RESOURCES

/** Who belongs where. */
export class AccessService {
  constructor(private readonly dataSource: DataSource) {}

  /**
   * The membership by which a person reaches a record: null when there is no such record, and just the same when the person
   * is not in its group.
   */
  async memberFor(resource: Resource, id: string, userId: string): Promise<Member | null> {
    const groupColumn = resource === 'group' ? 'id' : 'group_id'
    const rows: { groupId: string; role: Role }[] = await this.dataSource.query(
      `select m."group_id" as "groupId", m."role"
         from "${RESOURCES[resource]}" r join "membership" m on m."group_id" = r."${groupColumn}"
        where r."id" = $1 and m."user_id" = $2`,
      [id, userId],
    )
    return rows[0] ? { ...rows[0], userId } : null
  }
}
