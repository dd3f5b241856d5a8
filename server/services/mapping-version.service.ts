import type { DataSource, EntityManager } from 'typeorm'
import type {
  MappingFit,
  MappingVersion as VersionBody,
  UnfitData,
} from '../../shared/contracts/mapping-version'
import { type MappingDocument, sameMakeUp } from '../../shared/mapping'
import { MappingVersion } from '../entities/mapping-version.entity'
import { Mapping } from '../entities/mapping.entity'
import { Polymer } from '../entities/polymer.entity'
import type { Term } from '../entities/term.entity'
import { notFound } from '../errors/http-error'
import { currentData, hasData, type MappingDatum } from './mapping-data'
import { fitAfter, pairReason, readFit } from './mapping-fit'
import type { Member } from './member'
import { personOf } from './people'
import { planTerms } from './plan-terms'
import { storedTermName } from './stored-term-name'

/** Versions of a mapping, and what a change would do to its data. */
export class MappingVersionService {
  constructor(private readonly dataSource: DataSource) {}

  /** The earlier versions, the newest first. @throws {HttpError} NOT_FOUND */
  async list({ groupId }: Member, mappingId: string): Promise<VersionBody[]> {
    const { manager } = this.dataSource
    await findMapping(manager, groupId, mappingId)
    const data = await currentData(manager, mappingId)
    const versions = await manager.find(MappingVersion, {
      where: { mappingId, groupId },
      relations: { savedBy: true },
      order: { number: 'DESC' },
    })
    return versions.map(({ number, document, savedAt, savedBy }) => ({
      number,
      document,
      savedAt: savedAt.toISOString(),
      savedBy: personOf(savedBy),
      data: data.filter(({ version }) => version === number).length,
    }))
  }

  /**
   * Whether saving a document would make a new version, and which data would no longer fit. Nothing is written.
   *
   * @throws {InvalidInputError} when the document does not fit the repeat unit
   * @throws {HttpError} NOT_FOUND
   */
  async preview({ groupId }: Member, mappingId: string, document: MappingDocument): Promise<MappingFit> {
    const { manager } = this.dataSource
    const mapping = await findMapping(manager, groupId, mappingId)
    const { smiles } = await manager.findOneByOrFail(Polymer, { id: mapping.polymerId })
    const plan = await planTerms(manager, { mapping, smiles, before: mapping.document, after: document })
    const data = await currentData(manager, mappingId)
    const makesVersion = !sameMakeUp(mapping.document, document) && (await hasData(manager, mappingId))
    const now = await readFit(manager, mapping)
    const terms = plan.kept.map(({ id, term: { places } }) => ({ id, places }))
    const after = await fitAfter(manager, mapping, { document, terms }, plan.stored)
    const stands = new Set(plan.stored.filter(({ current }) => current).map(({ id }) => id))
    const fits = data.filter(
      ({ termIds, version }) =>
        termIds.every((id) => stands.has(id)) && pairReason(now, termIds, version) === null,
    )
    const lost = fits.flatMap((datum) => {
      const reason = pairReason(after, datum.termIds, datum.version)
      return reason === null ? [] : [{ ...datum, reason }]
    })
    return {
      version: mapping.version + (makesVersion ? 1 : 0),
      makesVersion,
      lost: gathered(lost, plan.stored),
      fitting: data.filter(({ termIds, version }) => pairReason(after, termIds, version) === null).length,
    }
  }
}

async function findMapping(manager: EntityManager, groupId: string, id: string): Promise<Mapping> {
  const mapping = await manager.findOneBy(Mapping, { id, groupId })
  if (!mapping) throw notFound('mapping')
  return mapping
}

/** Data of the same terms that are lost for the same reason, as one. */
function gathered(
  lost: readonly (MappingDatum & { readonly reason: string })[],
  stored: readonly Term[],
): UnfitData[] {
  const terms = stored.toSorted((a, b) => a.position - b.position)
  const all = new Map<string, UnfitData>()
  for (const { termIds, statePointId, reason } of lost) {
    const key = [...termIds, reason].join()
    const own = termIds.map((id) => terms.find((term) => term.id === id)).filter((term) => term !== undefined)
    const one = all.get(key) ?? {
      name: own.map((term) => storedTermName(term, terms)).join(' · '),
      kind: own.length === 1 ? own[0].kind : null,
      statePointIds: [],
      reason,
    }
    all.set(key, { ...one, statePointIds: [...one.statePointIds, statePointId] })
  }
  return [...all.values()]
}
