import type { Standing, Term } from '@shared/contracts/mapping'
import type { CoordinateKind } from '@shared/units'

/** Terms of one kind under their heading. */
export interface TermGroup {
  readonly kind: CoordinateKind
  readonly title: string
  readonly terms: readonly Term[]
}

const TITLES: readonly (readonly [CoordinateKind, string])[] = [
  ['bond', 'Bonds'],
  ['angle', 'Angles'],
  ['dihedral', 'Dihedrals'],
]
const STANDINGS: readonly Standing[] = ['inverted', 'data', 'no data']

/** The terms as the rail shows them: bonds, angles, dihedrals, each group in the order given; empty groups are left out. */
export function termGroups(terms: readonly Term[]): TermGroup[] {
  return TITLES.map(([kind, title]) => ({
    kind,
    title,
    terms: terms.filter((term) => term.kind === kind),
  })).filter((group) => group.terms.length > 0)
}

/** The terms in the order of the rail. */
export function railOrder(terms: readonly Term[]): Term[] {
  return termGroups(terms).flatMap((group) => group.terms)
}

/** How many terms have which standing, furthest first; standings nobody has are left out. */
export function standingCounts(terms: readonly Term[]): { standing: Standing; count: number }[] {
  return STANDINGS.map((standing) => ({
    standing,
    count: terms.filter((term) => term.standing === standing).length,
  })).filter(({ count }) => count > 0)
}
