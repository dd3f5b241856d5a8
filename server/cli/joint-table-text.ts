import { createHash } from 'node:crypto'
import type { JointHistogram } from '../../shared/histogram'
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
import type { CoordinateUnit, EnergyUnit } from '../../shared/units'
import type { Output } from './output'
import type { Input } from './read-input'

/** What a joint table is asked for with. */
export interface JointTableOptions {
  readonly units: readonly [CoordinateUnit, CoordinateUnit]
  /** K */
  readonly temperature: number
  readonly energyUnit: EnergyUnit
  /** Rows along both coordinates; left out for the defaults of their kinds. */
  readonly jointRows?: readonly [number, number]
}

/**
 * The table of the smoothed joint potential as text; its warnings go to the notes.
 *
 * @throws {InvalidInputError} as `jointPotential` and `jointTable`
 */
export function jointTableText(
  histogram: JointHistogram,
  options: JointTableOptions,
  input: Input,
  output: Output,
): string {
  const potential = jointPotential(histogram, options.temperature, DEFAULT_JOINT_SETTINGS)
  potential.warnings.forEach(({ code, message, action }) => output.note(`${code}: ${message} ${action}`))
  const [xRows, yRows] = options.jointRows ?? [null, null]
  const table = jointTable(potential.surface, {
    x: { ...DEFAULT_JOINT_TABLE.x, rows: xRows },
    y: { ...DEFAULT_JOINT_TABLE.y, rows: yRows },
  })
  const units: JointTableUnits = { coordinateUnits: options.units, energyUnit: options.energyUnit }
  const comments = jointTableComments({
    invented: false,
    polymer: null,
    mapping: null,
    terms: null,
    beadOrders: null,
    statePoint: null,
    units,
    potential,
    input,
    rowsSha256: createHash('sha256').update(formatJointRows(table, units)).digest('hex'),
  })
  return formatJointTable(table, units, comments)
}
