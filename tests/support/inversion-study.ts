import { createHistogram, type Histogram } from '@shared/histogram'
import {
  DEFAULT_INVERSION_SETTINGS,
  type Inversion,
  invert,
  potentialEnergy,
  type SmoothingSettings,
} from '@shared/inversion'
import { createRandom, type Random } from '@shared/numeric'
import { thermalEnergy } from '@shared/units'
import type { StudyDensity } from './study-densities'

const TEMPERATURE = 400
const KT = thermalEnergy(TEMPERATURE)
/** Points count where the density of the bin is above this share of its peak. */
const LEAST_SHARE = 0.01
/** Half width of a 95 % band in standard deviations. */
const BAND = 1.96
/** Points with fewer counts do not count for the band. */
const LEAST_COUNTS = 20

export const CRITERIA = ['likelihood', 'aic'] as const
export type Criterion = (typeof CRITERIA)[number]

/** Root mean squares in kT, pooled over points and repeats. */
export interface StudyErrors {
  /** −kT ln(n/V) at the bins that hold counts. */
  readonly raw: number
  /** Automatic inversion at the same bins. */
  readonly smooth: Readonly<Record<Criterion, number>>
  /** Automatic inversion at all bins of the judged range, empty ones too. */
  readonly smoothAll: Readonly<Record<Criterion, number>>
  /** Share of points of the judged range that held no count. */
  readonly empty: number
}

/**
 * Errors of inversion against the true potential over `repeats` seeded histograms of about `samples` samples: at the
 * centroids of all bins whose density exceeds 1 % of its peak. Unsmoothed energies exist in filled bins only, so both are
 * judged there. A constant is taken off each curve first: the mean difference, weighted by the true probability.
 */
export function inversionErrors(
  density: StudyDensity,
  samples: number,
  repeats: number,
  seed: number,
): StudyErrors {
  const random = createRandom(seed)
  const judged = judgedBins(density)
  const sums = { raw: sum(), likelihood: sum(), aic: sum(), likelihoodAll: sum(), aicAll: sum() }
  for (let repeat = 0; repeat < repeats; repeat++) {
    const histogram = drawn(density, samples, random)
    const filled = judged.filter((bin) => histogram.weights[bin] > 0)
    CRITERIA.forEach((criterion, place) => {
      const inversion = inverted(histogram, { mode: 'auto', criterion })
      const curve = (bin: number) => potentialEnergy(inversion.potential, inversion.bins.centroids[bin])
      sums[criterion].add(squares(density, inversion, filled, curve))
      sums[`${criterion}All`].add(squares(density, inversion, judged, curve))
      const raw = (bin: number) => inversion.bins.rawEnergies[bin]
      if (place === 0) sums.raw.add(squares(density, inversion, filled, raw))
    })
  }
  return {
    raw: sums.raw.root(),
    smooth: { likelihood: sums.likelihood.root(), aic: sums.aic.root() },
    smoothAll: { likelihood: sums.likelihoodAll.root(), aic: sums.aicAll.root() },
    empty: 1 - sums.raw.count() / (repeats * judged.length),
  }
}

/** At how many points the truth lay within the band. */
export interface Coverage {
  readonly held: number
  readonly points: number
}

/** The share of points held, pooled over all that are given. */
export function pooledCoverage(all: readonly Coverage[]): number {
  const total = (count: (each: Coverage) => number): number => all.reduce((sum, each) => sum + count(each), 0)
  return total(({ held }) => held) / total(({ points }) => points)
}

/**
 * Share of points at which the 95 % band of the automatic inversion holds the truth, pooled over bins with at least 20
 * counts and over `repeats` histograms: of U(q) − U(q_min) at bin midpoints, with q_min the bin of least fitted energy.
 */
export function bandCoverage(
  density: StudyDensity,
  samples: number,
  repeats: number,
  seed: number,
  criterion: Criterion = 'likelihood',
): Coverage {
  const random = createRandom(seed)
  let [held, points] = [0, 0]
  for (let repeat = 0; repeat < repeats; repeat++) {
    const { bins, potential } = inverted(drawn(density, samples, random), { mode: 'auto', criterion })
    const deviations = bins.deviations ?? bins.weights.map(() => NaN)
    const fitted = bins.midpoints.map((midpoint) => potentialEnergy(potential, midpoint) / KT)
    const mode = deviations.indexOf(0)
    for (let bin = 0; bin < deviations.length; bin++) {
      if (bin === mode || bins.weights[bin] < LEAST_COUNTS) continue
      const truth = density.energy(bins.midpoints[bin]) - density.energy(bins.midpoints[mode])
      const miss = Math.abs(fitted[bin] - fitted[mode] - truth)
      held += miss <= (BAND * deviations[bin]) / KT ? 1 : 0
      points += 1
    }
  }
  return { held, points }
}

/** Poisson counts about the exact bin probabilities. */
function drawn({ kind, edges, probabilities }: StudyDensity, samples: number, random: Random): Histogram {
  const weights = probabilities.map((probability) => random.poisson(samples * probability))
  return createHistogram({ kind, edges, weights, content: 'count' })
}

function inverted(histogram: Histogram, smoothing: SmoothingSettings): Inversion {
  return invert(histogram, TEMPERATURE, { ...DEFAULT_INVERSION_SETTINGS, smoothing })
}

function judgedBins({ probabilities }: StudyDensity): number[] {
  const peak = Math.max(...probabilities)
  return [...probabilities.keys()].filter((bin) => probabilities[bin] > LEAST_SHARE * peak)
}

/** Squared errors in kT after the constant is taken off. */
function squares(
  { energy, probabilities }: StudyDensity,
  { bins }: Inversion,
  judged: readonly number[],
  curve: (bin: number) => number,
): number[] {
  const errors = judged.map((bin) => curve(bin) / KT - energy(bins.centroids[bin]))
  const weight = judged.reduce((all, bin) => all + probabilities[bin], 0)
  const constant = judged.reduce((all, bin, place) => all + probabilities[bin] * errors[place], 0) / weight
  return errors.map((error) => (error - constant) ** 2)
}

function sum() {
  let [total, count] = [0, 0]
  return {
    add: (values: readonly number[]) => {
      for (const value of values) total += value
      count += values.length
    },
    root: () => Math.sqrt(total / count),
    count: () => count,
  }
}
