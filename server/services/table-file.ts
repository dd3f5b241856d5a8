import type { TableQuery } from '../../shared/contracts/potential'
import { derivePotential } from '../../shared/forms'
import type { Inversion, InversionSettings } from '../../shared/inversion'
import { termName } from '../../shared/mapping'
import {
  formatNumber,
  formatRows,
  formatTable,
  makeTable,
  tableComments,
  type TableUnits,
} from '../../shared/tables'
import type { Mapping } from '../entities/mapping.entity'
import type { Polymer } from '../entities/polymer.entity'
import type { StatePoint } from '../entities/state-point.entity'
import type { Term } from '../entities/term.entity'
import type { InversionInput } from './inversion-input'
import { sha256 } from './hashes'

/** The units a user asked for at download. */
export type TableFileUnits = Required<Pick<TableQuery, 'length' | 'angle' | 'energy'>>

/** Everything the table of a term rests on. */
export interface TableSource {
  readonly polymer: Polymer
  readonly mapping: Mapping
  readonly statePoint: StatePoint
  readonly term: Term
  /** Which term of its sequence it is, where the sequence is split by its places. */
  readonly placeNumber?: number
  readonly input: InversionInput
  readonly settings: InversionSettings
  readonly savedAt: Date
  /** The group's data are made up. */
  readonly invented: boolean
}

/** A table as text with what it took to make it. */
export interface TableFile {
  readonly text: string
  readonly inversion: Inversion
}

/** Writes the table of a saved inversion: the same source and units give the same text. */
export function writeTableFile(source: TableSource, units: TableFileUnits): TableFile {
  const { polymer, mapping, statePoint, term, input, settings } = source
  const { inversion, form } = derivePotential(input.histogram, statePoint.temperature, settings)
  const table = makeTable(inversion.potential, settings.table)
  const tableUnits: TableUnits = {
    coordinateUnit: term.kind === 'bond' ? units.length : units.angle,
    energyUnit: units.energy,
  }
  const comments = tableComments({
    invented: source.invented,
    polymer: `${polymer.name}, ${polymer.smiles}`,
    mapping: `${mapping.name}, revision ${mapping.revision}`,
    term: termName(term.types, source.placeNumber),
    kind: term.kind,
    beadOrder: beadOrder(mapping, term),
    temperature: statePoint.temperature,
    statePoint: statePointText(statePoint),
    units: tableUnits,
    settings,
    smoothing: inversion.smoothing,
    form,
    independentSamples: inversion.independentSamples,
    inefficiency: inversion.inefficiency,
    warnings: inversion.warnings,
    input: input.file,
    rowsSha256: sha256(formatRows(table, tableUnits)),
    savedOn: source.savedAt.toISOString().slice(0, 10),
  })
  return { text: formatTable(table, tableUnits, comments), inversion }
}

/** The beads of the term with their unit along the chain, at each place where it stands. */
export function beadOrder({ document }: Mapping, { places }: Term): string {
  const names = new Map(document.beads.map(({ id, name }) => [id, name]))
  return places
    .map((place) => place.map(({ bead, unit }) => `${names.get(bead) ?? bead}(${unit})`).join(' '))
    .join(' or ')
}

/** What names the state point beside its temperature; null for nothing. */
export function statePointText({ pressure, phase, composition }: StatePoint): string | null {
  const parts = [pressure === null ? '' : `${formatNumber(pressure)} bar`, phase, composition]
  return parts.filter((part) => part !== '').join(', ') || null
}
