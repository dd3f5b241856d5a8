import { type DataSource, In, IsNull } from 'typeorm'
import type { Pair as PairBody, PairList } from '../../shared/contracts/distribution'
import { usedTerms } from '../../shared/mapping'
import { Decision } from '../entities/decision.entity'
import { JointDistribution } from '../entities/joint-distribution.entity'
import { Mapping } from '../entities/mapping.entity'
import { Term } from '../entities/term.entity'
import { notFound } from '../errors/http-error'
import { thresholdsOf } from './group.service'
import { pairReason, readFit } from './mapping-fit'
import type { Member } from './member'
import { storedTermName } from './stored-term-name'
import { findStatePoint } from './term-context'
import { termPairs } from './term-pairs'
import { verdictAt } from './verdict-numbers'

/** Most pairs that one answer lists: our limit. A branched mapping of 40 beads would have a hundred thousand. */
export const MOST_PAIRS = 500

/** Pairs of terms of a mapping and what is known of each. */
export class PairService {
  constructor(private readonly dataSource: DataSource) {}

  /**
   * The pairs of terms in use that share a bead, in the order of `termPairs`: those that have data, and of the others as many as
   * make up 500.
   */
  async list({ groupId }: Member, mappingId: string, statePointId: string): Promise<PairList> {
    const { manager } = this.dataSource
    const mapping = await manager.findOneBy(Mapping, { id: mappingId, groupId })
    if (!mapping) throw notFound('mapping')
    await findStatePoint(manager, groupId, mapping.polymerId, statePointId, 'statePoint')
    const terms = await manager.find(Term, {
      where: { mappingId, current: true },
      order: { position: 'ASC' },
    })
    const thresholds = await thresholdsOf(manager, groupId)
    const fit = await readFit(manager, mapping)
    const joints = await manager.find(JointDistribution, {
      where: { mappingId, statePointId, supersededAt: IsNull() },
      select: { id: true, firstTermId: true, secondTermId: true, numbers: true, mappingVersion: true },
    })
    const decisions = await manager.findBy(Decision, {
      jointDistributionId: In(joints.map(({ id }) => id)),
      supersededAt: IsNull(),
    })
    const all = termPairs(usedTerms(mapping.document, terms)).map(({ first, second }): PairBody => {
      const joint = joints.find(({ firstTermId, secondTermId }) =>
        [firstTermId, secondTermId].every((id) => id === first.id || id === second.id),
      )
      const decision = decisions.find(({ jointDistributionId }) => jointDistributionId === joint?.id)
      return {
        firstTermId: joint?.firstTermId ?? first.id,
        secondTermId: joint?.secondTermId ?? second.id,
        name: `${storedTermName(first, terms)} · ${storedTermName(second, terms)}`,
        jointDistributionId: joint?.id ?? null,
        numbers: joint ? verdictAt(joint.numbers, thresholds) : null,
        decision: decision?.choice ?? null,
        unfit: joint ? pairReason(fit, [first.id, second.id], joint.mappingVersion) : null,
      }
    })
    return listed(all)
  }
}

function listed(all: readonly PairBody[]): PairList {
  const withData = all.filter(({ jointDistributionId }) => jointDistributionId !== null).length
  let room = Math.max(0, MOST_PAIRS - withData)
  const pairs = all.filter(({ jointDistributionId }) => jointDistributionId !== null || room-- > 0)
  return { pairs, leftOut: all.length - pairs.length }
}
