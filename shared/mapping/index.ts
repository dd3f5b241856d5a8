export { anglesOf } from './angles-of'
export { backboneBeads } from './backbone-beads'
export { beadComposition, beadMass } from './bead-composition'
export { beadGraph, type BeadGraph } from './bead-graph'
export { beadLinks, type BeadLink } from './bead-links'
export { beadPieces } from './bead-pieces'
export { checkMapping } from './check-mapping'
export { compareMappings } from './compare-mappings'
export type {
  ComparedMapping,
  ComparedTerm,
  MappingComparison,
  MappingEvidence,
  PairFinding,
  TermFinding,
} from './comparison'
export { compareTypes, compareTypeSequences } from './compare-types'
export { derivePooledTerms, deriveTerms } from './derive-terms'
export { setPooling, setTermUse, type TermReference } from './edit-decisions'
export { addBead, type BeadChange, changeBead, freeAtoms, giveAtoms, removeBead } from './edit-mapping'
export { type AtomPlace, giveAtomAcross, setShare, shareAtom } from './edit-shares'
export { endBeads, type EndBead } from './end-beads'
export { DEFAULT_GAIN_ASSUMPTIONS, estimateGain, type Gain, type GainAssumptions } from './estimate-gain'
export {
  BEAD_COLOURS,
  type Bead,
  type BeadAtom,
  type BeadColour,
  type MappingDocument,
  type Site,
  type TermChoice,
  type TermPooling,
} from './mapping-document'
export { sameMakeUp, termMakeUp, type PlacedTerm } from './make-up'
export { makeUpChange } from './make-up-change'
export { mappingNumbers, type MappingNumbers } from './mapping-numbers'
export type { MappingProblem, MappingProblemCode } from './mapping-problem'
export { placeFlags, type PlaceFlag } from './place-flags'
export { acceptProposal, proposeTerms, type TermProposal } from './propose-terms'
export { poolingOf } from './split-terms'
export { renewBeadIds } from './renew-bead-ids'
export { termGroups, type GroupedTerm, type TermCentre, type TermGroup } from './term-groups'
export { rotatableBonds, type CutBond } from './rotatable-bonds'
export {
  LONE_ATOM_COST,
  type MappingSuggestion,
  MOST_SUGGESTED_BEADS,
  PLAIN_CUT_COST,
  suggestMappings,
} from './suggest-mappings'
export { multiplicity, placeKey, termName, type BeadPlace, type DerivedTerm, type Place } from './term'
export { hasTooManyPlaces, MAX_TERM_PLACES } from './term-limit'
export { rankTerms, type RankedTerm, type TermEvidence, WELL_SAMPLED_SHARE } from './term-preference'
export { termUse, type TermUse } from './term-use'
export { choiceOf, usedTerms } from './used-terms'
