import type { Pair } from '@shared/contracts/distribution'
import type { Term } from '@shared/contracts/mapping'
import type { PairNames } from './verdict-words'

/** The names of the two terms of a pair, first one first. */
export function pairNames(pair: Pair, terms: readonly Term[]): PairNames {
  const nameOf = (id: string) => terms.find((term) => term.id === id)?.name ?? ''
  return [nameOf(pair.firstTermId), nameOf(pair.secondTermId)]
}
