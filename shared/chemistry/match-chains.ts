import { atomLinks } from './atom-links'
import { rankClasses } from './refine-classes'
import type { RepeatUnit } from './repeat-unit'

/** Which atom of the other unit an atom is, and how many units further along it lies. */
export interface AtomMatch {
  readonly atom: number
  readonly shift: number
}

/**
 * How one endless chain lies on another: atom a in unit u is atom `atoms[a].atom` in unit direction · u + `atoms[a].shift`.
 */
export interface ChainMatch {
  readonly atoms: readonly AtomMatch[]
  /** −1 where the two units are written from opposite ends. */
  readonly direction: 1 | -1
}

interface Neighbour {
  readonly to: number
  readonly shift: number
  readonly label: string
}

/** A repeat unit as seen from the endless chain. */
interface Chain {
  readonly classes: readonly number[]
  readonly around: readonly (readonly Neighbour[])[]
}

/**
 * Whether two repeat units stand for the same chain, whatever the order of their atoms, the end they are written from, or the
 * bond the chain was parted at. Both have to be one period of the same length. Chirality is not looked at.
 *
 * Atoms are matched one after the other along the bonds of the chain, among those of the same class of colour refinement, with
 * backtracking.
 *
 * @returns a match that keeps indices where it can; null when they are different chains
 */
export function matchChains(from: RepeatUnit, to: RepeatUnit): ChainMatch | null {
  const [own, other] = [chainOf(from), chainOf(to)]
  if (own.classes.toSorted().join() !== other.classes.toSorted().join()) return null
  const steps = walkOrder(own)
  const roots = to.atoms.map(({ index }) => index)
  for (const direction of [1, -1] as const) {
    for (const root of roots) {
      if (own.classes[0] !== other.classes[root]) continue
      const images = new Map<number, AtomMatch>([[0, { atom: root, shift: 0 }]])
      if (!fits(own, other, direction, images, 0)) continue
      if (extend(own, other, direction, steps, 0, images)) {
        return { atoms: from.atoms.map(({ index }) => images.get(index) as AtomMatch), direction }
      }
    }
  }
  return null
}

function chainOf(unit: RepeatUnit): Chain {
  const links = atomLinks(unit)
  const labels = unit.atoms.map(({ element, hydrogens, charge }) => `${element} ${hydrogens} ${charge}`)
  const around: Neighbour[][] = unit.atoms.map(() => [])
  for (const { from, to, shift, label } of links) {
    around[from].push({ to, shift, label })
    around[to].push({ to: from, shift: -shift, label })
  }
  return { classes: rankClasses(labels, links), around }
}

/** Each atom but the first with one that comes before it. */
function walkOrder(chain: Chain): { parent: number; link: Neighbour }[] {
  const steps: { parent: number; link: Neighbour }[] = []
  const seen = new Set([0])
  for (const parent of seen) {
    for (const link of chain.around[parent]) {
      if (seen.has(link.to)) continue
      seen.add(link.to)
      steps.push({ parent, link })
    }
  }
  return steps
}

function extend(
  own: Chain,
  other: Chain,
  direction: 1 | -1,
  steps: readonly { parent: number; link: Neighbour }[],
  step: number,
  images: Map<number, AtomMatch>,
): boolean {
  if (step === steps.length) return true
  const { parent, link } = steps[step]
  const base = images.get(parent) as AtomMatch
  const taken = new Set([...images.values()].map(({ atom }) => atom))
  const candidates = other.around[base.atom]
    .filter(
      ({ to, label }) => label === link.label && !taken.has(to) && own.classes[link.to] === other.classes[to],
    )
    // The atom of the same index first, so that a unit matched with itself stays as it is.
    .toSorted((a, b) => Number(b.to === link.to) - Number(a.to === link.to))
  for (const { to, shift } of candidates) {
    images.set(link.to, { atom: to, shift: base.shift + shift - direction * link.shift })
    if (
      fits(own, other, direction, images, link.to) &&
      extend(own, other, direction, steps, step + 1, images)
    ) {
      return true
    }
    images.delete(link.to)
  }
  return false
}

/** Whether every bond from an atom to those matched so far is there between their images. */
function fits(
  own: Chain,
  other: Chain,
  direction: 1 | -1,
  images: ReadonlyMap<number, AtomMatch>,
  atom: number,
): boolean {
  const image = images.get(atom) as AtomMatch
  return own.around[atom].every(({ to, shift, label }) => {
    const end = images.get(to)
    if (!end) return true
    const apart = direction * shift + end.shift - image.shift
    return other.around[image.atom].some(
      (bond) => bond.to === end.atom && bond.shift === apart && bond.label === label,
    )
  })
}
