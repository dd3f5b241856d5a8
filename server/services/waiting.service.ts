import type { DataSource } from 'typeorm'
import type { Waiting } from '../../shared/contracts/hand-over-desk'
import { openQuestions, openReturns } from './delivery/open-from-recipients'
import { findHandOverBodies } from './hand-over/hand-over-body'
import type { Member } from './member'

/** What waits for a person in a group. */
export class WaitingService {
  constructor(private readonly dataSource: DataSource) {}

  /** Reviews asked of the member, their own that came back or wait to be released, and terms without data. */
  async get({ groupId, userId, role }: Member): Promise<Waiting> {
    const { manager } = this.dataSource
    const find = findHandOverBodies
    const writes = role === 'owner' || role === 'modeller'
    return {
      reviews: await find(manager, { groupId, standing: 'in review', reviewerId: userId }),
      sentBack: await find(manager, { groupId, standing: 'sent back', authorId: userId }),
      toRelease: await find(manager, { groupId, standing: 'signed off', authorId: userId }),
      questions: writes ? await openQuestions(manager, { groupId, userId }) : [],
      returned: writes ? await openReturns(manager, { groupId, userId }) : [],
      gaps: writes ? await this.gaps(groupId) : [],
    }
  }

  /** Mappings at state points where some terms have data and others none; what the mapping leaves out does not count. */
  private gaps(groupId: string): Promise<Waiting['gaps']> {
    return this.dataSource.query(
      `select p."id" as "polymerId", p."name" as "polymer", m."id" as "mappingId", m."name" as "mapping",
              s."id" as "statePointId", s."temperature",
              count(*)::int as "terms", (count(*) filter (where d."id" is null))::int as "withoutData"
         from "mapping" m
         join "polymer" p on p."id" = m."polymer_id"
         join "state_point" s on s."polymer_id" = p."id"
         join "term" t on t."mapping_id" = m."id" and t."current"
          and not exists (
            select 1 from jsonb_array_elements(coalesce(m."document"->'termChoices', '[]')) c
             where c->>'use' = 'left out' and c->>'placeKey' = t."place_key"
               and c->'types' = to_jsonb(t."types"))
         left join "distribution" d on d."term_id" = t."id" and d."state_point_id" = s."id"
          and d."superseded_at" is null
        where m."group_id" = $1
        group by p."id", m."id", s."id"
       having count(d."id") > 0 and count(d."id") < count(*)
        order by p."name", m."name", s."temperature"`,
      [groupId],
    )
  }
}
