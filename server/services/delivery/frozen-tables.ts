import type { FrozenHandOver } from '../../../shared/contracts/hand-over'
import { inversionSettingsSchema } from '../../../shared/contracts/potential'
import {
  type JointAbout,
  type Layout,
  type TableAbout,
  writeJointTableInLayout,
  writeTableInLayout,
} from '../../../shared/layouts'
import { formatNumber } from '../../../shared/tables'
import type { HandOverTable } from '../../entities/hand-over-table.entity'
import { sha256 } from '../hashes'

type FrozenComments = Pick<
  TableAbout['comments'],
  'smoothing' | 'form' | 'independentSamples' | 'inefficiency'
>
type FrozenJointComments = Pick<
  JointAbout['comments']['potential'],
  'settings' | 'smoothing' | 'independentSamples'
> & { readonly populated: readonly (readonly [number, number])[] }

/**
 * Writes a table of a release in a layout, from the numbers and the words that were frozen with it: the group's data may have
 * changed since.
 *
 * @throws {InvalidInputError} as `writeLayout`, among them LAYOUT_BEYOND_TABLE: beyond its ends a frozen table says nothing
 */
export function writeFrozenTable(frozen: FrozenHandOver, table: HandOverTable, layout: Layout): string {
  return table.secondCoordinates === null
    ? writeSingle(frozen, table, layout)
    : writeJoint(frozen, table, table.secondCoordinates, layout)
}

function writeSingle(frozen: FrozenHandOver, table: HandOverTable, layout: Layout): string {
  const { name, kinds, temperature, coordinates, energies, forces, meta } = table
  const numbers = {
    kind: kinds[0],
    temperature,
    coordinates: Float64Array.from(coordinates),
    energies: Float64Array.from(energies),
    forces: Float64Array.from(forces),
  }
  const comments = {
    ...headOf(frozen),
    ...(meta.commentInput as FrozenComments),
    term: name,
    kind: kinds[0],
    beadOrder: meta.beadOrders[0],
    temperature,
    settings: inversionSettingsSchema.parse(meta.settings),
    warnings: warningsOf(table) as TableAbout['comments']['warnings'],
    input: meta.input,
    savedOn: meta.savedOn,
  }
  const about = {
    comments,
    repeatUnit: frozen.polymer.smiles,
    types: meta.types[0],
    handOver: String(frozen.number),
  }
  return writeTableInLayout(numbers, layout, about, sha256)
}

function writeJoint(frozen: FrozenHandOver, table: HandOverTable, second: number[], layout: Layout): string {
  const { name, kinds, temperature, coordinates, energies, forces, secondForces, meta } = table
  const { populated, ...how } = meta.commentInput as FrozenJointComments
  const both = [kinds[0], kinds[1]] as const
  const [first, other] = name.split(' · ')
  const numbers = {
    kinds: both,
    temperature,
    x: Float64Array.from(coordinates),
    y: Float64Array.from(second),
    energies: Float64Array.from(energies),
    xForces: Float64Array.from(forces),
    yForces: Float64Array.from(secondForces ?? []),
  }
  const comments: JointAbout['comments'] = {
    ...headOf(frozen),
    terms: [first, other],
    beadOrders: [meta.beadOrders[0], meta.beadOrders[1]],
    potential: {
      ...how,
      kinds: both,
      temperature,
      surface: { axes: populated.map((range) => ({ populated: range })) },
      warnings: warningsOf(table) as JointAbout['comments']['potential']['warnings'],
    },
    input: meta.input,
  }
  const { smiles: repeatUnit } = frozen.polymer
  const about = { comments, repeatUnit, types: meta.types, handOver: String(frozen.number) }
  return writeJointTableInLayout(numbers, layout, about, sha256)
}

function headOf({ invented, polymer, mapping, statePoint }: FrozenHandOver) {
  const { pressure, phase, composition } = statePoint
  const parts = [pressure === null ? '' : `${formatNumber(pressure)} bar`, phase, composition]
  return {
    invented,
    polymer: `${polymer.name}, ${polymer.smiles}`,
    mapping: `${mapping.name}, revision ${mapping.revision}`,
    statePoint: parts.filter((part) => part !== '').join(', ') || null,
  }
}

/** As comment lines state them; what to do about them was settled before the release. */
function warningsOf({ meta }: HandOverTable): { code: string; message: string; action: string }[] {
  return meta.warnings.map(({ code, message }) => ({ code, message, action: '' }))
}
