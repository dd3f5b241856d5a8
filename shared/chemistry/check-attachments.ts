import { smilesError } from './scan-atom'
import { neighbourLists, type SmilesBond, type SmilesGraph } from './smiles-graph'

/** More heavy atoms than this are not a repeat unit one maps by hand. */
export const MAX_HEAVY_ATOMS = 200

/** The two attachment points of a checked graph. */
export interface Attachments {
  /** Atom indices in the SMILES graph of the two `*`, in the order of the text. */
  readonly points: readonly [number, number]
  /** The atoms they sit on. */
  readonly anchors: readonly [number, number]
  /** The bonds to them. */
  readonly bonds: readonly [SmilesBond, SmilesBond]
}

/**
 * Whether the graph can be one unit of a chain: exactly two `*`, each bonded to one heavy atom by a bond of the same kind, one
 * fragment, at most MAX_HEAVY_ATOMS heavy atoms.
 *
 * @throws {InvalidInputError} ATTACHMENT_COUNT, ATTACHMENT_BONDS, FRAGMENTS, TOO_MANY_ATOMS, with the position where it is known
 */
export function checkAttachments(graph: SmilesGraph): Attachments {
  const points = graph.atoms.flatMap((atom, index) => (atom.element === '*' ? [index] : []))
  checkCount(graph, points)
  const neighbours = neighbourLists(graph.atoms.length, graph.bonds)
  checkOneFragment(graph, neighbours)
  const heavy = graph.atoms.filter((atom) => atom.element !== '*' && atom.element !== 'H').length
  if (heavy > MAX_HEAVY_ATOMS) {
    throw smilesError(
      'TOO_MANY_ATOMS',
      graph.atoms[graph.atoms.length - 1].start,
      () => `The repeat unit has ${heavy} heavy atoms; at most ${MAX_HEAVY_ATOMS} can be mapped.`,
    )
  }
  const anchors = points.map((point) => checkPoint(graph, point, neighbours[point]))
  const bonds = points.map((point) => graph.bonds.find((bond) => bond.from === point || bond.to === point))
  const [first, second] = bonds as [SmilesBond, SmilesBond]
  if (bondOrder(first) !== bondOrder(second)) {
    throw smilesError(
      'ATTACHMENT_BONDS',
      graph.atoms[points[1]].start,
      (where) =>
        `The * ${where} is bonded by another kind of bond than the first one: they could not be joined.`,
    )
  }
  return { points: [points[0], points[1]], anchors: [anchors[0], anchors[1]], bonds: [first, second] }
}

/** Order of a bond as written; a bond without a sign, and one with a direction, is single. */
export function bondOrder(bond: SmilesBond): 1 | 2 | 3 {
  return bond.symbol === '=' ? 2 : bond.symbol === '#' ? 3 : 1
}

function checkCount(graph: SmilesGraph, points: readonly number[]): void {
  if (points.length === 2) return
  const ask = 'A repeat unit has exactly two, where it is joined to its neighbours.'
  if (points.length < 2) {
    const count = points.length === 0 ? 'no *' : 'only one *'
    throw smilesError('ATTACHMENT_COUNT', 0, () => `The SMILES has ${count}. ${ask}`)
  }
  throw smilesError(
    'ATTACHMENT_COUNT',
    graph.atoms[points[2]].start,
    (where) => `The SMILES has ${points.length} *, the third ${where}. ${ask}`,
  )
}

function checkOneFragment(graph: SmilesGraph, neighbours: readonly (readonly number[])[]): void {
  const reached = new Set([0])
  for (const atom of reached) for (const next of neighbours[atom]) reached.add(next)
  const apart = graph.atoms.findIndex((_, index) => !reached.has(index))
  if (apart < 0) return
  throw smilesError(
    'FRAGMENTS',
    graph.atoms[apart].start,
    (where) => `The part that begins ${where} is not bonded to the rest. A repeat unit is one piece.`,
  )
}

/** Checks one `*` and returns the atom it sits on. */
function checkPoint(graph: SmilesGraph, point: number, neighbours: readonly number[]): number {
  const atom = graph.atoms[point]
  const refuse = (what: string): Error =>
    smilesError('ATTACHMENT_BONDS', atom.start, (where) => `The * ${where} ${what}`)
  if (atom.charge !== 0 || atom.hydrogens !== 0)
    throw refuse('carries a charge or a hydrogen; it stands for a bond.')
  if (neighbours.length !== 1) {
    throw refuse(`is bonded to ${neighbours.length} atoms; it stands for the bond to one neighbouring unit.`)
  }
  const anchor = neighbours[0]
  if (graph.atoms[anchor].element === '*' || graph.atoms[anchor].element === 'H') {
    throw refuse('is not bonded to a heavy atom of the unit.')
  }
  const bond = graph.bonds.find((candidate) => candidate.from === point || candidate.to === point)
  if (bond?.symbol === ':')
    throw refuse('is bonded by an aromatic bond, which cannot be cut between two units.')
  return anchor
}
