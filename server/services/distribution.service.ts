import { type DataSource, type EntityManager, IsNull } from 'typeorm'
import type {
  Distribution as DistributionBody,
  DistributionUpdate,
  DistributionUpload,
} from '../../shared/contracts/distribution'
import { checkIndependentSamples, effectiveSamples, type Histogram } from '../../shared/histogram'
import { readDistribution as readFiles } from '../../shared/intake'
import { Distribution } from '../entities/distribution.entity'
import { Group } from '../entities/group.entity'
import { Potential } from '../entities/potential.entity'
import { SourceFile } from '../entities/source-file.entity'
import { Term } from '../entities/term.entity'
import { HttpError, notFound } from '../errors/http-error'
import {
  blockFilesOf,
  NO_UPLOADED_BLOCKS,
  packBlocks,
  storeBlocks,
  type UploadedBlocks,
} from './distribution-blocks'
import { contentSha256, histogramOf } from './histograms'
import type { Download, Member, UploadedFile } from './member'
import { recordTerms } from './record-work'
import { measuredSilhouette } from './silhouette'
import { fileBody, packFile, textOf, unpackFile } from './source-files'
import { findStatePoint, findTerm, lockTerm } from './term-context'

/** Distributions of terms. The server reads each file itself: what a browser made of it does not count. */
export class DistributionService {
  constructor(private readonly dataSource: DataSource) {}

  /**
   * Reads a file as the distribution of a term at a state point, with files of its blocks or chains, and stores all of them.
   * One that was there before is superseded.
   *
   * @throws {InvalidInputError} what the reader refuses, with line and column; nothing is stored then
   * @throws {HttpError} NOT_FOUND; TERM_GONE; VALIDATION_FAILED when the settings are for another kind of term
   */
  async add(
    member: Member,
    termId: string,
    { statePointId, settings, firstOf = null }: DistributionUpload,
    file: UploadedFile,
    blockFiles: UploadedBlocks = NO_UPLOADED_BLOCKS,
  ): Promise<DistributionBody> {
    const { groupId, userId } = member
    const { kind } = await findTerm(this.dataSource.manager, groupId, termId)
    if (settings.kind !== kind) {
      throw new HttpError(
        'VALIDATION_FAILED',
        `This term is a ${kind}; the file was read as a ${settings.kind}.`,
        {
          field: 'settings.kind',
        },
      )
    }
    const packed = await packFile(file)
    const { histogram, notes, blocks, sampleInefficiency } = readFiles(
      { name: file.name, text: textOf(file.bytes) },
      blockFilesOf(blockFiles, firstOf),
      settings,
    )
    const packedBlocks = await packBlocks(blocks, blockFiles)
    const reading = {
      ...recordOf(histogram, packed.sha256),
      edges: [...histogram.edges],
      weights: [...histogram.weights],
      content: histogram.content,
      blocks: histogram.blocks ?? null,
      sampleInefficiency,
      settings,
      notes: [...notes],
      silhouette: measuredSilhouette(histogram),
    }
    return this.dataSource.transaction(async (manager) => {
      const { mapping } = await lockTerm(manager, groupId, termId)
      await findStatePoint(manager, groupId, mapping.polymerId, statePointId, 'statePointId')
      const now = new Date()
      await manager.update(
        Distribution,
        { termId, statePointId, supersededAt: IsNull() },
        { supersededAt: now },
      )
      const place = {
        groupId,
        termId,
        statePointId,
        mappingRevision: mapping.revision,
        mappingVersion: mapping.version,
      }
      const upload = { uploadedAt: now, uploadedById: userId, supersededAt: null }
      const { id } = await manager.save(Distribution, { ...place, ...reading, ...upload })
      await manager.insert(SourceFile, { groupId, distributionId: id, jointDistributionId: null, ...packed })
      await storeBlocks(manager, groupId, id, packedBlocks)
      const work = { termIds: [termId], statePointId, details: { file: file.name } }
      await recordTerms(manager, member, 'data brought in', work)
      return readDistribution(manager, groupId, { id })
    })
  }

  /** The current distribution of a term at a state point. @throws {HttpError} NOT_FOUND when there is none */
  current({ groupId }: Member, termId: string, statePointId: string): Promise<DistributionBody> {
    return readDistribution(this.dataSource.manager, groupId, {
      termId,
      statePointId,
      supersededAt: IsNull(),
    })
  }

  /**
   * States how many independent samples the distribution stands for; null leaves it to blocks and counts.
   *
   * @throws {InvalidInputError} SETTING_INVALID when there are fewer counts than that
   */
  async update(
    member: Member,
    distributionId: string,
    { independentSamples }: DistributionUpdate,
  ): Promise<DistributionBody> {
    const { groupId } = member
    return this.dataSource.transaction(async (manager) => {
      const where = { id: distributionId, groupId }
      const distribution = await manager.findOne(Distribution, { where, lock: { mode: 'pessimistic_write' } })
      if (!distribution) throw notFound('distribution')
      const { kind } = await manager.findOneByOrFail(Term, { id: distribution.termId })
      const histogram = { ...histogramOf(kind, distribution), independentSamples }
      const total = histogram.weights.reduce((sum, weight) => sum + weight, 0)
      checkIndependentSamples(independentSamples, histogram.content === 'count' ? total : Infinity)
      const { sha256 } = await manager.findOneByOrFail(SourceFile, { groupId, distributionId })
      const settings = { ...distribution.settings, independentSamples }
      await manager.update(Distribution, where, { settings, ...recordOf(histogram, sha256) })
      const { termId, statePointId } = distribution
      const details = { what: 'independent samples', new: independentSamples }
      await recordTerms(manager, member, 'data changed', { termIds: [termId], statePointId, details })
      return readDistribution(manager, groupId, where)
    })
  }

  /**
   * Deletes the data of a term at a state point: the current distribution with those it superseded, their files and the
   * potential that rests on them. One that was superseded goes alone.
   */
  async remove(member: Member, distributionId: string): Promise<void> {
    const { groupId } = member
    await this.dataSource.transaction(async (manager) => {
      const where = { id: distributionId, groupId }
      const distribution = await manager.findOne(Distribution, { where, lock: { mode: 'pessimistic_write' } })
      if (!distribution) throw notFound('distribution')
      const { termId, statePointId, supersededAt } = distribution
      await recordTerms(manager, member, 'data deleted', { termIds: [termId], statePointId })
      if (supersededAt !== null) return void (await manager.delete(Distribution, where))
      await manager.delete(Potential, { groupId, termId, statePointId })
      await manager.delete(Distribution, { groupId, termId, statePointId })
    })
  }

  /** The file as it came. */
  file({ groupId }: Member, distributionId: string): Promise<Download> {
    return unpackFile(this.dataSource.manager, groupId, { distributionId })
  }
}

/** What follows from a histogram and what it stands for. */
function recordOf(histogram: Histogram, fileSha256: string) {
  return {
    independentSamples: effectiveSamples(histogram, null).independentSamples,
    contentSha256: contentSha256(histogram, fileSha256),
  }
}

type Which =
  | { readonly id: string }
  | {
      readonly termId: string
      readonly statePointId: string
      readonly supersededAt: ReturnType<typeof IsNull>
    }

async function readDistribution(
  manager: EntityManager,
  groupId: string,
  which: Which,
): Promise<DistributionBody> {
  const distribution = await manager.findOne(Distribution, {
    where: { ...which, groupId },
    relations: { uploadedBy: true },
  })
  if (!distribution) throw notFound('distribution')
  const { id, termId, statePointId, edges, weights, content, independentSamples, settings, notes } =
    distribution
  const { blocks, sampleInefficiency } = distribution
  const [term, group] = [
    await manager.findOneByOrFail(Term, { id: termId }),
    await manager.findOneByOrFail(Group, { id: groupId }),
  ]
  return {
    id,
    termId,
    statePointId,
    kind: term.kind,
    edges,
    weights,
    content,
    independentSamples,
    blocks,
    sampleInefficiency,
    settings,
    notes,
    file: await fileBody(manager, groupId, { distributionId: id }, distribution),
    demo: group.demo,
  }
}
