import type { EntityManager } from 'typeorm'
import type { HandOverStanding } from '../../../shared/contracts/hand-over'
import { HandOver } from '../../entities/hand-over.entity'
import { Mapping } from '../../entities/mapping.entity'
import { HttpError, notFound } from '../../errors/http-error'
import { type HandOverContent, readContent } from './content'
import { readHandOverBody } from './hand-over-body'

/** What a step of a hand-over asks of the one it is taken on. */
export interface StepConditions {
  readonly revision: number
  /** Standings from which the step may be taken. */
  readonly from: readonly HandOverStanding[]
}

/** @throws {HttpError} NOT_FOUND */
export async function findHandOver(manager: EntityManager, groupId: string, id: string): Promise<HandOver> {
  const handOver = await manager.findOneBy(HandOver, { id, groupId })
  if (!handOver) throw notFound('hand-over')
  return handOver
}

/**
 * Locks a hand-over for a step: two at the same time come one after the other, and the later one finds that it is too late.
 *
 * @throws {HttpError} NOT_FOUND; CONFLICT with the current hand-over in `details` when someone else changed it or took a step
 */
export async function lockHandOver(
  manager: EntityManager,
  groupId: string,
  id: string,
  { revision, from }: StepConditions,
): Promise<HandOver> {
  const handOver = await manager.findOne(HandOver, {
    where: { id, groupId },
    lock: { mode: 'pessimistic_write' },
  })
  if (!handOver) throw notFound('hand-over')
  if (handOver.revision === revision && from.includes(handOver.standing)) return handOver
  const details = await readHandOverBody(manager, groupId, id)
  throw new HttpError('CONFLICT', conflictSentence(handOver, revision), { details })
}

function conflictSentence({ revision, standing }: HandOver, seen: number): string {
  const now = `It is ${standing === 'draft' ? 'a draft' : standing} now.`
  return revision === seen
    ? `That cannot be done to this hand-over. ${now}`
    : `Someone else changed this hand-over in between. ${now} Look at it again.`
}

/**
 * Reads the content with everything it rests on held still until the end of the transaction. Uploads and saves take the lock of
 * the mapping first and so wait; what can be changed or deleted without it is locked row by row.
 */
export async function lockContent(manager: EntityManager, handOver: HandOver): Promise<HandOverContent> {
  const { mappingId, statePointId } = handOver
  await manager.findOne(Mapping, { where: { id: mappingId }, lock: { mode: 'pessimistic_write' } })
  await manager.query(`select 1 from "polymer" where "id" = $1 for share`, [handOver.polymerId])
  await manager.query(`select 1 from "state_point" where "id" = $1 for share`, [statePointId])
  const terms = `select "id" from "term" where "mapping_id" = $2`
  for (const [table, where] of [
    ['distribution', `"term_id" in (${terms})`],
    ['potential', `"term_id" in (${terms})`],
    ['joint_distribution', `"mapping_id" = $2`],
  ]) {
    await manager.query(
      `select 1 from "${table}" where "state_point_id" = $1 and ${where} order by "id" for share`,
      [statePointId, mappingId],
    )
  }
  await manager.query(
    `select 1 from "decision" d join "joint_distribution" j on j."id" = d."joint_distribution_id"
      where j."mapping_id" = $1 and j."state_point_id" = $2 order by d."id" for share of d`,
    [mappingId, statePointId],
  )
  return readContent(manager, handOver)
}
