import { atomicWeight } from './atomic-weights'
import type { Composition, RepeatUnitAtom } from './repeat-unit'

/** One element of a formula: the symbol and its count as it is printed, empty for one. */
export interface FormulaPart {
  readonly element: string
  readonly count: string
}

/**
 * The composition of some atoms with the hydrogens on them, each atom counted with its weight.
 *
 * @param atoms heavy atoms
 * @param weights share of each atom, same length; all 1 when left out
 * @example composition(unit.atoms) // { C: 9, H: 16, O: 2 }
 */
export function composition(
  atoms: readonly Pick<RepeatUnitAtom, 'element' | 'hydrogens'>[],
  weights?: readonly number[],
): Composition {
  const counts: Record<string, number> = {}
  const add = (element: string, count: number): void => {
    if (count > 0) counts[element] = (counts[element] ?? 0) + count
  }
  atoms.forEach((atom, index) => {
    const weight = weights?.[index] ?? 1
    add(atom.element, weight)
    add('H', weight * atom.hydrogens)
  })
  return counts
}

/**
 * Mass of a composition from the standard atomic weights, free of binary residue: rounded to 1e-9 g/mol, where the weights
 * themselves end at 1e-4.
 *
 * @returns g/mol; 0 for an empty composition
 * @throws {InvalidInputError} ELEMENT_UNKNOWN
 */
export function compositionMass(counts: Composition): number {
  let mass = 0
  for (const [element, count] of Object.entries(counts)) mass += count * atomicWeight(element)
  return Math.round(mass * 1e9) / 1e9
}

/**
 * Elements in Hill order (carbon, hydrogen, then by symbol; without carbon all by symbol) with their printed counts:
 * whole numbers as they are, shares of atoms with up to three decimals.
 *
 * @example formulaParts({ O: 2, C: 1 }) // [{ element: 'C', count: '' }, { element: 'O', count: '2' }]
 */
export function formulaParts(counts: Composition): FormulaPart[] {
  const hasCarbon = (counts['C'] ?? 0) > 0
  const rank = (element: string): string =>
    hasCarbon && element === 'C' ? '0' : hasCarbon && element === 'H' ? '1' : `2${element}`
  return Object.keys(counts)
    .filter((element) => counts[element] > 0)
    .sort((a, b) => (rank(a) < rank(b) ? -1 : 1))
    .map((element) => {
      const count = String(Number(counts[element].toFixed(3)))
      return { element, count: count === '1' ? '' : count }
    })
}

/**
 * A formula in Hill order on one line.
 *
 * @example formulaText({ O: 2, C: 9, H: 16 }) // 'C9H16O2'
 */
export function formulaText(counts: Composition): string {
  return formulaParts(counts)
    .map((part) => part.element + part.count)
    .join('')
}
