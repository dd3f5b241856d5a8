/** Curves that the key can switch off, in drawing order. */
export const CURVES = [
  'measured',
  'regenerated',
  'residual',
  'potential',
  'smooth',
  'rings',
  'comparison',
] as const
export type CurveName = (typeof CURVES)[number]
export type VisibleCurves = Readonly<Record<CurveName, boolean>>
