export {
  type ChecklistCode,
  type ChecklistFacts,
  type ChecklistItem,
  type ChecklistLine,
  type ChecklistPair,
  type ChecklistPlace,
  type ChecklistTerm,
  type ChecklistWarning,
  handOverChecklist,
  MAPPING_CHANGED,
} from './checklist'
export { changedSettings } from './changed-settings'
export { type ComparedHandOver, type ComparedTable, compareHandOvers } from './compare-hand-overs'
export { placesWords } from './coordinate-words'
export { type EnergyGrid, largestEnergyChange, type LargestChange, REACHED } from './largest-energy-change'
export { type PointsInput, pointsBeforeRunning } from './points-before-running'
