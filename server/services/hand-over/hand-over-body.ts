import { type EntityManager, type FindOptionsWhere, In } from 'typeorm'
import type { HandOver as HandOverBody } from '../../../shared/contracts/hand-over-desk'
import { HandOver } from '../../entities/hand-over.entity'
import { notFound } from '../../errors/http-error'
import { personOf } from '../people'

const RELATIONS = {
  mapping: true,
  statePoint: true,
  author: true,
  reviewer: true,
  signedOffBy: true,
  withdrawnBy: true,
  previous: true,
} as const

/** Hand-overs as lists show them; newest first. */
export async function findHandOverBodies(
  manager: EntityManager,
  where: FindOptionsWhere<HandOver> | FindOptionsWhere<HandOver>[],
): Promise<HandOverBody[]> {
  const found = await manager.find(HandOver, { where, relations: RELATIONS, order: { changedAt: 'DESC' } })
  const followers = await manager.find(HandOver, {
    where: { previousId: In(found.map(({ id }) => id)) },
    select: { id: true, previousId: true, number: true },
    order: { number: 'ASC' },
  })
  return found.map((handOver) => {
    const next = followers.find(({ previousId }) => previousId === handOver.id)
    return handOverBody(handOver, next ? { id: next.id, number: next.number ?? 0 } : null)
  })
}

/** One hand-over as lists show it. @throws {HttpError} NOT_FOUND */
export async function readHandOverBody(
  manager: EntityManager,
  groupId: string,
  id: string,
): Promise<HandOverBody> {
  const [body] = await findHandOverBodies(manager, { id, groupId })
  if (!body) throw notFound('hand-over')
  return body
}

function handOverBody(handOver: HandOver, replacedBy: HandOverBody['replacedBy']): HandOverBody {
  const { id, polymerId, mappingId, mapping, statePointId, statePoint, title, standing, number, revision } =
    handOver
  const { frozen, withdrawnAt, withdrawnReason } = handOver
  if (!mapping || !statePoint) throw new Error('A hand-over is read with its mapping and state point.')
  const { temperature, pressure, phase, composition } = frozen?.statePoint ?? statePoint
  return {
    id,
    polymerId,
    mappingId,
    mapping: frozen?.mapping.name ?? mapping.name,
    statePointId,
    statePoint: { temperature, pressure, phase, composition },
    title,
    standing,
    number,
    revision,
    author: personOf(handOver.author),
    reviewer: personOf(handOver.reviewer),
    changedAt: handOver.changedAt.toISOString(),
    signedOffBy: personOf(handOver.signedOffBy),
    signedOffAt: handOver.signedOffAt?.toISOString() ?? null,
    releasedAt: handOver.releasedAt?.toISOString() ?? null,
    replaces: handOver.previous?.number ?? null,
    replacedBy,
    withdrawn:
      withdrawnAt === null || withdrawnReason === null
        ? null
        : { by: personOf(handOver.withdrawnBy), at: withdrawnAt.toISOString(), reason: withdrawnReason },
  }
}
