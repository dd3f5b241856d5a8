import type { z } from 'zod'
import type { TableQuery, tableQuerySchema } from '../../shared/contracts/potential'
import { derivePotential } from '../../shared/forms'
import type { Inversion, InversionSettings } from '../../shared/inversion'
import {
  type BeyondTable,
  builtInLayout,
  DEFAULT_BUILT_IN,
  type Layout,
  type TableAbout,
  writeTableInLayout,
} from '../../shared/layouts'
import { termName } from '../../shared/mapping'
import { formatNumber, makeTable, type Table, tablePoint } from '../../shared/tables'
import type { Mapping } from '../entities/mapping.entity'
import type { Polymer } from '../entities/polymer.entity'
import type { StatePoint } from '../entities/state-point.entity'
import type { Term } from '../entities/term.entity'
import type { InversionInput } from './inversion-input'
import { sha256 } from './hashes'

/** The units a user asked for at download. */
export type TableFileUnits = Required<Pick<TableQuery, 'length' | 'angle' | 'energy'>>

/** Units, and the layout asked for: the house's own three columns in those units when left out. */
export type TableWriting = TableFileUnits &
  Pick<z.output<typeof tableQuerySchema>, 'layout' | 'layoutVersion'>

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

/**
 * Writes the table of a saved inversion: the same source and layout give the same text.
 *
 * @param units of the layout of the house that is taken without `layout`
 * @throws {InvalidInputError} as `writeTableInLayout`
 */
export function writeTableFile(
  source: TableSource,
  units: TableFileUnits,
  layout: Layout = builtInLayout(DEFAULT_BUILT_IN, units),
): TableFile {
  const { table, about, beyond, inversion } = tableOf(source)
  return { text: writeTableInLayout(table, layout, about, sha256, beyond), inversion }
}

/** The numbers of the table of a saved inversion, and all that is known of it, whichever layout it is written in. */
export interface TableContent {
  readonly table: Table
  readonly about: TableAbout
  /** What the potential says beyond the table. */
  readonly beyond: BeyondTable
  readonly inversion: Inversion
}

/** Makes the table of a saved inversion. */
export function tableOf(source: TableSource): TableContent {
  const { polymer, mapping, statePoint, term, input, settings } = source
  const { inversion, form } = derivePotential(input.histogram, statePoint.temperature, settings)
  const { potential } = inversion
  const comments: TableAbout['comments'] = {
    invented: source.invented,
    polymer: `${polymer.name}, ${polymer.smiles}`,
    mapping: `${mapping.name}, revision ${mapping.revision}`,
    term: termName(term.types, source.placeNumber),
    kind: term.kind,
    beadOrder: beadOrder(mapping, term),
    temperature: statePoint.temperature,
    statePoint: statePointText(statePoint),
    settings,
    smoothing: inversion.smoothing,
    form,
    independentSamples: inversion.independentSamples,
    inefficiency: inversion.inefficiency,
    warnings: inversion.warnings,
    input: input.file,
    savedOn: source.savedAt.toISOString().slice(0, 10),
  }
  return {
    table: makeTable(potential, settings.table),
    about: { comments, repeatUnit: polymer.smiles, types: term.types, handOver: null },
    beyond: (coordinate) => tablePoint(potential, settings.table.cap, coordinate),
    inversion,
  }
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
