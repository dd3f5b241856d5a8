import type { RepeatUnit } from '../chemistry'
import type { CutBond } from './rotatable-bonds'

/** An atom of an unrolled unit: `unit` is 1 for atoms that are taken from the next one. */
export interface UnrolledAtom {
  readonly atom: number
  readonly unit: 0 | 1
}

/** Atoms that no bead may part. */
export interface Block {
  readonly atoms: readonly UnrolledAtom[]
  /** g/mol */
  readonly mass: number
}

/** The blocks of one unit of the chain, opened at one bond; cuttable bonds make a tree of them. */
export interface BlockTree {
  /** The bond at which the endless chain was opened: one bead ends there and the next begins. */
  readonly opened: CutBond
  readonly blocks: readonly Block[]
  /** Bonds between blocks, each with the bond of the unit that it is. */
  readonly edges: readonly { readonly from: number; readonly to: number; readonly bond: CutBond }[]
}

/**
 * The ways to open the endless chain where the backbone may be cut: at the bond between units if that one may be cut, since no
 * bead then reaches across the border; else at the cuttable bonds of the backbone that are nearest to the border on either
 * side, so that the group across the border ends its bead.
 *
 * @param cuttable as `rotatableBonds`
 * @returns none when the backbone has no cuttable bond
 */
export function blockTrees(unit: RepeatUnit, cuttable: readonly CutBond[]): BlockTree[] {
  if (cuttable.includes('link')) return [blockTree(unit, cuttable, 'link')]
  const [head, tail] = unit.attachments
  const along = cuttable
    .map((bond) => ({ bond, side: headSide(unit, bond) }))
    .filter(({ side }) => side.has(head) && !side.has(tail))
    .sort((a, b) => a.side.size - b.side.size)
    .map(({ bond }) => bond)
  return [...new Set([along.at(0), along.at(-1)])].flatMap((bond) =>
    bond === undefined ? [] : [blockTree(unit, cuttable, bond)],
  )
}

/** Atoms that hang together with the head when a bond of the unit is cut. */
function headSide(unit: RepeatUnit, cut: CutBond): Set<number> {
  const reached = new Set([unit.attachments[0]])
  for (const atom of reached) {
    unit.bonds.forEach(({ from, to }, index) => {
      if (index === cut) return
      if (from === atom) reached.add(to)
      if (to === atom) reached.add(from)
    })
  }
  return reached
}

function blockTree(unit: RepeatUnit, cuttable: readonly CutBond[], opened: CutBond): BlockTree {
  const [head, tail] = unit.attachments
  // Opened inside the unit, the tail goes on into the head side of the next unit.
  const next = opened === 'link' ? new Set<number>() : headSide(unit, opened)
  const bonds: { from: number; to: number; bond: CutBond }[] = unit.bonds.map(({ from, to }, bond) => ({
    from,
    to,
    bond,
  }))
  bonds.push({ from: tail, to: head, bond: 'link' })
  const whole = bonds.filter(({ bond }) => bond !== opened && !cuttable.includes(bond))
  const blockOf = components(unit.atoms.length, whole)
  const count = Math.max(...blockOf) + 1
  const blocks = Array.from({ length: count }, (_, block): Block => {
    const atoms = unit.atoms.filter(({ index }) => blockOf[index] === block)
    return {
      atoms: atoms.map(({ index }) => ({ atom: index, unit: next.has(index) ? 1 : 0 })),
      mass: atoms.reduce((sum, { mass }) => sum + mass, 0),
    }
  })
  const edges = bonds
    .filter(({ bond }) => bond !== opened && cuttable.includes(bond))
    .map(({ from, to, bond }) => ({ from: blockOf[from], to: blockOf[to], bond }))
  return { opened, blocks, edges }
}

/** The component of each vertex, numbered in the order of their first vertices. */
function components(
  size: number,
  edges: readonly { readonly from: number; readonly to: number }[],
): number[] {
  const found = new Array<number>(size).fill(-1)
  let count = 0
  for (let start = 0; start < size; start++) {
    if (found[start] >= 0) continue
    const members = [start]
    found[start] = count
    for (const member of members) {
      for (const { from, to } of edges) {
        const other = from === member ? to : to === member ? from : -1
        if (other < 0 || found[other] >= 0) continue
        found[other] = count
        members.push(other)
      }
    }
    count++
  }
  return found
}
