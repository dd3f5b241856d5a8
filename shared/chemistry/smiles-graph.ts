/** An atom as written in a SMILES; attachment points and explicit hydrogens are atoms here. */
export interface SmilesAtom {
  /** Element symbol with a capital, `*` for an attachment point. */
  readonly element: string
  readonly aromatic: boolean
  /** Written in square brackets: hydrogens and charge are then exactly what is written. */
  readonly bracket: boolean
  readonly isotope: number | null
  readonly hydrogens: number
  readonly charge: number
  /** Where it begins and ends in the text, from 0, end excluded. */
  readonly start: number
  readonly end: number
}

/** `symbol` is what is written; '' means single, or aromatic between two aromatic atoms. */
export interface SmilesBond {
  readonly from: number
  readonly to: number
  readonly symbol: string
  readonly position: number
}

export interface SmilesGraph {
  readonly atoms: readonly SmilesAtom[]
  readonly bonds: readonly SmilesBond[]
}

/**
 * Bonds of each atom of a graph, by their other end.
 *
 * @param size number of atoms
 * @param bonds pairs of indices below `size`
 */
export function neighbourLists(
  size: number,
  bonds: readonly { readonly from: number; readonly to: number }[],
): number[][] {
  const neighbours: number[][] = Array.from({ length: size }, () => [])
  for (const { from, to } of bonds) {
    neighbours[from].push(to)
    neighbours[to].push(from)
  }
  return neighbours
}
