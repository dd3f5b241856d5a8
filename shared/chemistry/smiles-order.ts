import type { RepeatUnit } from './repeat-unit'
import { scanSmiles } from './scan-smiles'

/**
 * The heavy atoms and attachment points of a unit in the order in which its SMILES names them: an atom of the unit by its
 * index, null for a `*`. Explicit hydrogens are passed over.
 *
 * @example smilesOrder(await parseRepeatUnit('*CC(*)C')) // [null, 0, 1, null, 2]
 */
export function smilesOrder(unit: RepeatUnit): (number | null)[] {
  let index = 0
  return scanSmiles(unit.smiles)
    .atoms.filter(({ element }) => element !== 'H')
    .map(({ element }) => (element === '*' ? null : index++))
}
