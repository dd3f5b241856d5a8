import type { DataSource, EntityManager } from 'typeorm'
import type { WarningAnswer as WarningAnswerBody, WarningAnswerWrite } from '../../shared/contracts/hand-over'
import { JointDistribution } from '../entities/joint-distribution.entity'
import { Mapping } from '../entities/mapping.entity'
import { Potential } from '../entities/potential.entity'
import { WarningAnswer } from '../entities/warning-answer.entity'
import { notFound } from '../errors/http-error'
import { answerBasis, jointBasis, potentialBasis } from './hand-over/content-hash'
import type { Member } from './member'
import { personOf } from './people'
import { recordEvent } from './record-event'
import { findTerm, mappingOf } from './term-context'
import { termName } from '../../shared/mapping'

/** What an answer belongs to, and for which data and settings it holds. */
interface Owner {
  readonly potentialId: string | null
  readonly jointDistributionId: string | null
  readonly basis: string
  readonly mappingVersion: number
  readonly name: string
}

/** "Keep, with reason": answers to warnings. They hold as long as data and settings stay as they are. */
export class WarningAnswerService {
  constructor(private readonly dataSource: DataSource) {}

  /** Answers that hold for a saved potential now, in the order they were given. @throws {HttpError} NOT_FOUND */
  async ofPotential({ groupId }: Member, potentialId: string): Promise<WarningAnswerBody[]> {
    const { manager } = this.dataSource
    return current(manager, await ownerOfPotential(manager, groupId, potentialId))
  }

  /** Keeps a warning of a saved potential, with the reason; a later reason takes the place of the one before. */
  keepForPotential(
    member: Member,
    potentialId: string,
    answer: WarningAnswerWrite,
  ): Promise<WarningAnswerBody[]> {
    return this.keep(member, answer, (manager) => ownerOfPotential(manager, member.groupId, potentialId))
  }

  /** The same for the joint table of two terms. */
  keepForPair(
    member: Member,
    jointDistributionId: string,
    answer: WarningAnswerWrite,
  ): Promise<WarningAnswerBody[]> {
    return this.keep(member, answer, (manager) => ownerOfPair(manager, member.groupId, jointDistributionId))
  }

  private async keep(
    member: Member,
    { code, reason }: WarningAnswerWrite,
    find: (manager: EntityManager) => Promise<Owner>,
  ): Promise<WarningAnswerBody[]> {
    return this.dataSource.transaction(async (manager) => {
      const owner = await find(manager)
      const { potentialId, jointDistributionId, basis, mappingVersion, name } = owner
      const record = {
        groupId: member.groupId,
        potentialId,
        jointDistributionId,
        code,
        basisSha256: answerBasis(basis, code, mappingVersion),
        reason,
        answeredById: member.userId,
        answeredAt: new Date(),
      }
      const key = potentialId === null ? 'jointDistributionId' : 'potentialId'
      await manager.upsert(WarningAnswer, record, [key, 'code', 'basisSha256'])
      const subject = { kind: 'term', id: null, name }
      await recordEvent(manager, member, { action: 'warning accepted', subject, details: { code, reason } })
      return current(manager, owner)
    })
  }
}

async function current(manager: EntityManager, owner: Owner): Promise<WarningAnswerBody[]> {
  const { potentialId, jointDistributionId, basis, mappingVersion } = owner
  const answers = await manager.find(WarningAnswer, {
    where: potentialId === null ? { jointDistributionId: jointDistributionId ?? '' } : { potentialId },
    relations: { answeredBy: true },
    order: { answeredAt: 'ASC' },
  })
  return answers
    .filter(({ code, basisSha256 }) => basisSha256 === answerBasis(basis, code, mappingVersion))
    .map(({ code, reason, answeredBy, answeredAt }) => ({
      code,
      reason,
      by: personOf(answeredBy),
      at: answeredAt.toISOString(),
    }))
}

async function ownerOfPotential(manager: EntityManager, groupId: string, id: string): Promise<Owner> {
  const potential = await manager.findOneBy(Potential, { id, groupId })
  if (!potential) throw notFound('potential')
  const term = await findTerm(manager, groupId, potential.termId)
  const { version } = await mappingOf(manager, term)
  const basis = potentialBasis(potential)
  return {
    potentialId: id,
    jointDistributionId: null,
    basis,
    mappingVersion: version,
    name: termName(term.types),
  }
}

async function ownerOfPair(manager: EntityManager, groupId: string, id: string): Promise<Owner> {
  const joint = await manager.findOneBy(JointDistribution, { id, groupId })
  if (!joint) throw notFound('joint distribution')
  const { version } = await manager.findOneByOrFail(Mapping, { id: joint.mappingId })
  const terms = [
    await findTerm(manager, groupId, joint.firstTermId),
    await findTerm(manager, groupId, joint.secondTermId),
  ]
  const name = terms.map(({ types }) => termName(types)).join(' · ')
  return {
    potentialId: null,
    jointDistributionId: id,
    basis: jointBasis(joint),
    mappingVersion: version,
    name,
  }
}
