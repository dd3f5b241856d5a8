import type { CoordinateKind } from '../../shared/units'
import { formatNumber } from '../../shared/tables'

/** What the name of a table file says. */
export interface NamedTable {
  readonly kind: CoordinateKind
  readonly types: readonly string[]
  /** K */
  readonly temperature: number
}

/** As in bond_B-E_400K.txt. Bead types are letters, digits, _ and + only, so every system can write the name. */
export function tableFileName({ kind, types, temperature }: NamedTable): string {
  return `${kind}_${types.join('-')}_${formatNumber(temperature)}K.txt`
}

/** What the name of a joint table file says: the bead types of both terms. */
export interface NamedJointTable {
  readonly types: readonly [readonly string[], readonly string[]]
  /** K */
  readonly temperature: number
}

/** As in joint_B-E_B-E-H_400K.txt. */
export function jointTableFileName({ types, temperature }: NamedJointTable): string {
  return `joint_${types.map((each) => each.join('-')).join('_')}_${formatNumber(temperature)}K.txt`
}

/**
 * Names for files that lie in one folder. Names that differ by capitals only count as equal, since some systems take them so:
 * the second one gets _2.
 */
export function namesInOneFolder(names: readonly string[]): string[] {
  const taken = new Set<string>()
  return names.map((name) => {
    let free = name
    for (let copy = 2; taken.has(free.toLowerCase()); copy++) free = name.replace(/\.txt$/, `_${copy}.txt`)
    taken.add(free.toLowerCase())
    return free
  })
}

/** Part of a file name made of a name people gave: letters, digits, dots and hyphens stay, the rest becomes a hyphen. */
export function fileNamePart(name: string): string {
  const plain = name.normalize('NFKD').replace(/[^A-Za-z0-9.]+/g, '-')
  return plain.replace(/^[-.]+|[-.]+$/g, '').slice(0, 60) || 'unnamed'
}
