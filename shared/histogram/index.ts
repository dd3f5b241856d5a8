export { accumulate } from './accumulate'
export { binCentroids, binMidpoints } from './bin-centroids'
export { binVolumes } from './bin-volumes'
export { checkEdges } from './check-edges'
export { coordinateDomain, foldDihedral } from './coordinate-domain'
export { createHistogram, type HistogramInput } from './create-histogram'
export type { BinContent, CoordinateKind, Histogram } from './histogram'
export { jacobian } from './jacobian'
export {
  accumulateJoint,
  createJointHistogram,
  type JointHistogram,
  type JointHistogramInput,
} from './joint-histogram'
export { rebin } from './rebin'
export { MAXIMUM_BINS, sampleEdges } from './sample-edges'
