import { type DataSource, In, IsNull } from 'typeorm'
import type { Pair as PairBody } from '../../shared/contracts/distribution'
import { termName } from '../../shared/mapping'
import { Decision } from '../entities/decision.entity'
import { JointDistribution } from '../entities/joint-distribution.entity'
import { Mapping } from '../entities/mapping.entity'
import { Term } from '../entities/term.entity'
import { notFound } from '../errors/http-error'
import type { Member } from './member'
import { bondAnglePairs } from './bond-angle-pairs'
import { findStatePoint } from './term-context'

/** Bond–angle pairs of a mapping and what is known of each. */
export class PairService {
  constructor(private readonly dataSource: DataSource) {}

  /** The pairs whose two terms share a bead, those first whose bond is a side of the angle. */
  async list({ groupId }: Member, mappingId: string, statePointId: string): Promise<PairBody[]> {
    const { manager } = this.dataSource
    const mapping = await manager.findOneBy(Mapping, { id: mappingId, groupId })
    if (!mapping) throw notFound('mapping')
    await findStatePoint(manager, groupId, mapping.polymerId, statePointId, 'statePoint')
    const terms = await manager.find(Term, {
      where: { mappingId, current: true },
      order: { position: 'ASC' },
    })
    const joints = await manager.find(JointDistribution, {
      where: { mappingId, statePointId, supersededAt: IsNull() },
      select: { id: true, firstTermId: true, secondTermId: true, numbers: true },
    })
    const decisions = await manager.findBy(Decision, {
      jointDistributionId: In(joints.map(({ id }) => id)),
      supersededAt: IsNull(),
    })
    return bondAnglePairs(terms).map(({ bond, angle }) => {
      const joint = joints.find(({ firstTermId, secondTermId }) =>
        [firstTermId, secondTermId].every((id) => id === bond.id || id === angle.id),
      )
      const decision = decisions.find(({ jointDistributionId }) => jointDistributionId === joint?.id)
      return {
        firstTermId: joint?.firstTermId ?? bond.id,
        secondTermId: joint?.secondTermId ?? angle.id,
        name: `${termName(bond.types)} · ${termName(angle.types)}`,
        jointDistributionId: joint?.id ?? null,
        numbers: joint?.numbers ?? null,
        decision: decision?.choice ?? null,
      }
    })
  }
}
