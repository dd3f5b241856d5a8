import { type Zippable, zipSync } from 'fflate'
import type { DataSource } from 'typeorm'
import { inversionSettingsSchema } from '../../shared/contracts/potential'
import type { InversionSettings } from '../../shared/inversion'
import { formatNumber } from '../../shared/tables'
import { Group } from '../entities/group.entity'
import { Mapping } from '../entities/mapping.entity'
import { Polymer } from '../entities/polymer.entity'
import { Potential } from '../entities/potential.entity'
import type { StatePoint } from '../entities/state-point.entity'
import { Term } from '../entities/term.entity'
import { HttpError, notFound } from '../errors/http-error'
import { findInversionInput, type InversionInput } from './inversion-input'
import type { Download, Member } from './member'
import { type TableFileUnits, type TableSource, writeTableFile } from './table-file'
import { fileNamePart, tableFileName, tableFileNames } from './table-names'
import { writeReadme } from './table-readme'
import { findStatePoint, findTerm } from './term-context'

const NO_DATA = 'no data at this state point'
const NOT_INVERTED = 'data, but no saved potential'
const STALE = 'its data changed after the potential was saved; save it again on the bench'

type Background = Pick<TableSource, 'polymer' | 'mapping' | 'statePoint' | 'invented'>

/** Why a term has no table, or what its table is made from. */
type Outcome =
  | { readonly reason: string }
  | {
      readonly reason: null
      readonly input: InversionInput
      readonly settings: InversionSettings
      readonly savedAt: Date
    }

/** Tables of saved inversions as files. The same saved state and units give the same bytes. */
export class TableService {
  constructor(private readonly dataSource: DataSource) {}

  /**
   * The table of one term.
   *
   * @throws {HttpError} NOT_FOUND without data or saved potential; CONFLICT when the potential is stale
   */
  async forTerm(
    { groupId }: Member,
    termId: string,
    statePointId: string,
    units: TableFileUnits,
  ): Promise<Download> {
    const term = await findTerm(this.dataSource.manager, groupId, termId)
    const background = await this.background(groupId, term.mappingId, statePointId)
    const outcome = await this.outcome(term, background.statePoint)
    if (outcome.reason !== null) {
      throw new HttpError(
        outcome.reason === STALE ? 'CONFLICT' : 'NOT_FOUND',
        `There is no table for this term: ${outcome.reason}.`,
      )
    }
    const { text } = writeTableFile({ ...background, ...outcome, term }, units)
    const fileName = tableFileName({ ...term, temperature: background.statePoint.temperature })
    return { fileName, bytes: Buffer.from(text) }
  }

  /**
   * All tables of a mapping at a state point as a zip archive, with a README.
   *
   * @throws {HttpError} NOT_FOUND when no term has a table
   */
  async archive(
    { groupId }: Member,
    mappingId: string,
    statePointId: string,
    units: TableFileUnits,
  ): Promise<Download> {
    const background = await this.background(groupId, mappingId, statePointId)
    const terms = await this.dataSource.manager.find(Term, {
      where: { mappingId, current: true },
      order: { position: 'ASC' },
    })
    const sources: TableSource[] = []
    const missing: { term: Term; reason: string }[] = []
    for (const term of terms) {
      const outcome = await this.outcome(term, background.statePoint)
      if (outcome.reason === null) sources.push({ ...background, ...outcome, term })
      else missing.push({ term, reason: outcome.reason })
    }
    if (sources.length === 0) {
      throw new HttpError('NOT_FOUND', 'No term has a table yet: save a potential on the bench first.')
    }
    return pack(background, sources, missing, units)
  }

  private async background(groupId: string, mappingId: string, statePointId: string): Promise<Background> {
    const { manager } = this.dataSource
    const mapping = await manager.findOneBy(Mapping, { id: mappingId, groupId })
    if (!mapping) throw notFound('mapping')
    const { polymerId } = mapping
    const statePoint = await findStatePoint(manager, groupId, polymerId, statePointId, 'statePoint')
    const polymer = await manager.findOneByOrFail(Polymer, { id: polymerId })
    const { demo } = await manager.findOneByOrFail(Group, { id: groupId })
    return { polymer, mapping, statePoint, invented: demo }
  }

  private async outcome(term: Term, statePoint: StatePoint): Promise<Outcome> {
    const { manager } = this.dataSource
    const input = await findInversionInput(manager, term, statePoint)
    if (!input) return { reason: NO_DATA }
    const potential = await manager.findOneBy(Potential, { termId: term.id, statePointId: statePoint.id })
    if (!potential) return { reason: NOT_INVERTED }
    if (potential.inputSha256 !== input.sha256) return { reason: STALE }
    // Settings saved before a choice existed take its default.
    const settings = inversionSettingsSchema.parse(potential.settings)
    return { reason: null, input, settings, savedAt: potential.savedAt }
  }
}

function pack(
  background: Background,
  sources: readonly TableSource[],
  missing: readonly { readonly term: Term; readonly reason: string }[],
  units: TableFileUnits,
): Download {
  const { polymer, mapping, statePoint } = background
  const { temperature } = statePoint
  const names = tableFileNames(sources.map(({ term }) => ({ ...term, temperature })))
  const tables = sources.map((source) => writeTableFile(source, units))
  const files = sources.map(({ term }, index) => ({
    name: names[index],
    term,
    warnings: tables[index].inversion.warnings.length,
  }))
  const readme = writeReadme({ source: background, units, files, missing })
  const latest = new Date(Math.max(...sources.map(({ savedAt }) => savedAt.getTime())))
  const archive: Zippable = { 'README.txt': [Buffer.from(readme), { mtime: archiveTime(latest) }] }
  sources.forEach(({ savedAt }, index) => {
    archive[names[index]] = [Buffer.from(tables[index].text), { mtime: archiveTime(savedAt) }]
  })
  const parts = [fileNamePart(polymer.name), fileNamePart(mapping.name), `${formatNumber(temperature)}K`]
  return {
    fileName: `${parts.join('_')}_tables.zip`,
    bytes: zipSync(archive),
  }
}

/** Archives hold local time without a zone: this one reads as UTC wherever the server runs. */
function archiveTime(time: Date): Date {
  return new Date(time.getTime() + time.getTimezoneOffset() * 60_000)
}
