export { dihedralFlatness } from './dihedral-flatness'
export { binnedFlatDivergence, curveFlatDivergence, flatDivergenceByChance } from './flat-divergence'
export { flatLikelihoodRatio } from './flat-likelihood-ratio'
export {
  type DihedralFlatness,
  FLAT_BELOW,
  FLAT_DEVIATIONS,
  type FlatLikelihoodRatio,
  type FlatnessDoubt,
  type FlatnessVerdict,
} from './flatness'
