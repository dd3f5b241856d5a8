/** Normal valences of atoms written without brackets (OpenSMILES). */
const NORMAL_VALENCES: Readonly<Record<string, readonly number[]>> = {
  B: [3],
  C: [4],
  N: [3, 5],
  O: [2],
  P: [3, 5],
  S: [2, 4, 6],
  F: [1],
  Cl: [1],
  Br: [1],
  I: [1],
}

/** Elements by the number of electrons in their outer shell, for the second row and below. */
const GROUPS: readonly (readonly [group: number, elements: string])[] = [
  [13, 'B Al Ga In'],
  [14, 'C Si Ge Sn Pb'],
  [15, 'N P As Sb Bi'],
  [16, 'O S Se Te'],
  [17, 'F Cl Br I'],
]
const GROUP_OF = new Map(
  GROUPS.flatMap(([group, names]) => names.split(' ').map((name) => [name, group] as const)),
)

/** Largest valences by group: of the second row, which keeps to the octet, and of the rows below. */
const OCTET: Readonly<Record<number, number>> = { 12: 2, 13: 3, 14: 4, 15: 3, 16: 2, 17: 1, 18: 0 }
const EXPANDED: Readonly<Record<number, number>> = { 12: 2, 13: 6, 14: 6, 15: 5, 16: 6, 17: 7, 18: 0 }
const SECOND_ROW = new Set(['B', 'C', 'N', 'O', 'F'])

/**
 * The most bonds, double ones counted twice and hydrogens included, that an atom can have. A charge moves the atom along
 * its row: N⁺ bonds as carbon does. Neutral nitrogen may be written with five (nitro as N(=O)=O). Rule of the octet for the
 * second row, of expanded octets below: common practice.
 *
 * @returns null for elements without a rule (metals, noble gases)
 * @example largestValence('N', 1) // 4
 */
export function largestValence(element: string, charge: number): number | null {
  if (element === 'H') return charge === 0 ? 1 : 0
  const group = GROUP_OF.get(element)
  if (group === undefined) return null
  if (element === 'N' && charge === 0) return 5
  return (SECOND_ROW.has(element) ? OCTET : EXPANDED)[group - charge] ?? 0
}

/**
 * Whether an atom written without brackets has one of its normal valences.
 *
 * @param valence sum of bond orders in a localised structure, hydrogens included
 */
export function isNormalValence(element: string, valence: number): boolean {
  return NORMAL_VALENCES[element]?.includes(valence) ?? false
}

/**
 * The largest normal valence of an atom written without brackets.
 *
 * @returns null for elements that cannot be written without brackets
 */
export function largestNormalValence(element: string): number | null {
  return NORMAL_VALENCES[element]?.at(-1) ?? null
}
