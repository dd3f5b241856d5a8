import type { DataSource, EntityManager } from 'typeorm'
import {
  inversionSettingsSchema,
  type PotentialSave,
  type StoredPotential,
} from '../../shared/contracts/potential'
import { derivePotential } from '../../shared/forms'
import { makeTable } from '../../shared/tables'
import { Potential } from '../entities/potential.entity'
import type { StatePoint } from '../entities/state-point.entity'
import type { Term } from '../entities/term.entity'
import { HttpError, notFound } from '../errors/http-error'
import { findInversionInput } from './inversion-input'
import type { Member } from './member'
import { personOf } from './people'
import { recordTerms } from './record-work'
import { derivedSilhouette } from './silhouette'
import { findStatePoint, findTerm, lockTerm, mappingOf } from './term-context'

/** Saved inversions: the settings are stored, the numbers follow from them. */
export class PotentialService {
  constructor(private readonly dataSource: DataSource) {}

  /** @throws {HttpError} NOT_FOUND when none is saved for the term at the state point */
  async get({ groupId }: Member, termId: string, statePointId: string): Promise<StoredPotential> {
    const { manager } = this.dataSource
    const term = await findTerm(manager, groupId, termId)
    const { polymerId } = await mappingOf(manager, term)
    const statePoint = await findStatePoint(manager, groupId, polymerId, statePointId, 'statePoint')
    const potential = await readPotential(manager, term, statePoint)
    if (!potential) throw notFound('potential')
    return potential
  }

  /**
   * Saves the inversion of the current distribution with these settings, after trying it out.
   *
   * @throws {HttpError} CONFLICT with the stored potential when someone saved in between; NOT_FOUND without data; TERM_GONE
   * @throws {InvalidInputError} when the distribution cannot be inverted with these settings; nothing is saved then
   */
  async save(member: Member, termId: string, save: PotentialSave): Promise<StoredPotential> {
    const { groupId, userId } = member
    const { statePointId, revision, settings } = save
    return this.dataSource.transaction(async (manager) => {
      const { mapping, term } = await lockTerm(manager, groupId, termId)
      const statePoint = await findStatePoint(
        manager,
        groupId,
        mapping.polymerId,
        statePointId,
        'statePointId',
      )
      const stored = await readPotential(manager, term, statePoint)
      if ((stored?.revision ?? null) !== revision) throw savedMeanwhile(stored)
      const input = await findInversionInput(manager, term, statePoint)
      if (!input) {
        throw new HttpError(
          'NOT_FOUND',
          'There are no data for this term at this state point: bring them in first.',
        )
      }
      const { inversion } = derivePotential(input.histogram, statePoint.temperature, settings)
      makeTable(inversion.potential, settings.table)
      const record = {
        groupId,
        termId,
        statePointId,
        distributionId: input.distribution.id,
        settings,
        inputSha256: input.sha256,
        silhouette: derivedSilhouette(inversion.regenerated, input.histogram),
        revision: (revision ?? 0) + 1,
        savedAt: new Date(),
        savedById: userId,
      }
      await manager.upsert(Potential, record, ['termId', 'statePointId'])
      await recordTerms(manager, member, 'potential saved', { termIds: [termId], statePointId })
      const saved = await readPotential(manager, term, statePoint)
      if (!saved) throw notFound('potential')
      return saved
    })
  }

  /** Forgets the saved inversion; the data stay. */
  async remove(member: Member, potentialId: string): Promise<void> {
    await this.dataSource.transaction(async (manager) => {
      const where = { id: potentialId, groupId: member.groupId }
      const potential = await manager.findOne(Potential, { where, lock: { mode: 'pessimistic_write' } })
      if (!potential) throw notFound('potential')
      const { termId, statePointId } = potential
      await recordTerms(manager, member, 'potential deleted', { termIds: [termId], statePointId })
      await manager.delete(Potential, where)
    })
  }
}

function savedMeanwhile(stored: StoredPotential | null): HttpError {
  if (!stored) {
    return new HttpError('CONFLICT', 'Someone deleted this potential in between. Save it as a new one.', {
      details: null,
    })
  }
  const who = stored.savedBy?.name ?? 'Someone'
  return new HttpError('CONFLICT', `${who} saved this potential in between. Look at those settings first.`, {
    details: stored,
  })
}

async function readPotential(
  manager: EntityManager,
  term: Term,
  statePoint: StatePoint,
): Promise<StoredPotential | null> {
  const potential = await manager.findOne(Potential, {
    where: { termId: term.id, statePointId: statePoint.id },
    relations: { savedBy: true },
  })
  if (!potential) return null
  const input = await findInversionInput(manager, term, statePoint)
  const { id, termId, statePointId, distributionId, inputSha256, revision } = potential
  return {
    id,
    termId,
    statePointId,
    distributionId,
    settings: inversionSettingsSchema.parse(potential.settings),
    inputSha256,
    stale: input?.sha256 !== inputSha256,
    revision,
    savedBy: personOf(potential.savedBy),
    savedAt: potential.savedAt.toISOString(),
  }
}
