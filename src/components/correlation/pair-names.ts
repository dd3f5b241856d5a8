import type { Pair } from '@shared/contracts/distribution'
import type { Term } from '@shared/contracts/mapping'
import type { PairNames } from './verdict-words'

const KINDS = ['bond', 'angle', 'dihedral', '']

/** What kinds of terms a pair joins, as a heading: "Bond with angle". */
export function pairKinds(pair: Pair, terms: readonly Term[]): string {
  const kindOf = (id: string) => terms.find((term) => term.id === id)?.kind ?? ''
  // Which term a file names first does not matter for where its pair is listed.
  const kinds = [kindOf(pair.firstTermId), kindOf(pair.secondTermId)].sort(
    (one, other) => KINDS.indexOf(one) - KINDS.indexOf(other),
  )
  const text = kinds.join(' with ')
  return text.charAt(0).toUpperCase() + text.slice(1)
}

/** The names of the two terms of a pair, first one first. */
export function pairNames(pair: Pair, terms: readonly Term[]): PairNames {
  const nameOf = (id: string) => terms.find((term) => term.id === id)?.name ?? ''
  return [nameOf(pair.firstTermId), nameOf(pair.secondTermId)]
}
