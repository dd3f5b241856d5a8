import type { RepeatUnit } from '../chemistry'
import { comparisonSentence } from './comparison-sentence'
import type { ComparedMapping, ComparedTerm, MappingComparison, MappingEvidence } from './comparison'
import { mappingNumbers, type MappingNumbers } from './mapping-numbers'
import { multiplicity } from './term'
import { usedTerms } from './used-terms'

/**
 * Compares mappings of one repeat unit by their own terms in use and by what their data say. The cost is that of pairs that are
 * not bonded, at one density, cutoff and time step: it goes as the square of the number of beads.
 *
 * @param evidence one entry per mapping
 * @throws {InvalidInputError} MAPPING_INVALID for an atom the unit does not have
 */
export function compareMappings(unit: RepeatUnit, evidence: readonly MappingEvidence[]): MappingComparison {
  const numbers = evidence.map(({ document }) => mappingNumbers(unit, document))
  const fewest = Math.min(...numbers.map((each) => each?.beads ?? Infinity))
  const mappings = evidence.map((each, index): ComparedMapping => {
    const own = numbers[index]
    return compared(each, own, own && (own.beads / fewest) ** 2)
  })
  return { mappings, summary: summaryOf(mappings) }
}

function compared(
  { name, document, terms, findings, pairs }: MappingEvidence,
  numbers: MappingNumbers | null,
  cost: number | null,
): ComparedMapping {
  const used = usedTerms(document, terms)
  const rows = used.map((term): ComparedTerm => {
    const { basins = null, deviation = null, flatness = null } = findings.get(term.name) ?? {}
    return {
      kind: term.kind,
      name: term.name,
      multiplicity: multiplicity(term),
      hasData: findings.has(term.name),
      basins,
      singlePeaked: basins && basins.count <= 1,
      deviation,
      droppable: flatness === 'flat' ? true : flatness === 'keep' ? false : null,
    }
  })
  const names = new Set(used.map((term) => term.name))
  const left = pairs.filter(({ first, second }) => names.has(first) && names.has(second))
  return {
    name,
    numbers,
    terms: rows,
    leftOut: terms.length - used.length,
    termsWithData: rows.filter(({ hasData }) => hasData).length,
    manyPeaked: rows.filter(({ singlePeaked }) => singlePeaked === false),
    basinsCounted: rows.filter(({ basins }) => basins !== null).length,
    pairs: left.toSorted((a, b) => b.nats - a.nats),
    coupling: left.length === 0 ? null : left.reduce((sum, { nats }) => sum + nats, 0),
    droppable: rows.filter(({ droppable }) => droppable === true),
    cost,
  }
}

/** Each mapping against the next coarser one; those without beads have nothing to say. */
function summaryOf(mappings: readonly ComparedMapping[]): string[] {
  const ordered = mappings
    .filter(({ numbers }) => numbers !== null)
    .toSorted((a, b) => (a.numbers?.beads ?? 0) - (b.numbers?.beads ?? 0))
  return ordered.slice(1).map((finer, index) => comparisonSentence(ordered[index], finer))
}
