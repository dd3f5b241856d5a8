export { atomLetters, type AtomLetter, isLettered } from './atom-letters'
export { BEAD_INKS } from './bead-inks'
export { beadShapes, type BeadShape } from './bead-shapes'
export {
  atomPoint,
  backboneAtoms,
  boardLayout,
  type BoardLayout,
  BOND_LENGTH,
  type Box,
  HALO_RADIUS,
  positionsIn,
} from './board-layout'
export { bondLines, type BondLine } from './bond-lines'
export { beadDisc, drawingLayers } from './drawing-layers'
export { letterPlace, notePlace } from './free-places'
export { beadPath, haloPath, sitePoint } from './halo-path'
export { type MappingCaption, mappingPicture } from './mapping-picture'
export { neighbourShapes, type NeighbourShape } from './neighbour-shapes'
export { type AtomSector, type SharedAtom, sharedAtoms } from './shared-atoms'
export { type UnitMarks, unitMarks } from './unit-marks'
