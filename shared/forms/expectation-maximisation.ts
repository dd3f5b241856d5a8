/** One Gaussian in units of the data's mean and deviation. */
export interface MixtureComponent {
  readonly weight: number
  readonly centre: number
  readonly width: number
}

/** p/J at the midpoints of the filled bins: places, and masses with sum 1. */
export interface PointDensity {
  readonly places: Float64Array
  readonly masses: Float64Array
}

const STEPS = 40
/** Mass below which a Gaussian is empty, and what keeps a far place from dividing by 0. */
const EMPTY = 1e-6
const TINY = 1e-300

/**
 * Improves a sum of Gaussians by forty steps of expectation and maximisation (Dempster, Laird, Rubin, J. R. Stat. Soc. B 39
 * (1977) 1), with each mass at its place. A Gaussian that loses all mass stays where it is.
 *
 * @param least smallest width a Gaussian may take
 */
export function expectationMaximisation(
  start: readonly MixtureComponent[],
  { places, masses }: PointDensity,
  least: number,
): MixtureComponent[] {
  const count = start.length
  const [weights, centres, widths] = (['weight', 'centre', 'width'] as const).map((part) =>
    Float64Array.from(start, (one) => one[part]),
  )
  const [shares, mass, first, second] = [0, 0, 0, 0].map(() => new Float64Array(count))
  for (let step = 0; step < STEPS; step++) {
    for (const sums of [mass, first, second]) sums.fill(0)
    for (let bin = 0; bin < places.length; bin++) {
      const x = places[bin]
      let total = TINY
      for (let n = 0; n < count; n++) {
        const d = (x - centres[n]) / widths[n]
        shares[n] = (weights[n] / widths[n]) * Math.exp(-0.5 * d * d)
        total += shares[n]
      }
      for (let n = 0; n < count; n++) {
        const part = (masses[bin] * shares[n]) / total
        mass[n] += part
        first[n] += part * x
        second[n] += part * x * x
      }
    }
    for (let n = 0; n < count; n++) {
      if (!(mass[n] > EMPTY)) continue
      weights[n] = mass[n]
      centres[n] = first[n] / mass[n]
      widths[n] = Math.max(least, Math.sqrt(Math.max(0, second[n] / mass[n] - centres[n] ** 2)))
    }
  }
  return Array.from(weights, (weight, n) => ({ weight, centre: centres[n], width: widths[n] }))
}
