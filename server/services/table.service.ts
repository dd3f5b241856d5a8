import { type Zippable, zipSync } from 'fflate'
import type { DataSource, EntityManager } from 'typeorm'
import { inversionSettingsSchema } from '../../shared/contracts/potential'
import type { InversionSettings } from '../../shared/inversion'
import { usedTerms } from '../../shared/mapping'
import { formatNumber } from '../../shared/tables'
import { Group } from '../entities/group.entity'
import { Mapping } from '../entities/mapping.entity'
import { Polymer } from '../entities/polymer.entity'
import { Potential } from '../entities/potential.entity'
import type { StatePoint } from '../entities/state-point.entity'
import { Term } from '../entities/term.entity'
import { HttpError, notFound } from '../errors/http-error'
import { findInversionInput, type InversionInput } from './inversion-input'
import { type FoundLayout, layoutFor } from './find-layout'
import { type JointOutcome, jointOutcomes, jointTableName } from './joint-table.service'
import { type Fit, readFit, UNFIT_DATA } from './mapping-fit'
import type { Download, Member } from './member'
import { placeNumber, storedTermName } from './stored-term-name'
import { type TableFileUnits, type TableSource, type TableWriting, writeTableFile } from './table-file'
import { fileNamePart, nameInLayout, namesInOneFolder, tableFileName } from './table-names'
import { leaveOutReason, writeReadme } from './table-readme'
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
   * @throws {HttpError} NOT_FOUND without data or saved potential, or layout; CONFLICT when the potential is stale
   * @throws {InvalidInputError} LAYOUT_INVALID when the layout does not fit the table
   */
  async forTerm(
    member: Member,
    termId: string,
    statePointId: string,
    writing: TableWriting,
  ): Promise<Download> {
    const { document } = await layoutFor(this.dataSource.manager, member.groupId, writing)
    const source = await this.source(member, termId, statePointId)
    const { text } = writeTableFile(source, writing, document)
    return { fileName: nameInLayout(sourceName(source), document), bytes: Buffer.from(text) }
  }

  /**
   * What the table of one term is made from.
   *
   * @throws {HttpError} as `forTerm`
   */
  async source({ groupId }: Member, termId: string, statePointId: string): Promise<TableSource> {
    const term = await findTerm(this.dataSource.manager, groupId, termId)
    const background = await this.background(groupId, term.mappingId, statePointId)
    const { manager } = this.dataSource
    const outcome = await this.outcome(
      term,
      background.statePoint,
      await readFit(manager, background.mapping),
    )
    if (outcome.reason !== null) {
      throw new HttpError(
        [NO_DATA, NOT_INVERTED].includes(outcome.reason) ? 'NOT_FOUND' : 'CONFLICT',
        `There is no table for this term: ${outcome.reason.replace(/\.?$/, '.')}`,
      )
    }
    const siblings = await currentTerms(manager, term.mappingId)
    const own = siblings.find(({ id }) => id === termId)
    const number = own && placeNumber(own, siblings)
    return { ...background, ...outcome, term, placeNumber: number }
  }

  /**
   * All tables of the terms in use of a mapping at a state point as a zip archive, joint ones where that was decided, with a README.
   *
   * @throws {HttpError} NOT_FOUND when no term has a table, or for the layout
   * @throws {InvalidInputError} LAYOUT_INVALID when the layout does not fit a table
   */
  async archive(
    { groupId }: Member,
    mappingId: string,
    statePointId: string,
    writing: TableWriting,
  ): Promise<Download> {
    const background = await this.background(groupId, mappingId, statePointId)
    const { manager } = this.dataSource
    const layout = await layoutFor(manager, groupId, writing)
    const terms = await currentTerms(manager, mappingId)
    const fit = await readFit(manager, background.mapping)
    const sources: TableSource[] = []
    const missing: { term: Term; reason: string }[] = []
    const used = usedTerms(background.mapping.document, terms)
    for (const term of used) {
      const outcome = await this.outcome(term, background.statePoint, fit)
      if (outcome.reason === null) {
        sources.push({ ...background, ...outcome, term, placeNumber: placeNumber(term, terms) })
      } else missing.push({ term, reason: outcome.reason })
    }
    const joint = await jointOutcomes(manager, background, writing, layout.document)
    if (sources.length === 0 && joint.every(({ file }) => file === null)) {
      throw new HttpError('NOT_FOUND', 'No term has a table yet: save a potential on the bench first.')
    }
    const leftOut = terms.filter((term) => !used.includes(term))
    return pack({ background, terms, sources, joint, missing, leftOut }, writing, layout)
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

  private async outcome(term: Term, statePoint: StatePoint, fit: Fit): Promise<Outcome> {
    const { manager } = this.dataSource
    const input = await findInversionInput(manager, term, statePoint)
    if (!input) return { reason: NO_DATA }
    const unfit = fit.reason(term.id, input.distribution.mappingVersion)
    if (unfit !== null) return { reason: `${UNFIT_DATA} ${unfit}` }
    const potential = await manager.findOneBy(Potential, { termId: term.id, statePointId: statePoint.id })
    if (!potential) return { reason: NOT_INVERTED }
    if (potential.inputSha256 !== input.sha256) return { reason: STALE }
    // Settings saved before a choice existed take its default.
    const settings = inversionSettingsSchema.parse(potential.settings)
    return { reason: null, input, settings, savedAt: potential.savedAt }
  }
}

/** What goes into an archive. */
interface Contents {
  readonly background: Background
  /** All current terms of the mapping, in their order. */
  readonly terms: readonly Term[]
  readonly sources: readonly TableSource[]
  /** Pairs that a joint potential was decided for. */
  readonly joint: readonly JointOutcome[]
  readonly missing: readonly { readonly term: Term; readonly reason: string }[]
  /** Terms that the mapping leaves out, whether they have data or not. */
  readonly leftOut: readonly Term[]
}

function pack(contents: Contents, units: TableFileUnits, layout: FoundLayout): Download {
  const { background, terms, sources, joint, missing, leftOut } = contents
  const { polymer, mapping, statePoint } = background
  const { temperature } = statePoint
  const tables = sources.map((source) => {
    const { text, inversion } = writeTableFile(source, units, layout.document)
    const { term, savedAt } = source
    return { text, time: savedAt, source, term, warnings: inversion.warnings.length }
  })
  const jointTables = joint.flatMap(({ source, file }) =>
    file === null ? [] : [{ ...file, time: source.joint.uploadedAt, source, terms: source.terms }],
  )
  const all = [...tables, ...jointTables]
  const names = namesInOneFolder(
    [
      ...tables.map(({ source }) => sourceName(source)),
      ...jointTables.map(({ source }) => jointTableName(source)),
    ].map((name) => nameInLayout(name, layout.document)),
  )
  const readme = writeReadme({
    source: background,
    nameOf: (term) => nameAmong(term, terms),
    units,
    layout,
    files: tables.map((table, index) => ({ ...table, name: names[index] })),
    joint: jointTables.map((table, index) => ({ ...table, name: names[tables.length + index] })),
    missing,
    leftOut: leftOut.map((term) => ({ term, reason: leaveOutReason(background.mapping.document, term) })),
    jointMissing: joint.flatMap(({ source: { terms }, reason }) =>
      reason === null ? [] : [{ terms, reason }],
    ),
  })
  const latest = new Date(Math.max(...all.map(({ time }) => time.getTime())))
  const archive: Zippable = { 'README.txt': [Buffer.from(readme), { mtime: archiveTime(latest) }] }
  all.forEach(({ text, time }, index) => {
    archive[names[index]] = [Buffer.from(text), { mtime: archiveTime(time) }]
  })
  const parts = [fileNamePart(polymer.name), fileNamePart(mapping.name), `${formatNumber(temperature)}K`]
  return {
    fileName: `${parts.join('_')}_tables.zip`,
    bytes: zipSync(archive),
  }
}

/** As in bond_B-E_400K.txt. */
function sourceName({ term, placeNumber: number, statePoint }: TableSource): string {
  return tableFileName({ ...term, temperature: statePoint.temperature, placeNumber: number })
}

/** Joint terms are read by themselves: among the others they are found by their ids. */
function nameAmong(term: Term, terms: readonly Term[]): string {
  return storedTermName(terms.find(({ id }) => id === term.id) ?? term, terms)
}

function currentTerms(manager: EntityManager, mappingId: string): Promise<Term[]> {
  return manager.find(Term, { where: { mappingId, current: true }, order: { position: 'ASC' } })
}

/** Archives hold local time without a zone: this one reads as UTC wherever the server runs. */
function archiveTime(time: Date): Date {
  return new Date(time.getTime() + time.getTimezoneOffset() * 60_000)
}
