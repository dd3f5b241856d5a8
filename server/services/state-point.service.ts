import { IsNull, type DataSource, type EntityManager } from 'typeorm'
import type { z } from 'zod'
import type {
  StatePoint as StatePointBody,
  statePointCreateSchema,
  StatePointUpdate,
} from '../../shared/contracts/polymer'
import { Distribution } from '../entities/distribution.entity'
import { JointDistribution } from '../entities/joint-distribution.entity'
import { StatePoint } from '../entities/state-point.entity'
import { HttpError, notFound } from '../errors/http-error'
import type { Member } from './member'
import { recordStatePoint } from './record-work'

/** State points of a polymer. */
export class StatePointService {
  constructor(private readonly dataSource: DataSource) {}

  /** The polymer's state points, the coldest first. */
  async list({ groupId }: Member, polymerId: string): Promise<StatePointBody[]> {
    const points = await this.dataSource.manager.find(StatePoint, {
      where: { groupId, polymerId },
      order: { temperature: 'ASC', createdAt: 'ASC', id: 'ASC' },
    })
    return Promise.all(points.map((point) => statePointBody(this.dataSource.manager, point)))
  }

  /** @param input as the contract gives it out, with its defaults */
  async create(
    member: Member,
    polymerId: string,
    input: z.output<typeof statePointCreateSchema>,
  ): Promise<StatePointBody> {
    const { groupId } = member
    return this.dataSource.transaction(async (manager) => {
      const point = await manager.save(StatePoint, { groupId, polymerId, ...input, revision: 1 })
      await recordStatePoint(manager, member, 'state point added', point)
      return statePointBody(manager, point)
    })
  }

  /**
   * @throws {HttpError} CONFLICT with the current state point when someone saved in between; IN_USE when the temperature
   *   would change under data
   */
  async update(member: Member, statePointId: string, input: StatePointUpdate): Promise<StatePointBody> {
    const { groupId } = member
    const { revision, ...changes } = input
    return this.dataSource.transaction(async (manager) => {
      const where = { id: statePointId, groupId }
      const point = await manager.findOne(StatePoint, { where, lock: { mode: 'pessimistic_write' } })
      if (!point) throw notFound('state point')
      if (point.revision !== revision) {
        throw new HttpError(
          'CONFLICT',
          'Someone else changed this state point in between. Look at it again first.',
          { details: await statePointBody(manager, point) },
        )
      }
      const { temperature = point.temperature } = changes
      if (temperature !== point.temperature && (await hasData(manager, statePointId))) {
        throw new HttpError(
          'IN_USE',
          'Data stand on this state point: its temperature stays as it is. For another one, add a state point.',
          { field: 'temperature' },
        )
      }
      const saved = await manager.save(StatePoint, { ...point, ...changes, revision: revision + 1 })
      await recordStatePoint(manager, member, 'state point changed', saved)
      return statePointBody(manager, saved)
    })
  }

  /** @throws {HttpError} IN_USE while data stand on it */
  async remove(member: Member, statePointId: string): Promise<void> {
    await this.dataSource.transaction(async (manager) => {
      const where = { id: statePointId, groupId: member.groupId }
      const point = await manager.findOne(StatePoint, { where, lock: { mode: 'pessimistic_write' } })
      if (!point) throw notFound('state point')
      if (await hasData(manager, statePointId)) {
        throw new HttpError('IN_USE', 'Data stand on this state point. Delete them first.')
      }
      await recordStatePoint(manager, member, 'state point deleted', point)
      await manager.delete(StatePoint, where)
    })
  }
}

/** Data that were replaced count too: they were measured here. */
async function hasData(manager: EntityManager, statePointId: string): Promise<boolean> {
  return (
    (await manager.existsBy(Distribution, { statePointId })) ||
    (await manager.existsBy(JointDistribution, { statePointId }))
  )
}

async function statePointBody(manager: EntityManager, point: StatePoint): Promise<StatePointBody> {
  const { id, polymerId, temperature, pressure, phase, composition, notes, revision } = point
  return {
    id,
    polymerId,
    temperature,
    pressure,
    phase,
    composition,
    notes,
    revision,
    distributions: await manager.countBy(Distribution, { statePointId: id, supersededAt: IsNull() }),
    createdAt: point.createdAt.toISOString(),
  }
}
