import type { z } from 'zod'
import type { jointTableQuerySchema } from '../../shared/contracts/potential'
import {
  DEFAULT_JOINT_SETTINGS,
  DEFAULT_JOINT_TABLE,
  jointPotential,
  jointTable,
} from '../../shared/joint-potential'
import {
  builtInLayout,
  DEFAULT_BUILT_IN,
  type JointAbout,
  type Layout,
  writeJointTableInLayout,
} from '../../shared/layouts'
import { termName } from '../../shared/mapping'
import type { JointDistribution } from '../entities/joint-distribution.entity'
import type { SourceFile } from '../entities/source-file.entity'
import type { Term } from '../entities/term.entity'
import { sha256 } from './hashes'
import { jointHistogramOf } from './histograms'
import { beadOrder, statePointText, type TableSource } from './table-file'
import type { PlaceNumbers } from './table-names'

/** The units a user asked for at download. */
export type JointTableFileUnits = Pick<JointTableWriting, 'length' | 'angle' | 'energy'>

/** Units, and the layout asked for: the house's own three columns in those units when left out. */
export type JointTableWriting = z.output<typeof jointTableQuerySchema>

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
 * Writes the table of the smoothed joint potential of two terms: the same source and layout give the same text.
 *
 * @param units of the layout of the house that is taken without `layout`
 * @throws {InvalidInputError} as `jointPotential`, among them SAMPLE_SIZE_UNKNOWN; as `writeJointTableInLayout`
 */
export function writeJointTableFile(
  source: JointTableSource,
  units: JointTableFileUnits,
  layout: Layout = builtInLayout(DEFAULT_BUILT_IN, units),
): JointTableFile {
  const { polymer, mapping, statePoint, terms, joint } = source
  const potential = jointPotential(jointHistogramOf(joint), statePoint.temperature, DEFAULT_JOINT_SETTINGS)
  const table = jointTable(potential.surface, DEFAULT_JOINT_TABLE)
  const [x, y] = terms
  const comments: JointAbout['comments'] = {
    invented: source.invented,
    polymer: `${polymer.name}, ${polymer.smiles}`,
    mapping: `${mapping.name}, revision ${mapping.revision}`,
    terms: [termName(x.types, source.placeNumbers?.[0]), termName(y.types, source.placeNumbers?.[1])],
    beadOrders: [beadOrder(mapping, x), beadOrder(mapping, y)],
    statePoint: statePointText(statePoint),
    potential,
    input: source.file,
  }
  const about = { comments, repeatUnit: polymer.smiles, types: [x.types, y.types], handOver: null }
  return { text: writeJointTableInLayout(table, layout, about, sha256), warnings: potential.warnings.length }
}
