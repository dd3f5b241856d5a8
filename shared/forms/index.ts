export { type ChosenForm, fitChosenForm } from './chosen-form'
export { cosinePowersFromSeries, cosineSeriesFromPowers } from './cosine-conversion'
export { type DerivedPotential, derivePotential, withForm } from './derive-potential'
export type {
  FormFit,
  FormGoodness,
  FormName,
  FormParameter,
  FormRefusal,
  FormRefusalCode,
  LargestDeviation,
  ParameterDimension,
  TriedTerms,
} from './form'
export type { TermLimits } from './form-definition'
export { FORM_NAMES, formsOfKind, termLimits } from './form-definitions'
export { comparedRanking, curveAic, formDeviation } from './form-deviation'
export { formDeviations, formEnergy } from './form-energy'
export { formCurve, type FormCurve, formPotential } from './form-potential'
export { parametersInUnits, type ShownParameter } from './form-units'
export {
  fitForm,
  type FitOptions,
  type FormRanking,
  type RankedFit,
  rankForms,
  type RankOptions,
} from './rank-forms'
export type { FormWarning, FormWarningCode } from './ranking-warnings'
