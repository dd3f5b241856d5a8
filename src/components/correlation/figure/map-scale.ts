import type { Correlation } from '@shared/correlation'
import { fixedText, significantText } from '@/components/figure/number-text'
import { couplingLimit, DENSITY_EXPONENT, exceedsLimit } from '@/components/figure/ramp-steps'
import type { MapModel } from './map-model'
import type { MapView } from './map-view'

/** A label of the colour scale, at a part of its length. */
export interface ScaleTick {
  readonly at: number
  readonly label: string
}

/** Labels of the colour scale: true shares of the highest density, or the coupling in kT. */
export function scaleTicks({ coupling }: Correlation, view: MapView): ScaleTick[] {
  if (view === 'density') {
    return [0, 0.1, 0.25, 0.5, 1].map((share) => ({ at: share ** DENSITY_EXPONENT, label: String(share) }))
  }
  const limit = couplingLimit(coupling.values)
  return [-1, -0.5, 0, 0.5, 1].map((part) => {
    const value = part * limit
    const text = (value > 0 ? '+' : '') + fixedText(value, Number.isInteger(value) ? 0 : 1)
    const beyond = Math.abs(part) === 1 && exceedsLimit(coupling.values, value)
    const sign = value < 0 ? '≤ ' : '≥ '
    return { at: (part + 1) / 2, label: beyond ? sign + text : text }
  })
}

/** How much of the data lies outside the frame, in words; null where all is inside. */
export function outsideText({ samples }: Correlation, { outside }: MapModel): string | null {
  if (outside === 0) return null
  return samples === null
    ? `${significantText(100 * outside, 1)} % outside the frame`
    : `${fixedText(outside * samples)} of ${fixedText(samples)} samples outside the frame`
}
