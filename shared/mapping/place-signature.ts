import { atomLinks, rankClasses, type RepeatUnit } from '../chemistry'
import type { BeadLink } from './bead-links'
import type { MappingDocument } from './mapping-document'

/**
 * Classes of the beads and atoms of the endless chain that their surroundings cannot tell apart: colour refinement on the
 * repeat unit closed upon itself, with each bead tied to its atoms. On a graph that repeats, refinement of one closed period
 * gives the classes of the endless graph. Chirality is not looked at. The numbers do not depend on how atoms or beads are
 * numbered, nor on the direction of the chain.
 */
export interface ChainClasses {
  readonly atoms: readonly number[]
  readonly beads: readonly number[]
}

/**
 * The classes of a mapped unit.
 *
 * @param unit the repeat unit
 * @param document a mapping whose atoms all exist
 */
export function chainClasses(unit: RepeatUnit, document: MappingDocument): ChainClasses {
  const size = unit.atoms.length
  const labels = [
    ...unit.atoms.map(({ element, hydrogens, charge }) => `atom ${element} ${hydrogens} ${charge}`),
    ...document.beads.map(({ type, site }) => `bead ${type} ${site.rule}`),
  ]
  const edges = [
    ...atomLinks(unit),
    ...document.beads.flatMap((bead, index) =>
      bead.atoms.map(({ atom, weight }) => ({
        from: size + index,
        to: atom,
        label: `in ${weight}${bead.site.rule === 'atom' && bead.site.atom === atom ? ' site' : ''}`,
      })),
    ),
  ]
  const classes = rankClasses(labels, edges)
  return { atoms: classes.slice(0, size), beads: classes.slice(size) }
}

/**
 * What surrounds a row of bonded beads, read in one direction: the class of each bead, and between two of them the classes of
 * the atoms that are bonded. Rows that a symmetry of the chain exchanges have the same text.
 *
 * @param classes of the same unit and document
 * @param links the bonds of the row, one fewer than beads
 */
export function placeSignature(classes: ChainClasses, links: readonly BeadLink[]): string {
  const parts = [String(classes.beads[links[0].from])]
  for (const { to, atomBonds } of links) {
    const bonds = atomBonds.map((bond) => `${classes.atoms[bond.from]}${bond.label}${classes.atoms[bond.to]}`)
    parts.push(bonds.sort().join('+'), String(classes.beads[to]))
  }
  return parts.join(' ')
}
