import type { FlatnessVerdict } from '../flatness'
import type { CoordinateKind } from '../histogram/histogram'
import type { MappingDocument } from './mapping-document'
import type { MappingNumbers } from './mapping-numbers'
import type { DerivedTerm } from './term'

/** What is known of a term's distribution. */
export interface TermFinding {
  /** Number of basins, and the depth in kT it was asked at; null where nobody counted. */
  readonly basins: { readonly count: number; readonly depth: number } | null
  /** Standard deviation in nm or rad; circular for a dihedral. */
  readonly deviation: number | null
  /** Whether a dihedral may be dropped, as `dihedralFlatness` judges it; null for others and where nobody judged. */
  readonly flatness: FlatnessVerdict | null
}

/** What is known of a pair of terms. */
export interface PairFinding {
  readonly first: string
  readonly second: string
  /** Mutual information left when the two are treated one by one, nats; not below 0. */
  readonly nats: number
}

/** A mapping to compare, with what its data say at one state point; terms by name. */
export interface MappingEvidence {
  readonly name: string
  readonly document: MappingDocument
  readonly terms: readonly Omit<DerivedTerm, 'placeClasses'>[]
  /** Terms with data only. */
  readonly findings: ReadonlyMap<string, TermFinding>
  readonly pairs: readonly PairFinding[]
}

/** A term in the comparison. */
export interface ComparedTerm {
  readonly kind: CoordinateKind
  readonly name: string
  readonly multiplicity: number
  readonly hasData: boolean
  readonly basins: TermFinding['basins']
  readonly singlePeaked: boolean | null
  readonly deviation: number | null
  /** A dihedral that is flat enough to be dropped; null where that is not known. */
  readonly droppable: boolean | null
}

/** One column of the comparison. */
export interface ComparedMapping {
  readonly name: string
  /** null for a mapping without beads. */
  readonly numbers: MappingNumbers | null
  /** The terms in use. */
  readonly terms: readonly ComparedTerm[]
  readonly leftOut: number
  readonly termsWithData: number
  /** Terms with more than one basin, and those whose basins were counted. */
  readonly manyPeaked: readonly ComparedTerm[]
  readonly basinsCounted: number
  readonly pairs: readonly PairFinding[]
  /** Sum over the pairs, nats; null without pairs. */
  readonly coupling: number | null
  readonly droppable: readonly ComparedTerm[]
  /** Pairs within the cutoff per step, relative to the coarsest mapping. */
  readonly cost: number | null
}

/** Two or more mappings of one unit side by side. */
export interface MappingComparison {
  /** In the order given. */
  readonly mappings: readonly ComparedMapping[]
  /** What each finer mapping buys over the next coarser one, a sentence or two each. */
  readonly summary: readonly string[]
}
