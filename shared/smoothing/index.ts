export { type BinGeometry, logEffectiveVolumes } from './effective-volumes'
export { identityBasis } from './identity-basis'
export { type PenalisedFit, penalisedFit } from './penalised-fit'
export { penalisedSystem, type PenalisedSystem } from './penalised-system'
export { IDENTITY_BINS, type LambdaChoice, smoothCounts, type SmoothDensity } from './smooth-counts'
export {
  type JointLambdaChoice,
  smoothJointCounts,
  type SmoothJointDensity,
  type SplineAxis,
} from './smooth-joint-counts'
export { splineBasis } from './spline-basis'
export type { PerAxis } from './tensor-penalty'
