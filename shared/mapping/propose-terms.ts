import type { RepeatUnit } from '../chemistry'
import { listWords } from './list-words'
import type { MappingDocument } from './mapping-document'
import { setTermUse } from './edit-decisions'
import { rankTerms, type RankedTerm, type TermEvidence } from './term-preference'
import type { TermGroup } from './term-groups'
import type { DerivedTerm } from './term'

/** Which terms of a group to use so that no motion is counted twice, and why. */
export interface TermProposal {
  readonly group: TermGroup
  readonly used: readonly DerivedTerm[]
  readonly leftOut: readonly DerivedTerm[]
  /** Whether data decided, or the rule of preference. */
  readonly basis: 'data' | 'rule'
  readonly sentence: string
}

/**
 * A set of terms without redundancy. About each central bond one dihedral kind is kept, the best by `rankTerms`; where kinds
 * are pooled over several bonds, as few as leave none of them without one. At a central bead angles are left out, worst first,
 * as long as more of them meet there than are independent, and as every neighbour keeps two: with up to three neighbours
 * every angle is needed.
 *
 * @param groups of the same unit and document
 * @param evidence from data; the rule of preference decides without
 */
export function proposeTerms(
  unit: RepeatUnit,
  document: MappingDocument,
  groups: readonly TermGroup[],
  evidence?: TermEvidence,
): TermProposal[] {
  return groups.map((group) => {
    const ranked = rankTerms(unit, document, group.terms, evidence)
    const kept = group.kind === 'dihedral' ? keptDihedrals(ranked) : keptAngles(group, ranked)
    const used = group.terms.map(({ term }) => term).filter((term) => kept.has(term))
    const leftOut = group.terms.map(({ term }) => term).filter((term) => !kept.has(term))
    const known = ranked.some(({ samples, coupling }) => samples !== null || coupling !== null)
    const basis = leftOut.length > 0 && known ? 'data' : 'rule'
    return { group, used, leftOut, basis, sentence: sentence(group, used, leftOut, ranked, basis) }
  })
}

/** The document with a proposal taken over, its sentence as the reason. */
export function acceptProposal(document: MappingDocument, proposal: TermProposal): MappingDocument {
  const use = (mapping: MappingDocument, term: DerivedTerm, word: 'used' | 'left out'): MappingDocument =>
    setTermUse(mapping, term, word, proposal.sentence.slice(0, MAX_REASON))
  const used = proposal.used.reduce((mapping, term) => use(mapping, term, 'used'), document)
  return proposal.leftOut.reduce((mapping, term) => use(mapping, term, 'left out'), used)
}

/** What the contract takes. */
const MAX_REASON = 400

/** Best first, each that reaches a bond no better one reaches; then what the others made needless goes, worst first. */
function keptDihedrals(ranked: readonly RankedTerm[]): Set<DerivedTerm> {
  const reached = (terms: readonly RankedTerm[], centre: number): boolean =>
    terms.some(({ copies }) => copies[centre] > 0)
  const kept: RankedTerm[] = []
  for (const one of ranked) {
    if (one.copies.some((copies, centre) => copies > 0 && !reached(kept, centre))) kept.push(one)
  }
  for (const one of kept.toReversed()) {
    const others = kept.filter((other) => other !== one)
    if (one.copies.every((copies, centre) => copies === 0 || reached(others, centre))) {
      kept.splice(kept.indexOf(one), 1)
    }
  }
  return new Set(kept.map(({ term }) => term))
}

function keptAngles({ centres }: TermGroup, ranked: readonly RankedTerm[]): Set<DerivedTerm> {
  let kept = ranked.map(({ term }) => term)
  const excess = centres.map(({ places, degrees }) => places - degrees)
  for (const { term, copies } of ranked.toReversed()) {
    const others = kept.filter((other) => other !== term)
    const needless = copies.every((count, centre) => count <= Math.max(0, excess[centre]))
    if (!needless || !everyArmTwice(kept, others)) continue
    kept = others
    copies.forEach((count, centre) => (excess[centre] -= count))
  }
  return new Set(kept)
}

/** Whether every bond at a centre that lies in some angle lies in at least two of those that are left. */
function everyArmTwice(before: readonly DerivedTerm[], after: readonly DerivedTerm[]): boolean {
  const [all, left] = [armCounts(before), armCounts(after)]
  return [...all.keys()].every((arm) => (left.get(arm) ?? 0) >= 2)
}

function armCounts(angles: readonly DerivedTerm[]): Map<string, number> {
  const counts = new Map<string, number>()
  for (const [first, centre, last] of angles.flatMap(({ places }) => places)) {
    for (const { bead, unit } of [first, last]) {
      const arm = `${centre.bead} ${bead} ${unit - centre.unit}`
      counts.set(arm, (counts.get(arm) ?? 0) + 1)
    }
  }
  return counts
}

function sentence(
  group: TermGroup,
  used: readonly DerivedTerm[],
  leftOut: readonly DerivedTerm[],
  ranked: readonly RankedTerm[],
  basis: TermProposal['basis'],
): string {
  const names = (terms: readonly DerivedTerm[]): string => listWords(terms.map(({ name }) => name))
  const where = group.kind === 'dihedral' ? `about ${group.centre}` : `at ${group.centre}`
  if (leftOut.length === 0) {
    return group.surplus === 0
      ? `All ${group.places} angles ${where} are independent; they are coupled through the bead they share.`
      : `${names(used)} ${used.length > 1 ? 'stand' : 'stands'} at ${group.places} places ${where}, of which ${group.degrees} ${group.degrees > 1 ? 'are' : 'is'} independent; no kind can be left out whole.`
  }
  const why = basis === 'data' ? dataWords(ranked[0]) : ruleWords(ranked[0])
  return `Use ${names(used)} ${where} and leave out ${names(leftOut)}: ${why}. Together they would count ${group.places} preferences where ${group.degrees} ${group.degrees > 1 ? 'motions are' : 'motion is'} free.`
}

function dataWords({ term, samples, coupling }: RankedTerm): string {
  const sampled = samples === null ? 'no samples are known' : `${Math.round(samples)} independent samples`
  const coupled =
    coupling === null ? 'its coupling is not known' : `${Number(coupling.toPrecision(2))} nats of coupling`
  return `${term.name} comes first by its data, ${sampled} and ${coupled}`
}

function ruleWords({ term, backbone, mostCopies }: RankedTerm): string {
  const copies = mostCopies === 1 ? 'once' : `${mostCopies} times`
  return backbone
    ? `${term.name} runs along the backbone`
    : `${term.name} stands ${copies} at each centre, the least of them`
}
