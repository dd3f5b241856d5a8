import { backboneAtoms, type RepeatUnit } from '../chemistry'
import { balanceCuts, COST_TIE, type CutCosts, type Cuts } from './balance-cuts'
import { beadMass } from './bead-composition'
import { blockTrees, type BlockTree } from './block-tree'
import { groupWords } from './group-words'
import type { BeadAtom, MappingDocument } from './mapping-document'
import { nameBeads } from './name-beads'
import { acylCarbons, rotatableBonds, type CutBond } from './rotatable-bonds'
import { suggestionReason } from './suggestion-reason'

/** Beads per unit that suggestions go up to. */
export const MOST_SUGGESTED_BEADS = 6

/** Cost of ending a bead inside a run of plain carbon, where nothing but mass says where: our default. */
export const PLAIN_CUT_COST = 0.5
/** Cost of a bead of one heavy atom: our default. */
export const LONE_ATOM_COST = 0.5

/** A mapping computed from the graph of the unit. */
export interface MappingSuggestion {
  readonly beads: number
  readonly document: MappingDocument
  /** Bonds where beads end, as atoms: indices in the unit, the second in the next unit where `border` is set. */
  readonly cuts: readonly { readonly from: number; readonly to: number; readonly border: boolean }[]
  /** Of each bead, in g/mol. */
  readonly masses: readonly number[]
  /** What was made as small as possible, without unit: see `suggestMappings`. */
  readonly objective: number
  readonly reason: string
}

/**
 * Mappings to start from, for 1 to `MOST_SUGGESTED_BEADS` beads per unit. Beads end at rotatable bonds only (see
 * `rotatableBonds`), so rings and functional groups stay whole; an oxygen or another atom than carbon is never a bead alone.
 * Where the border between units runs through a group that stays whole, a bead reaches across it and ends beside that group.
 * Among all such cuts the one with the least Σ ((mᵢ − m̄)/m̄)² + 0.5 for each cut inside a run of plain carbon + 0.5 for each
 * bead of one heavy atom is taken, exactly; equal ones by the fewest atoms across the border, then by the order of the bonds.
 *
 * @returns one for each number of beads that the unit can be cut into, ascending; none when its backbone cannot be cut
 */
export function suggestMappings(unit: RepeatUnit): MappingSuggestion[] {
  const trees = blockTrees(unit, rotatableBonds(unit))
  const plain = plainBonds(unit)
  return Array.from({ length: MOST_SUGGESTED_BEADS }, (_, index) => index + 1).flatMap((beads) => {
    let best: { tree: BlockTree; cuts: Cuts; across: number } | null = null
    for (const tree of trees) {
      const cuts = balanceCuts(tree, beads, costsOf(unit, tree, plain))
      if (cuts === null) continue
      const cost = cuts.cost + (beads > 1 && plain.has(tree.opened) ? PLAIN_CUT_COST : 0)
      const across = atomSets(tree, cuts)
        .filter(spans)
        .flat()
        .filter((atom) => atom.unit === 1).length
      const found = { tree, cuts: { ...cuts, cost }, across }
      if (best === null || isBetter(found, best)) best = found
    }
    return best === null ? [] : [suggestion(unit, best.tree, best.cuts)]
  })
}

function isBetter(one: { cuts: Cuts; across: number }, other: { cuts: Cuts; across: number }): boolean {
  const difference = one.cuts.cost - other.cuts.cost
  return Math.abs(difference) > COST_TIE ? difference < 0 : one.across < other.across
}

function costsOf(unit: RepeatUnit, tree: BlockTree, plain: ReadonlySet<CutBond>): CutCosts {
  return {
    ofEdge: (edge) => (plain.has(tree.edges[edge].bond) ? PLAIN_CUT_COST : 0),
    ofLoneAtom: (block) =>
      unit.atoms[tree.blocks[block].atoms[0].atom].element === 'C' ? LONE_ATOM_COST : Infinity,
  }
}

/** Bonds inside a run of plain carbon: of two carbons outside rings and acyl groups, both on the backbone or both off it. */
function plainBonds(unit: RepeatUnit): Set<CutBond> {
  const backbone = new Set(backboneAtoms(unit))
  const acyl = acylCarbons(unit)
  const isPlain = (atom: number): boolean => {
    const { element, ring } = unit.atoms[atom]
    return element === 'C' && !ring && !acyl.has(atom)
  }
  const found = unit.bonds.flatMap(({ from, to }, index): CutBond[] =>
    isPlain(from) && isPlain(to) && backbone.has(from) === backbone.has(to) ? [index] : [],
  )
  return new Set(found)
}

function suggestion(unit: RepeatUnit, tree: BlockTree, cuts: Cuts): MappingSuggestion {
  const beads = nameBeads(unit, atomSets(tree, cuts))
  const document: MappingDocument = { version: 1, beads }
  const masses = beads.map((bead) => beadMass(unit, bead))
  const [head, tail] = unit.attachments
  const ends = [tree.opened, ...cuts.edges.map((edge) => tree.edges[edge].bond)].map((bond) =>
    bond === 'link'
      ? { from: tail, to: head, border: true }
      : { from: unit.bonds[bond].from, to: unit.bonds[bond].to, border: false },
  )
  const words = beads.map((bead) =>
    groupWords(
      unit,
      bead.atoms.map(({ atom }) => atom),
    ),
  )
  const reason = suggestionReason(unit, { beads, masses, cuts: ends, words })
  return { beads: beads.length, document, cuts: ends, masses, objective: cuts.cost, reason }
}

/** The atoms of each bead, those of a bead wholly in the next unit counted to this one; by their first atoms. */
function atomSets(tree: BlockTree, cuts: Cuts): BeadAtom[][] {
  const sets = tree.blocks.map(({ atoms }) => [...atoms])
  tree.edges.forEach(({ from, to }, edge) => {
    if (cuts.edges.includes(edge)) return
    const [one, other] = [sets[from], sets[to]]
    one.push(...other)
    sets.forEach((set, block) => {
      if (set === other) sets[block] = one
    })
  })
  return [...new Set(sets)]
    .map((set) => {
      const least = Math.min(...set.map(({ unit }) => unit))
      const atoms = set.map(({ atom, unit }) => ({ atom, weight: 1, unit: unit - least }))
      return atoms.sort((a, b) => a.unit - b.unit || a.atom - b.atom)
    })
    .sort((a, b) => a[0].atom - b[0].atom)
}

function spans(atoms: readonly BeadAtom[]): boolean {
  return atoms.some(({ unit }) => unit === 0) && atoms.some(({ unit }) => unit === 1)
}
