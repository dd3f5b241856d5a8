import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { createHistogram, type Histogram } from '@shared/histogram'
import {
  DEFAULT_INVERSION_SETTINGS,
  type Inversion,
  invert,
  type InversionSettings,
  potentialEnergy,
  type SmoothingSettings,
} from '@shared/inversion'
import { createRandom } from '@shared/numeric'
import { makeTable, tableRows } from '@shared/tables'
import {
  coordinateFromInternal,
  coordinateToInternal,
  type CoordinateUnit,
  energyScale,
  thermalEnergy,
  unitsOfKind,
} from '@shared/units'
import { STUDY_DENSITIES, type StudyDensity } from '../../../support/study-densities'

const TEMPERATURE = 400
const KT = thermalEnergy(TEMPERATURE)

function drawn({ kind, edges, probabilities }: StudyDensity, samples: number, seed: number): Histogram {
  const random = createRandom(seed)
  const weights = probabilities.map((probability) => random.poisson(samples * probability))
  return createHistogram({ kind, edges, weights, content: 'count' })
}

const smoothed = (smoothing: SmoothingSettings): InversionSettings => ({
  ...DEFAULT_INVERSION_SETTINGS,
  smoothing,
})

/** Largest difference of two inversions in kT over the bins that hold counts, their means aligned. */
function difference(one: Inversion, other: Inversion): number {
  const places = one.bins.centroids.filter((_, bin) => one.bins.weights[bin] >= 5)
  const changes = places.map(
    (q) => (potentialEnergy(one.potential, q) - potentialEnergy(other.potential, q)) / KT,
  )
  const mean = changes.reduce((sum, change) => sum + change, 0) / changes.length
  return Math.max(...changes.map((change) => Math.abs(change - mean)))
}

const seeds = fc.integer({ min: 0, max: 1e6 })
const densities = fc.constantFrom(...STUDY_DENSITIES)

describe('what an inversion must not depend on', () => {
  it('the scale of the counts: with λ scaled alike, or unsmoothed, the curve stays', () => {
    fc.assert(
      fc.property(densities, seeds, fc.integer({ min: 1, max: 170 }), (density, seed, hundredths) => {
        // λ is kept to a hundredth of a decade, so counts are scaled by such steps.
        const decades = hundredths / 100
        const histogram = drawn(density, 5000, seed)
        const weights = histogram.weights.map((weight) => 10 ** decades * weight)
        const many = { ...histogram, weights }
        const changeOf = (one: SmoothingSettings, other: SmoothingSettings) =>
          difference(
            invert(histogram, TEMPERATURE, smoothed(one)),
            invert(many, TEMPERATURE, smoothed(other)),
          )
        expect(changeOf({ mode: 'off' }, { mode: 'off' })).toBeLessThan(1e-9)
        const manual = (log10Lambda: number): SmoothingSettings => ({ mode: 'manual', log10Lambda })
        // Only the hold on empty coefficients, 1e-8 counts strong, does not scale.
        expect(changeOf(manual(2.5), manual(2.5 + decades))).toBeLessThan(1e-6)
      }),
      { numRuns: 25 },
    )
  })

  it('the scale of the counts when the number of independent samples is stated', () => {
    fc.assert(
      fc.property(densities, seeds, fc.integer({ min: 2, max: 50 }), (density, seed, factor) => {
        const histogram = drawn(density, 5000, seed)
        const total = histogram.weights.reduce((sum, weight) => sum + weight, 0)
        const weights = histogram.weights.map((weight) => factor * weight)
        const many = createHistogram({ ...histogram, weights, independentSamples: total })
        const [one, other] = [histogram, many].map((each) =>
          invert(each, TEMPERATURE, DEFAULT_INVERSION_SETTINGS),
        )
        expect(other.smoothing.log10Lambda).toBe(one.smoothing.log10Lambda)
        expect(difference(one, other)).toBeLessThan(1e-6)
      }),
      { numRuns: 25 },
    )
  })

  it('the direction of the axis: a dihedral read backwards gives the mirrored curve', () => {
    const turns = STUDY_DENSITIES.filter(({ kind }) => kind === 'dihedral')
    fc.assert(
      fc.property(fc.constantFrom(...turns), seeds, (density, seed) => {
        const histogram = drawn(density, 5000, seed)
        const backwards = createHistogram({
          ...histogram,
          edges: histogram.edges.map((edge) => 0 - edge).toReversed(),
          weights: histogram.weights.toReversed(),
        })
        const [one, other] = [histogram, backwards].map((each) =>
          invert(each, TEMPERATURE, DEFAULT_INVERSION_SETTINGS),
        )
        // Cholesky runs the other way: rounding may tip log10 λ by its last digit, 0.01.
        expect(Math.abs((one.smoothing.log10Lambda ?? 0) - (other.smoothing.log10Lambda ?? 0))).toBeLessThan(
          0.015,
        )
        one.bins.midpoints.forEach((phi) => {
          const change = potentialEnergy(one.potential, phi) - potentialEnergy(other.potential, -phi)
          expect(Math.abs(change) / KT).toBeLessThan(0.01)
        })
      }),
      { numRuns: 20 },
    )
  })

  it('where a turn is cut: a dihedral shifted by whole bins gives the shifted curve', () => {
    const turns = STUDY_DENSITIES.filter(({ kind }) => kind === 'dihedral')
    fc.assert(
      fc.property(
        fc.constantFrom(...turns),
        seeds,
        fc.integer({ min: 1, max: 89 }),
        (density, seed, shift) => {
          const histogram = drawn(density, 5000, seed)
          const turned = [...histogram.weights.slice(shift), ...histogram.weights.slice(0, shift)]
          const [one, other] = [
            histogram,
            createHistogram({ ...histogram, weights: Float64Array.from(turned) }),
          ].map((each) => invert(each, TEMPERATURE, DEFAULT_INVERSION_SETTINGS))
          one.bins.midpoints.forEach((phi) => {
            const back = phi - (shift * 2 * Math.PI) / 90
            const change = potentialEnergy(one.potential, phi) - potentialEnergy(other.potential, back)
            expect(Math.abs(change) / KT).toBeLessThan(0.01)
          })
        },
      ),
      { numRuns: 20 },
    )
  })

  it('the unit of the coordinate and of the energy: they convert the rows and nothing else', () => {
    fc.assert(
      fc.property(densities, seeds, (density, seed) => {
        const histogram = drawn(density, 5000, seed)
        const one = invert(histogram, TEMPERATURE, DEFAULT_INVERSION_SETTINGS)
        const units: readonly CoordinateUnit[] = unitsOfKind(density.kind)
        for (const unit of units) {
          const edges = histogram.edges.map((edge) =>
            coordinateToInternal(coordinateFromInternal(edge, unit), unit),
          )
          const other = invert(
            createHistogram({ ...histogram, edges }),
            TEMPERATURE,
            DEFAULT_INVERSION_SETTINGS,
          )
          expect(difference(one, other)).toBeLessThan(1e-6)
          const table = makeTable(other.potential, { ...DEFAULT_INVERSION_SETTINGS.table, rows: 50 })
          const plain = tableRows(table, { coordinateUnit: unit, energyUnit: 'kJ/mol' })
          const kcal = tableRows(table, { coordinateUnit: unit, energyUnit: 'kcal/mol' })
          const scale = energyScale('kcal/mol', TEMPERATURE)
          plain.forEach(({ energy, force }, row) => {
            // Seven printed digits.
            expect(Math.abs(kcal[row].energy - energy * scale)).toBeLessThanOrEqual(1e-6 * Math.abs(energy))
            expect(Math.abs(kcal[row].force - force * scale)).toBeLessThanOrEqual(1e-6 * Math.abs(force))
          })
        }
      }),
      { numRuns: 12 },
    )
  })

  it('the fineness of the bins: every bin split in two changes the curve by less than its band', () => {
    fc.assert(
      fc.property(densities, seeds, (density, seed) => {
        const random = createRandom(seed)
        const fine = splitCounts(density, random.poisson)
        const coarse = createHistogram({
          ...fine,
          edges: fine.edges.filter((_, edge) => edge % 2 === 0),
          weights: Float64Array.from(
            { length: 90 },
            (_, bin) => fine.weights[2 * bin] + fine.weights[2 * bin + 1],
          ),
        })
        const [one, other] = [coarse, fine].map((each) =>
          invert(each, TEMPERATURE, DEFAULT_INVERSION_SETTINGS),
        )
        one.bins.deviations?.forEach((deviation, bin) => {
          if (one.bins.weights[bin] < 20) return
          const [q, mode] = [one.bins.midpoints[bin], one.minimum.coordinate]
          const rise = ({ potential }: Inversion) =>
            potentialEnergy(potential, q) - potentialEnergy(potential, mode)
          // The half width of the 95 % band, and for the mode itself, where that is 0, a hundredth of kT.
          expect(Math.abs(rise(one) - rise(other))).toBeLessThan(1.96 * deviation + 0.01 * KT)
        })
      }),
      { numRuns: 40 },
    )
  })
})

/** Poisson counts of 20,000 samples on bins of half the width; both halves of a bin share its probability by volume. */
function splitCounts(
  { kind, edges, probabilities, energy }: StudyDensity,
  poisson: (mean: number) => number,
): Histogram {
  const halves = edges.slice(1).flatMap((edge, bin) => [(edges[bin] + edge) / 2, edge])
  const fine = Float64Array.of(edges[0], ...halves)
  const shares = Array.from({ length: 180 }, (_, half) => {
    const middle = (fine[half] + fine[half + 1]) / 2
    const volume = kind === 'bond' ? middle ** 2 : kind === 'angle' ? Math.sin(middle) : 1
    return volume * Math.exp(-energy(middle))
  })
  const weights = shares.map((share, half) => {
    const whole = shares[half - (half % 2)] + shares[half - (half % 2) + 1]
    return poisson((20_000 * probabilities[Math.floor(half / 2)] * share) / whole)
  })
  return createHistogram({ kind, edges: fine, weights, content: 'count' })
}
