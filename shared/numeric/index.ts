export { bandedSolve, type BandedFactor, factorBanded, selectedInverse } from './banded-cholesky'
export { type BandedRows, factorRows } from './banded-rows'
export { cubicBSplines, cubicBSplineSlopes, type FourSplines } from './cubic-b-splines'
export { mirroredCurvatures, notAKnotCurvatures, periodicCurvatures } from './cubic-spline'
export { GAUSS_LEGENDRE } from './gauss-legendre'
export { quantileSorted } from './quantile'
export { pieceCurvature, pieceSlope, pieceValue, type SplinePiece } from './spline-piece'
export { createRandom, type Random } from './random'
export { symmetricEigenvalues } from './symmetric-eigenvalues'
export {
  autocorrelations,
  type BlockingLevel,
  type SeriesInefficiency,
  seriesInefficiency,
} from './series-inefficiency'
export { dot, largestMagnitude } from './vectors'
