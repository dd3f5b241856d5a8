import { correlate, type Correlation } from '@shared/correlation'
import { createJointHistogram, type BinContent, type JointHistogram } from '@shared/histogram'

/** Counts of a bond and an angle with a coupling that grows with `strength`; 30 by 30 cells, 12 000 samples. */
export function jointHistogram(
  strength: number,
  independentSamples: number | null = 6000,
  content: BinContent = 'count',
): JointHistogram {
  const xEdges = Float64Array.from({ length: 31 }, (_, i) => 0.3 + i * 0.004)
  const yEdges = Float64Array.from({ length: 31 }, (_, i) => ((90 + i * 2) * Math.PI) / 180)
  const weights = Float64Array.from({ length: 900 }, (_, index) => {
    const u = (Math.floor(index / 30) - 14.5) / 5
    const v = ((index % 30) - 14.5) / 5
    return Math.round(
      76 * Math.exp(-(u * u - 2 * strength * u * v + v * v) / (2 * (1 - strength * strength))),
    )
  })
  return createJointHistogram({
    kinds: ['bond', 'angle'],
    xEdges,
    yEdges,
    weights,
    content,
    independentSamples,
  })
}

export const correlationOf = (strength: number, independentSamples?: number | null): Correlation =>
  correlate(jointHistogram(strength, independentSamples))

/** The same as a probability of which nobody said how many samples it stands for. */
export const correlationWithoutSampleSize = (strength: number): Correlation =>
  correlate(jointHistogram(strength, null, 'probability'))

/** Two basins on a diagonal, of which the product of the two distributions makes four; 30 by 30 cells. */
export function twoBasins(): Correlation {
  const { kinds, xEdges, yEdges, content } = jointHistogram(0)
  const bell = (ix: number, iy: number, at: number) =>
    Math.exp(-((ix - at) ** 2 + (iy - at) ** 2) / 2 / 2.2 ** 2)
  const weights = Float64Array.from({ length: 900 }, (_, index) => {
    const [ix, iy] = [Math.floor(index / 30), index % 30]
    return Math.round(300 * bell(ix, iy, 8) + 200 * bell(ix, iy, 21))
  })
  return correlate(
    createJointHistogram({ kinds, xEdges, yEdges, weights, content, independentSamples: null }),
  )
}
