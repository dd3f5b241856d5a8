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
  if (coarser.basinsCounted === 0 && finer.basinsCounted === 0) {
    return `No basins were counted in ${coarser.name} or ${finer.name}, so nothing says whether ${finer.name} gets rid of many-peaked terms.`
  }
  const bonds = (terms: readonly ComparedTerm[]): readonly ComparedTerm[] =>
    terms.filter(({ kind }) => kind !== 'dihedral')
  // A dihedral has several basins by its nature; bonds and angles with several are what a finer mapping may mend.
  const [before, after] = [bonds(coarser.manyPeaked), bonds(finer.manyPeaked)]
  if (before.length === 0 && after.length === 0) {
    return `Every bond and angle counted so far has a single peak in both ${coarser.name} and ${finer.name}.`
  }
  const first =
    before.length === 0
      ? `${coarser.name} has no many-peaked bond or angle among those counted`
      : `${coarser.name} has ${named(before)}`
  const second =
    finer.basinsCounted === 0
      ? `in ${finer.name} nobody counted`
      : after.length === 0
        ? `${finer.name} has none among the ${finer.basinsCounted} terms counted`
        : `${finer.name} has ${named(after)}`
  return `${first}; ${second}.`
}

function named(terms: readonly ComparedTerm[]): string {
  const words = terms
    .slice(0, MOST_NAMED)
    .map(
      ({ kind, name, basins }) =>
        `the ${kind} ${name} (${basins?.count} basins deeper than ${basins?.depth} kT)`,
    )
  const rest = terms.length - words.length
  return `many-peaked ${listWords(rest > 0 ? [...words, `${rest} more`] : words)}`
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
