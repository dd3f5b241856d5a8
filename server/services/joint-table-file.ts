import type { JointTableQuery } from '../../shared/contracts/potential'
import {
  DEFAULT_JOINT_SETTINGS,
  DEFAULT_JOINT_TABLE,
  formatJointRows,
  formatJointTable,
  jointPotential,
  jointTable,
  jointTableComments,
  type JointTableUnits,
} from '../../shared/joint-potential'
import { termName } from '../../shared/mapping'
import type { JointDistribution } from '../entities/joint-distribution.entity'
import type { SourceFile } from '../entities/source-file.entity'
import type { Term } from '../entities/term.entity'
import { sha256 } from './hashes'
import { jointHistogramOf } from './histograms'
import { beadOrder, statePointText, type TableSource } from './table-file'
import type { PlaceNumbers } from './table-names'

/** The units a user asked for at download. */
export type JointTableFileUnits = Required<JointTableQuery>

/** Everything a joint table rests on. */
export interface JointTableSource extends Pick<
  TableSource,
  'polymer' | 'mapping' | 'statePoint' | 'invented'
> {
  /** In the order of the axes of the data. */
  readonly terms: readonly [Term, Term]
  readonly placeNumbers?: PlaceNumbers
  readonly joint: JointDistribution
  readonly file: Pick<SourceFile, 'name' | 'sha256'>
}

/** A joint table as text, and how many warnings it states. */
export interface JointTableFile {
  readonly text: string
  readonly warnings: number
}

/**
 * Writes the table of the smoothed joint potential of two terms: the same source and units give the same text.
 *
 * @throws {InvalidInputError} as `jointPotential`, among them SAMPLE_SIZE_UNKNOWN
 */
export function writeJointTableFile(source: JointTableSource, units: JointTableFileUnits): JointTableFile {
  const { polymer, mapping, statePoint, terms, joint } = source
  const potential = jointPotential(jointHistogramOf(joint), statePoint.temperature, DEFAULT_JOINT_SETTINGS)
  const table = jointTable(potential.surface, DEFAULT_JOINT_TABLE)
  const [xUnit, yUnit] = terms.map(({ kind }) => (kind === 'bond' ? units.length : units.angle))
  const tableUnits: JointTableUnits = { coordinateUnits: [xUnit, yUnit], energyUnit: units.energy }
  const [x, y] = terms
  const comments = jointTableComments({
    invented: source.invented,
    polymer: `${polymer.name}, ${polymer.smiles}`,
    mapping: `${mapping.name}, revision ${mapping.revision}`,
    terms: [termName(x.types, source.placeNumbers?.[0]), termName(y.types, source.placeNumbers?.[1])],
    beadOrders: [beadOrder(mapping, x), beadOrder(mapping, y)],
    statePoint: statePointText(statePoint),
    units: tableUnits,
    potential,
    input: source.file,
    rowsSha256: sha256(formatJointRows(table, tableUnits)),
  })
  return { text: formatJointTable(table, tableUnits, comments), warnings: potential.warnings.length }
}
