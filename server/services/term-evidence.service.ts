import { type DataSource, type EntityManager, In, IsNull } from 'typeorm'
import type { TermEvidence } from '../../shared/contracts/term-evidence'
import { Distribution } from '../entities/distribution.entity'
import { JointDistribution } from '../entities/joint-distribution.entity'
import { Mapping } from '../entities/mapping.entity'
import { Term } from '../entities/term.entity'
import { notFound } from '../errors/http-error'
import { pairReason, readFit } from './mapping-fit'
import type { Member } from './member'
import { storedTermName } from './stored-term-name'
import { findStatePoint } from './term-context'

/** What data say about which terms of a group to use. */
export class TermEvidenceService {
  constructor(private readonly dataSource: DataSource) {}

  /**
   * How many independent samples each term stands on at a state point, and how strongly two terms are coupled there; data that no
   * longer fit the mapping do not count. Terms left out of the set are among them: the choice may still change.
   *
   * @throws {HttpError} NOT_FOUND
   */
  async of({ groupId }: Member, mappingId: string, statePointId: string): Promise<TermEvidence> {
    const { manager } = this.dataSource
    const mapping = await manager.findOneBy(Mapping, { id: mappingId, groupId })
    if (!mapping) throw notFound('mapping')
    await findStatePoint(manager, groupId, mapping.polymerId, statePointId, 'statePoint')
    const terms = await manager.find(Term, {
      where: { mappingId, current: true },
      order: { position: 'ASC' },
    })
    const names = new Map(terms.map((term) => [term.id, storedTermName(term, terms)]))
    const fit = await readFit(manager, mapping)
    const ids = [...names.keys()]
    const measured = await measuredAt(manager, ids, statePointId)
    const joints = await manager.find(JointDistribution, {
      where: { firstTermId: In(ids), secondTermId: In(ids), statePointId, supersededAt: IsNull() },
      select: { id: true, firstTermId: true, secondTermId: true, numbers: true, mappingVersion: true },
    })
    return {
      samples: measured.flatMap(({ termId, independentSamples, mappingVersion }) =>
        independentSamples === null || fit.reason(termId, mappingVersion) !== null
          ? []
          : [{ name: names.get(termId) ?? '', samples: independentSamples }],
      ),
      couplings: joints.flatMap(({ firstTermId, secondTermId, numbers, mappingVersion }) =>
        pairReason(fit, [firstTermId, secondTermId], mappingVersion) !== null
          ? []
          : [
              {
                first: names.get(firstTermId) ?? '',
                second: names.get(secondTermId) ?? '',
                nats: Math.max(0, numbers.mutualInformationCorrected ?? numbers.mutualInformation),
              },
            ],
      ),
    }
  }
}

function measuredAt(
  manager: EntityManager,
  ids: readonly string[],
  statePointId: string,
): Promise<Pick<Distribution, 'termId' | 'independentSamples' | 'mappingVersion'>[]> {
  return manager.find(Distribution, {
    where: { termId: In([...ids]), statePointId, supersededAt: IsNull() },
    select: { id: true, termId: true, independentSamples: true, mappingVersion: true },
  })
}
