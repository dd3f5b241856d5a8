export { accumulate } from './accumulate'
export { binCentroids, binMidpoints } from './bin-centroids'
export { binVolumes } from './bin-volumes'
export {
  blockInefficiency,
  type BlockCounts,
  type BlockInefficiency,
  type BlockKind,
  LEAST_BLOCKS,
  rulingInefficiency,
} from './block-inefficiency'
export { checkEdges } from './check-edges'
export { coordinateDomain, foldDihedral } from './coordinate-domain'
export { checkIndependentSamples, createHistogram, type HistogramInput } from './create-histogram'
export { type AppliedInefficiency, effectiveSamples, type InefficiencySource } from './effective-samples'
export type { BinContent, CoordinateKind, Histogram } from './histogram'
export { histogramDeviation } from './histogram-deviation'
export { jacobian } from './jacobian'
export {
  accumulateJoint,
  createJointHistogram,
  type JointHistogram,
  type JointHistogramInput,
} from './joint-histogram'
export { rebin } from './rebin'
export { sampleInefficiency } from './sample-inefficiency'
export { MAXIMUM_BINS, sampleEdges } from './sample-edges'
