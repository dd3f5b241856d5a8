import type { RepeatUnit } from '../chemistry'
import { cutRings, looseAtoms, unknownAtoms, wrongShares } from './check-atoms'
import { beadInPieces, emptyBead, mixedTypes, sameNames, siteOutside } from './check-beads'
import type { MappingDocument } from './mapping-document'
import type { MappingProblem } from './mapping-problem'
import { tooManyPlaces } from './term-limit'

/**
 * Everything about a mapping that a person should see, in the order in which it is best mended: unknown atoms (then nothing else
 * is said), atoms in no bead, shares that do not sum to 1, empty beads, beads in several pieces, sites outside their bead, names
 * given twice, one type for different compositions, more places than terms are derived for, rings cut through
 * (a note).
 *
 * @returns empty when the mapping is sound
 */
export function checkMapping(unit: RepeatUnit, document: MappingDocument): MappingProblem[] {
  const unknown = document.beads.flatMap((bead) => unknownAtoms(unit, bead))
  if (unknown.length > 0) return unknown
  return [
    ...looseAtoms(unit, document),
    ...wrongShares(unit, document),
    ...document.beads.flatMap((bead) => [
      ...emptyBead(bead),
      ...beadInPieces(unit, bead),
      ...siteOutside(unit, bead),
    ]),
    ...sameNames(document),
    ...mixedTypes(unit, document),
    ...tooManyPlaces(unit, document),
    ...cutRings(unit, document),
  ]
}
