import type { SmoothingSettings } from '@shared/inversion'

/** What the slider spans in log10 λ: from curves that follow every bin to the stiff limit. */
export const SMOOTHING_RANGE = { low: -2, high: 12 } as const

/** One press of [ or ] in log10 λ. */
export const SMOOTHING_STEP = 0.1

/** Into the slider's range, rounded to the 0.01 that λ is fitted with. */
export function withinRange(log10Lambda: number): number {
  const { low, high } = SMOOTHING_RANGE
  return Math.round(Math.min(high, Math.max(low, log10Lambda)) * 100) / 100
}

/** Smoothing by hand, one step stiffer or softer than what is in force. */
export function nudgedSmoothing(
  smoothing: SmoothingSettings,
  inForce: number,
  direction: number,
): SmoothingSettings {
  const from = smoothing.mode === 'manual' ? smoothing.log10Lambda : inForce
  return { mode: 'manual', log10Lambda: withinRange(from + direction * SMOOTHING_STEP) }
}
