export { beadComposition, beadMass } from './bead-composition'
export { beadGraph, type BeadGraph } from './bead-graph'
export { atomLinks, beadLinks, type AtomLink, type BeadLink } from './bead-links'
export { beadPieces } from './bead-pieces'
export { checkMapping } from './check-mapping'
export { compareTypes, compareTypeSequences } from './compare-types'
export { deriveTerms } from './derive-terms'
export { addBead, type BeadChange, changeBead, freeAtoms, giveAtoms, removeBead } from './edit-mapping'
export {
  BEAD_COLOURS,
  type Bead,
  type BeadAtom,
  type BeadColour,
  type MappingDocument,
  type Site,
} from './mapping-document'
export type { MappingProblem, MappingProblemCode } from './mapping-problem'
export { MAX_TERM_PLACES } from './term-limit'
export { termName, type BeadPlace, type DerivedTerm, type Place } from './term'
