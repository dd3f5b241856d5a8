import { type DataSource, type EntityManager, IsNull } from 'typeorm'
import type {
  DecisionWrite,
  JointDistribution as JointDistributionBody,
  JointDistributionUpload,
} from '../../shared/contracts/distribution'
import { readJointHistogram } from '../../shared/intake'
import { Decision } from '../entities/decision.entity'
import { Group } from '../entities/group.entity'
import { JointDistribution } from '../entities/joint-distribution.entity'
import { SourceFile } from '../entities/source-file.entity'
import type { Term } from '../entities/term.entity'
import { HttpError, notFound } from '../errors/http-error'
import { thresholdsOf } from './group.service'
import type { Download, Member, UploadedFile } from './member'
import { personOf } from './people'
import { recordTerms } from './record-work'
import { fileBody, packFile, textOf, unpackFile } from './source-files'
import { findStatePoint, findTerm, lockTerm } from './term-context'
import { verdictAt, verdictNumbers } from './verdict-numbers'

/** Joint distributions of two terms, and what was decided about them. */
export class JointDistributionService {
  constructor(private readonly dataSource: DataSource) {}

  /**
   * Reads a file as the joint distribution of two terms at a state point, works out its verdict and stores all of it. One
   * that was there before for the same two terms is superseded.
   *
   * @throws {InvalidInputError} what the reader refuses, with line and column; nothing is stored then
   * @throws {HttpError} NOT_FOUND; TERM_GONE; VALIDATION_FAILED when the terms do not go with the settings
   */
  async add(
    member: Member,
    mappingId: string,
    upload: JointDistributionUpload,
    file: UploadedFile,
  ): Promise<JointDistributionBody> {
    const { groupId, userId } = member
    const { firstTermId, secondTermId, statePointId, settings } = upload
    await this.checkTerms(groupId, mappingId, upload)
    const { histogram, notes } = readJointHistogram(textOf(file.bytes), settings)
    const numbers = verdictNumbers(histogram, await thresholdsOf(this.dataSource.manager, groupId))
    const packed = await packFile(file)
    return this.dataSource.transaction(async (manager) => {
      // Always in the same order, so that two uploads of one pair cannot lock each other out.
      const [smaller, larger] = [firstTermId, secondTermId].sort()
      await lockTerm(manager, groupId, smaller)
      const { mapping } = await lockTerm(manager, groupId, larger)
      await findStatePoint(manager, groupId, mapping.polymerId, statePointId, 'statePointId')
      const now = new Date()
      for (const [first, second] of [
        [firstTermId, secondTermId],
        [secondTermId, firstTermId],
      ]) {
        const pair = { firstTermId: first, secondTermId: second, statePointId, supersededAt: IsNull() }
        await manager.update(JointDistribution, pair, { supersededAt: now })
      }
      const { id } = await manager.save(JointDistribution, {
        groupId,
        mappingId,
        firstTermId,
        secondTermId,
        statePointId,
        xEdges: [...histogram.xEdges],
        yEdges: [...histogram.yEdges],
        weights: [...histogram.weights],
        content: histogram.content,
        independentSamples: histogram.independentSamples,
        settings,
        notes: [...notes],
        numbers,
        mappingRevision: mapping.revision,
        mappingVersion: mapping.version,
        uploadedAt: now,
        uploadedById: userId,
        supersededAt: null,
      })
      await manager.insert(SourceFile, { groupId, distributionId: null, jointDistributionId: id, ...packed })
      const work = { termIds: [firstTermId, secondTermId], statePointId, details: { file: file.name } }
      await recordTerms(manager, member, 'data brought in', work)
      return readJoint(manager, groupId, id)
    })
  }

  /** @throws {HttpError} NOT_FOUND */
  get({ groupId }: Member, jointDistributionId: string): Promise<JointDistributionBody> {
    return readJoint(this.dataSource.manager, groupId, jointDistributionId)
  }

  /** Records what a person decides, beside the verdict's numbers as the server worked them out. */
  async decide(
    member: Member,
    jointDistributionId: string,
    { choice, reason }: DecisionWrite,
  ): Promise<JointDistributionBody> {
    const { groupId, userId } = member
    return this.dataSource.transaction(async (manager) => {
      const joint = await manager.findOne(JointDistribution, {
        where: { id: jointDistributionId, groupId },
        lock: { mode: 'pessimistic_write' },
      })
      if (!joint) throw notFound('joint distribution')
      const now = new Date()
      await manager.update(Decision, { jointDistributionId, supersededAt: IsNull() }, { supersededAt: now })
      const numbers = verdictAt(joint.numbers, await thresholdsOf(manager, groupId))
      const by = { decidedAt: now, decidedById: userId, supersededAt: null }
      await manager.insert(Decision, { groupId, jointDistributionId, choice, reason, numbers, ...by })
      const work = { ...pairOf(joint), details: { choice, reason } }
      await recordTerms(manager, member, 'decision recorded', work)
      return readJoint(manager, groupId, jointDistributionId)
    })
  }

  /** Deletes the joint data of two terms at a state point, those they superseded, their files and decisions. */
  async remove(member: Member, jointDistributionId: string): Promise<void> {
    const { groupId } = member
    await this.dataSource.transaction(async (manager) => {
      const where = { id: jointDistributionId, groupId }
      const joint = await manager.findOne(JointDistribution, { where, lock: { mode: 'pessimistic_write' } })
      if (!joint) throw notFound('joint distribution')
      await recordTerms(manager, member, 'data deleted', pairOf(joint))
      if (joint.supersededAt !== null) return void (await manager.delete(JointDistribution, where))
      const { firstTermId, secondTermId, statePointId } = joint
      await manager.delete(JointDistribution, { firstTermId, secondTermId, statePointId })
      await manager.delete(JointDistribution, {
        firstTermId: secondTermId,
        secondTermId: firstTermId,
        statePointId,
      })
    })
  }

  /** The file as it came. */
  file({ groupId }: Member, jointDistributionId: string): Promise<Download> {
    return unpackFile(this.dataSource.manager, groupId, { jointDistributionId })
  }

  private async checkTerms(
    groupId: string,
    mappingId: string,
    upload: JointDistributionUpload,
  ): Promise<void> {
    const { firstTermId, secondTermId, settings } = upload
    const { manager } = this.dataSource
    const terms: Term[] = []
    for (const [field, id] of Object.entries({ firstTermId, secondTermId })) {
      const term = await findTerm(manager, groupId, id)
      if (term.mappingId !== mappingId) throw notFound('term in this mapping', field)
      terms.push(term)
    }
    if (firstTermId === secondTermId) {
      throw new HttpError('VALIDATION_FAILED', 'A joint distribution is of two different terms.', {
        field: 'secondTermId',
      })
    }
    const kinds = terms.map(({ kind }) => kind)
    if (kinds[0] !== settings.kinds[0] || kinds[1] !== settings.kinds[1]) {
      throw new HttpError(
        'VALIDATION_FAILED',
        `The two terms are ${kinds.join(' and ')}; the file was read as ${settings.kinds.join(' and ')}.`,
        { field: 'settings.kinds' },
      )
    }
  }
}

function pairOf({ firstTermId, secondTermId, statePointId }: JointDistribution) {
  return { termIds: [firstTermId, secondTermId], statePointId }
}

async function readJoint(
  manager: EntityManager,
  groupId: string,
  id: string,
): Promise<JointDistributionBody> {
  const joint = await manager.findOne(JointDistribution, {
    where: { id, groupId },
    relations: { uploadedBy: true },
  })
  if (!joint) throw notFound('joint distribution')
  const decision = await manager.findOne(Decision, {
    where: { jointDistributionId: id, supersededAt: IsNull() },
    relations: { decidedBy: true },
  })
  const { demo } = await manager.findOneByOrFail(Group, { id: groupId })
  const { mappingId, firstTermId, secondTermId, statePointId, xEdges, yEdges, weights, content } = joint
  const { independentSamples, settings, notes } = joint
  return {
    id,
    mappingId,
    firstTermId,
    secondTermId,
    statePointId,
    kinds: settings.kinds,
    xEdges,
    yEdges,
    weights,
    content,
    independentSamples,
    settings,
    notes,
    file: await fileBody(manager, groupId, { jointDistributionId: id }, joint),
    decision: decision && {
      choice: decision.choice,
      reason: decision.reason,
      decidedBy: personOf(decision.decidedBy),
      decidedAt: decision.decidedAt.toISOString(),
      numbers: decision.numbers,
    },
    demo,
  }
}
