import type { ComparedMapping, ComparedTerm } from './comparison'
import { listWords } from './list-words'

/** Terms named in a sentence; more are counted. */
const MOST_NAMED = 3

/**
 * What the finer of two mappings buys, from its numbers: what stays many-peaked in each, the correlation left behind, and
 * what it costs. Nothing is claimed that was not counted.
 */
export function comparisonSentence(coarser: ComparedMapping, finer: ComparedMapping): string {
  const parts = [peaks(coarser, finer), coupling(coarser, finer), cost(coarser, finer)]
  return parts.filter((part) => part !== '').join(' ')
}

function peaks(coarser: ComparedMapping, finer: ComparedMapping): string {
  const counts = [coarser, finer].map(({ terms }) => mendable(terms).length)
  if (counts.every((count) => count === 0)) {
    return `No basins of bonds or angles were counted in ${coarser.name} or ${finer.name}, so nothing says whether ${finer.name} gets rid of many-peaked terms.`
  }
  return `In ${coarser.name} ${peaksOf(coarser)}; in ${finer.name} ${peaksOf(finer)}.`
}

/** Counted bonds and angles: a dihedral has several basins by its nature, and no finer mapping mends that. */
function mendable(terms: readonly ComparedTerm[]): ComparedTerm[] {
  return terms.filter(({ kind, basins }) => kind !== 'dihedral' && basins !== null)
}

function peaksOf({ terms }: ComparedMapping): string {
  const counted = mendable(terms)
  const many = counted.filter(({ singlePeaked }) => singlePeaked === false)
  if (counted.length === 0) return 'no basins were counted'
  if (many.length === 0) {
    return counted.length === 1
      ? 'the one bond or angle counted has a single basin'
      : `each of the ${counted.length} bonds and angles counted has a single basin`
  }
  const words = many
    .slice(0, MOST_NAMED)
    .map(
      ({ kind, name, basins }) =>
        `the ${kind} ${name} has ${basins?.count} basins deeper than ${basins?.depth} kT`,
    )
  const rest = many.length - words.length
  return listWords(rest > 0 ? [...words, `${rest} more have several`] : words)
}

function coupling(coarser: ComparedMapping, finer: ComparedMapping): string {
  if (coarser.coupling === null || finer.coupling === null) return ''
  const text = ({ coupling: sum, pairs }: ComparedMapping): string =>
    `${Number((sum as number).toPrecision(2))} nats over ${pairs.length} ${pairs.length === 1 ? 'pair' : 'pairs'}`
  return `Correlation left behind: ${text(coarser)} in ${coarser.name}, ${text(finer)} in ${finer.name}.`
}

function cost(coarser: ComparedMapping, finer: ComparedMapping): string {
  const beads = (finer.numbers?.beads ?? 0) - (coarser.numbers?.beads ?? 0)
  const terms = finer.terms.length - coarser.terms.length
  const many = (count: number, word: string): string =>
    `${Math.abs(count)} ${word}${Math.abs(count) === 1 ? '' : 's'} ${count < 0 ? 'fewer' : 'more'}`
  const ratio = (finer.cost as number) / (coarser.cost as number)
  const missing = finer.terms.length - finer.termsWithData
  const data = missing > 0 ? ` ${missing} of its ${finer.terms.length} terms have no data yet.` : ''
  if (beads === 0)
    return `${finer.name} has as many beads and ${many(terms, 'term')}, at the same cost.${data}`
  return `${finer.name} costs ${many(beads, 'bead')} per unit, ${many(terms, 'term')} and about ${Number(ratio.toPrecision(2))} times the pairs per step.${data}`
}
