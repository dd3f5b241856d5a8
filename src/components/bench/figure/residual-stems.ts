import type { LinearScale } from '@/components/figure/linear-scale'

/** The strip reaches this many errors to either side: the same under any slider, so that nothing jumps. */
export const RESIDUAL_LIMIT = 4
/** Lines that about one residual in twenty exceeds where the curve is right. */
export const RESIDUAL_LINES = [-2, 2] as const

/** A residual as a stem from the zero line; what lies beyond the strip ends in an arrow head at its edge. */
export interface ResidualStem {
  readonly at: number
  readonly from: number
  readonly to: number
  readonly beyond: boolean
}

/** Stems of the bins within the shown range, in pixels. Bins where nothing is expected have none. */
export function residualStems(
  midpoints: ArrayLike<number>,
  residuals: ArrayLike<number>,
  x: LinearScale,
  y: LinearScale,
): ResidualStem[] {
  const stems: ResidualStem[] = []
  for (let bin = 0; bin < residuals.length; bin += 1) {
    const residual = residuals[bin]
    const outside = midpoints[bin] < x.domain[0] || midpoints[bin] > x.domain[1]
    if (outside || Number.isNaN(residual)) continue
    const drawn = Math.min(RESIDUAL_LIMIT, Math.max(-RESIDUAL_LIMIT, residual))
    stems.push({ at: x.at(midpoints[bin]), from: y.at(0), to: y.at(drawn), beyond: drawn !== residual })
  }
  return stems
}

const HEAD = 3

/** All stems as the data of one path. */
export function stemPath(stems: readonly ResidualStem[]): string {
  return stems
    .map(({ at, from, to, beyond }) => {
      const stem = `M${fixed(at)} ${fixed(from)}V${fixed(to)}`
      if (!beyond) return stem
      const back = fixed(to + (from > to ? HEAD : -HEAD))
      return `${stem}M${fixed(at - HEAD)} ${back}L${fixed(at)} ${fixed(to)}L${fixed(at + HEAD)} ${back}`
    })
    .join('')
}

const fixed = (pixel: number): number => Math.round(pixel * 100) / 100
