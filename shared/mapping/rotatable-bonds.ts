import { neighbourLists, type RepeatUnit, type RepeatUnitAtom } from '../chemistry'

/** A bond where a bead may end: index in `RepeatUnit.bonds`, or 'link' for the bond to the next unit. */
export type CutBond = number | 'link'

/**
 * The bonds where one bead may end and the next begin: single, in no ring, with more of the chain on either side, and outside
 * functional groups, which stay whole: the bond between a carbon with a double-bonded O, S or N and its O, N or S neighbours
 * (esters, amides, carbonates, carboxyls, urethanes, ureas, anhydrides), and bonds between two atoms other than carbon, those
 * between Si and O apart, since a siloxane has no others.
 *
 * @returns bonds of the unit by index, and the bond between units last when it is one of them
 */
export function rotatableBonds(unit: RepeatUnit): CutBond[] {
  const neighbours = neighbourLists(unit.atoms.length, unit.bonds)
  const ends = (atom: number): number => unit.attachments.filter((end) => end === atom).length
  const degree = (atom: number): number => neighbours[atom].length + ends(atom)
  const acyl = acylCarbons(unit)
  const whole = (a: number, b: number): boolean => {
    const [one, other] = [unit.atoms[a], unit.atoms[b]]
    if ((acyl.has(a) && isHetero(other)) || (acyl.has(b) && isHetero(one))) return true
    return isHetero(one) && isHetero(other) && !isSiloxane(one, other)
  }
  const inRing = ringBonds(unit)
  const inside = unit.bonds.flatMap(({ from, to, order, aromatic }, index): CutBond[] => {
    const turns = order === 1 && !aromatic && !inRing.has(index) && degree(from) > 1 && degree(to) > 1
    return turns && !whole(from, to) ? [index] : []
  })
  const [head, tail] = unit.attachments
  return unit.linkOrder === 1 && !whole(head, tail) ? [...inside, 'link'] : inside
}

/** Carbons that carry a double-bonded hetero atom. */
export function acylCarbons(unit: RepeatUnit): Set<number> {
  const found = unit.bonds.flatMap(({ from, to, order, aromatic }) => {
    if (order !== 2 || aromatic) return []
    const [one, other] = [unit.atoms[from], unit.atoms[to]]
    if (one.element === 'C' && isHetero(other)) return [from]
    return other.element === 'C' && isHetero(one) ? [to] : []
  })
  return new Set(found)
}

/** Neither carbon nor hydrogen. */
function isHetero({ element }: RepeatUnitAtom): boolean {
  return element !== 'C'
}

/** The bond of a siloxane. */
function isSiloxane(one: RepeatUnitAtom, other: RepeatUnitAtom): boolean {
  return [one.element, other.element].sort().join(' ') === 'O Si'
}

function ringBonds(unit: RepeatUnit): Set<number> {
  const pairs = new Set(
    unit.rings.flatMap((ring) =>
      ring.map((atom, index) => [atom, ring[(index + 1) % ring.length]].sort((a, b) => a - b).join(' ')),
    ),
  )
  return new Set(
    unit.bonds.flatMap(({ from, to }, index) =>
      pairs.has([from, to].sort((a, b) => a - b).join(' ')) ? [index] : [],
    ),
  )
}
