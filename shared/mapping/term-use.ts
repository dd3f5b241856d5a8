import type { RepeatUnit } from '../chemistry'
import { listWords } from './list-words'
import type { MappingDocument } from './mapping-document'
import { multiplicity, type DerivedTerm } from './term'
import { termGroups, type TermGroup } from './term-groups'
import { choiceOf, usedTerms } from './used-terms'

/** What the user's choice of terms comes to. Degrees of freedom are per repeat unit. */
export interface TermUse {
  readonly used: readonly DerivedTerm[]
  readonly leftOut: readonly { readonly term: DerivedTerm; readonly reason: string }[]
  /** Three for each bead that holds atoms. */
  readonly degrees: number
  /** Places of the used terms, by kind. */
  readonly counted: { readonly bond: number; readonly angle: number; readonly dihedral: number }
  /** Places beyond the degrees of freedom; negative where some motion is left free. */
  readonly surplus: number
  /** Groups none of whose terms is used: what they describe is left free. */
  readonly unheld: readonly TermGroup[]
  readonly sentence: string
}

/**
 * What follows from the choice of terms: degrees of freedom counted against those there are, and what is left free.
 *
 * A chain without rings of beads has as many independent bonds, angles and dihedrals as degrees of freedom (analytic; see
 * `termGroups`); rings of beads close on themselves and always count more.
 *
 * @param terms all terms of the unit and document
 */
export function termUse(unit: RepeatUnit, document: MappingDocument, terms: readonly DerivedTerm[]): TermUse {
  const used = usedTerms(document, terms)
  const leftOut = terms
    .filter((term) => !used.includes(term))
    .map((term) => ({ term, reason: choiceOf(document, term)?.reason ?? '' }))
  const placesOf = (kind: DerivedTerm['kind']): number =>
    used.filter((term) => term.kind === kind).reduce((sum, term) => sum + multiplicity(term), 0)
  const counted = { bond: placesOf('bond'), angle: placesOf('angle'), dihedral: placesOf('dihedral') }
  const degrees = 3 * document.beads.filter(({ atoms }) => atoms.length > 0).length
  const surplus = counted.bond + counted.angle + counted.dihedral - degrees
  const unheld = termGroups(unit, document, terms).filter((group) =>
    group.terms.every(({ term }) => !used.includes(term)),
  )
  const use = { used, leftOut, degrees, counted, surplus, unheld }
  return { ...use, sentence: sentence(use) }
}

function sentence({ leftOut, degrees, counted, surplus, unheld }: Omit<TermUse, 'sentence'>): string {
  const kinds = Object.entries(counted).map(([kind, count]) => `${count} ${kind}${count === 1 ? '' : 's'}`)
  const count = `Each unit has ${degrees} degrees of freedom; the terms in use count ${listWords(kinds)}`
  const balance =
    surplus > 0
      ? `, ${surplus} more: some preferences are counted more than once.`
      : surplus < 0
        ? `, ${-surplus} fewer: some motions have no potential of their own.`
        : ': each motion once.'
  const gone = leftOut.length > 0 ? ` Left out: ${listWords(leftOut.map(({ term }) => term.name))}.` : ''
  const free = unheld.map(({ kind, centre }) => (kind === 'dihedral' ? `about ${centre}` : `at ${centre}`))
  return `${count}${balance}${gone}${free.length > 0 ? ` Nothing is used ${listWords(free)}.` : ''}`
}
