import type { RepeatUnit } from '../chemistry'
import { backboneBeads } from './backbone-beads'
import type { MappingDocument } from './mapping-document'
import type { GroupedTerm } from './term-groups'

/** What is known of terms from data; terms by name. */
export interface TermEvidence {
  /** Independent samples of a term; terms without data are absent. */
  readonly samples: ReadonlyMap<string, number>
  /** Mutual information of pairs of terms in nats; pairs without data are absent. */
  readonly couplings: readonly { readonly first: string; readonly second: string; readonly nats: number }[]
}

/** Terms with at least this share of the samples of the best one count as sampled equally well: our default. */
export const WELL_SAMPLED_SHARE = 0.5

/** Terms of a group with the best one first, and what each was judged by. */
export interface RankedTerm extends GroupedTerm {
  /** Every bead of every place lies along the backbone. */
  readonly backbone: boolean
  readonly mostCopies: number
  /** null without data. */
  readonly samples: number | null
  /** Sum over the pairs with terms outside the group, nats; null without such a pair. */
  readonly coupling: number | null
}

/**
 * The terms of a group, best first. With data: sampled well before sampled badly before not sampled, then coupled least to
 * what is outside the group, unknown last. Without, or where data do not tell: along the backbone first, then fewest copies at
 * one centre, then the order of the terms.
 *
 * @param terms of one group
 * @param evidence left out where there are no data
 */
export function rankTerms(
  unit: RepeatUnit,
  document: MappingDocument,
  terms: readonly GroupedTerm[],
  evidence?: TermEvidence,
): RankedTerm[] {
  const along = backboneBeads(unit, document)
  const names = new Set(terms.map(({ term }) => term.name))
  const judged = terms.map((grouped): RankedTerm => {
    const { name, places } = grouped.term
    return {
      ...grouped,
      backbone: places.every((place) => place.every(({ bead }) => along.has(bead))),
      mostCopies: Math.max(...grouped.copies),
      samples: evidence?.samples.get(name) ?? null,
      coupling: couplingOutside(name, names, evidence),
    }
  })
  const best = Math.max(...judged.map(({ samples }) => samples ?? 0))
  const sampling = ({ samples }: RankedTerm): number =>
    samples === null || samples === 0 ? 2 : samples >= WELL_SAMPLED_SHARE * best ? 0 : 1
  return judged.sort(
    (a, b) =>
      sampling(a) - sampling(b) ||
      compareCouplings(a.coupling, b.coupling) ||
      Number(b.backbone) - Number(a.backbone) ||
      a.mostCopies - b.mostCopies,
  )
}

function couplingOutside(
  name: string,
  group: ReadonlySet<string>,
  evidence: TermEvidence | undefined,
): number | null {
  const pairs = (evidence?.couplings ?? []).filter(
    ({ first, second }) => (first === name && !group.has(second)) || (second === name && !group.has(first)),
  )
  return pairs.length === 0 ? null : pairs.reduce((sum, { nats }) => sum + nats, 0)
}

function compareCouplings(a: number | null, b: number | null): number {
  return a === b ? 0 : a === null ? 1 : b === null ? -1 : a - b
}
