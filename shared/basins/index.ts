export {
  BASIN_DEVIATIONS,
  type BasinCurve,
  basinsAtDepth,
  type BasinStep,
  type BasinThreshold,
  DEFAULT_BASIN_THRESHOLD,
  LEAST_BASIN_DEPTH,
} from './basin'
export { type CurveBasin, curveBasins, type CurveBasins } from './curve-basins'
export { type EnergyGrid, type GridBarrier, type GridBasin, gridBasins, type GridBasins } from './grid-basins'
export { mergeTree, type MergeTree, type NeighbourList } from './merge-tree'
