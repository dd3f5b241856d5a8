import type { CoordinateKind } from '../../shared/units'
import type { Layout } from '../../shared/layouts'
import { formatNumber } from '../../shared/tables'

/** What the name of a table file says. */
export interface NamedTable {
  readonly kind: CoordinateKind
  readonly types: readonly string[]
  /** K */
  readonly temperature: number
  /** Which term of its sequence it is, where the sequence is split by its places. */
  readonly placeNumber?: number
}

/** As in bond_B-E_400K.txt, or angle_B-B-E_place1_400K.txt where the sequence is split by its places. Bead types are letters, digits, _ and + only, so every system can write the name. */
export function tableFileName({ kind, types, temperature, placeNumber }: NamedTable): string {
  return `${kind}_${typesPart(types, placeNumber)}_${formatNumber(temperature)}K.txt`
}

function typesPart(types: readonly string[], placeNumber: number | undefined): string {
  return types.join('-') + (placeNumber === undefined ? '' : `_place${placeNumber}`)
}

/** Which term of its sequence each of two is; undefined for one whose places are pooled. */
export type PlaceNumbers = readonly [number | undefined, number | undefined]

/** What the name of a joint table file says: the bead types of both terms. */
export interface NamedJointTable {
  readonly types: readonly [readonly string[], readonly string[]]
  /** K */
  readonly temperature: number
  /** As in `NamedTable`, of both terms. */
  readonly placeNumbers?: PlaceNumbers
}

/** As in joint_B-E_B-E-H_400K.txt. */
export function jointTableFileName({ types, temperature, placeNumbers }: NamedJointTable): string {
  const parts = types.map((each, axis) => typesPart(each, placeNumbers?.[axis]))
  return `joint_${parts.join('_')}_${formatNumber(temperature)}K.txt`
}

/**
 * Names for files that lie in one folder. Names that differ by capitals only count as equal, since some systems take them so:
 * the second one gets _2.
 */
export function namesInOneFolder(names: readonly string[]): string[] {
  const taken = new Set<string>()
  return names.map((name) => {
    let free = name
    for (let copy = 2; taken.has(free.toLowerCase()); copy++) free = name.replace(/(?=\.\w+$)/, `_${copy}`)
    taken.add(free.toLowerCase())
    return free
  })
}

/** The name that a table file has in a layout: JSON ends in .json, all else in .txt. */
export function nameInLayout(name: string, { writing }: Pick<Layout, 'writing'>): string {
  return writing === 'json' ? name.replace(/\.txt$/, '.json') : name
}

/** Part of a file name made of a name people gave: letters, digits, dots and hyphens stay, the rest becomes a hyphen. */
export function fileNamePart(name: string): string {
  const plain = name.normalize('NFKD').replace(/[^A-Za-z0-9.]+/g, '-')
  return plain.replace(/^[-.]+|[-.]+$/g, '').slice(0, 60) || 'unnamed'
}
