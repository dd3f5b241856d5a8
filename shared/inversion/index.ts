export type { AppliedInefficiency, InefficiencySource } from '../histogram'
export { buildPotential, type EndRules, type PotentialCurve } from './build-potential'
export type { Inversion, InvertedBins, SmoothingResult } from './inversion'
export {
  DEFAULT_INVERSION_SETTINGS,
  type InversionSettings,
  SETTING_LIMITS,
  type SmoothingCriterion,
  type SmoothingSettings,
  type StraightAngle,
  type TableSettings,
  type TailSettings,
} from './inversion-settings'
export { invert } from './invert'
export type { Potential, PotentialTail } from './potential'
export { potentialCurvature, potentialEnergy, potentialSlope } from './potential-energy'
export { MINIMUM_FILLED_BINS, prepareBins, type PreparedBins } from './prepared-bins'
export { regenerate } from './regenerate'
export { replacedWarnings } from './replaced-warnings'
export { straightAngleWarnings } from './straight-angles'
export { tableDomain } from './table-domain'
export type { Warning, WarningCode } from './warning'
export { placeWords } from './warning-words'
