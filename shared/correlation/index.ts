export {
  type ConditionalMean,
  type Correlation,
  type CorrelationVerdict,
  type CorrelationWarning,
  type CorrelationWarningCode,
  type CouplingMap,
  DEFAULT_THRESHOLDS,
  JOINT_ABOVE,
  type LargestCoupling,
  SEPARABLE_BELOW,
  SIGNIFICANCE,
  type VerdictGrid,
  type VerdictThresholds,
} from './correlation'
export { type BasinsOfMap, type CorrelationBasins, type MatchedBasin } from './correlation-basins'
export { correlate, type CorrelateOptions, DEFAULT_SEED } from './correlate'
export { informationDeviation } from './information-deviation'
export { NULL_TABLES } from './null-tables'
export { verdictOf } from './verdict'
