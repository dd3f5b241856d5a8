import { type EntityManager, In } from 'typeorm'
import { HandOver } from '../../entities/hand-over.entity'
import { notFound } from '../../errors/http-error'
import type { ReleasedHandOver } from './archive'

/** @throws {HttpError} NOT_FOUND for one of another group, and for one that is not released */
export async function findReleased(
  manager: EntityManager,
  groupId: string,
  id: string,
): Promise<ReleasedHandOver> {
  const handOver = await manager.findOne(HandOver, {
    where: { id, groupId, standing: In(['released', 'withdrawn']) },
    relations: { withdrawnBy: true },
  })
  if (!handOver?.frozen || !handOver.releasedAt) throw notFound('released hand-over')
  return handOver as ReleasedHandOver
}
