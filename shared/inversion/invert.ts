import { InvalidInputError } from '../errors'
import { binCentroids, binMidpoints, binVolumes, type Histogram } from '../histogram'
import { thermalEnergy } from '../units'
import { buildPotential } from './build-potential'
import type { Inversion, InvertedBins, SmoothingResult } from './inversion'
import { type InversionSettings, SETTING_LIMITS, type SmoothingSettings } from './inversion-settings'
import { inversionNotes } from './inversion-notes'
import { inversionWarnings } from './inversion-warnings'
import type { Potential } from './potential'
import { type PreparedBins, prepareBins } from './prepared-bins'
import { rawCurve } from './raw-curve'
import { regenerate } from './regenerate'
import { type FittedCurve, smoothCurve } from './smooth-curve'

/**
 * Boltzmann inversion of a histogram into a potential: U = −kT ln(n/V) with the exact volume V of each bin (Tschöp et al.,
 * Acta Polym. 49 (1998) 61; Reith, Pütz, Müller-Plathe, J. Comput. Chem. 24 (2003) 1624), smoothed as a penalised Poisson
 * log-density. Counts are divided by their statistical inefficiency g: `settings.inefficiency`, else what the stated number
 * of independent samples makes it, else g from blocks or chains, else 1 with the note COUNTS_TAKEN_AS_INDEPENDENT; the error
 * band is √g as wide as that of independent counts. A density or probability without a stated number is inverted unsmoothed,
 * whatever the settings ask for, with the warning SAMPLE_SIZE_UNKNOWN.
 *
 * @param histogram internal units
 * @param temperature K
 * @returns potential, evidence, warnings and notes
 * @throws {InvalidInputError} TEMPERATURE_INVALID; SETTING_INVALID with the field; TOO_FEW_BINS with fewer than 5 filled
 *   bins; TOO_FEW_SAMPLES when counts stand for less than 1; SINGULAR_SYSTEM when the counts do not determine a smooth curve
 */
export function invert(histogram: Histogram, temperature: number, settings: InversionSettings): Inversion {
  const kT = thermalEnergy(temperature)
  const { kind } = histogram
  const { jacobian } = settings
  checkSmoothing(settings.smoothing)
  checkInefficiency(settings.inefficiency)
  const bins = prepareBins(histogram, jacobian, settings.inefficiency)
  const fitted = fitCurve(histogram, temperature, bins, settings)
  const { potential, minimum, constant } = buildPotential(fitted.curve, {
    stiffness: settings.tails.stiffness,
    level: settings.straightAngle === 'level',
  })
  const inversion = {
    kind,
    temperature,
    jacobian,
    settings,
    bins: invertedBins(histogram, bins, fitted, potential, jacobian, kT),
    uncorrectedEnergies: rawEnergies(histogram.weights, binVolumes(kind, histogram.edges, false), kT),
    potential,
    rawOffset: fitted.leastRaw - constant,
    regenerated: regenerate(kind, potential, histogram.edges, jacobian),
    smoothing: smoothingResult(settings.smoothing, fitted),
    minimum: { coordinate: minimum, energy: 0 },
    independentSamples: bins.independentSamples,
    inefficiency: bins.inefficiency,
    notes: inversionNotes(bins),
  }
  return { ...inversion, warnings: inversionWarnings(inversion, bins, fitted) }
}

function checkSmoothing(smoothing: SmoothingSettings): void {
  if (smoothing.mode !== 'manual') return
  const { low, high } = SETTING_LIMITS.log10Lambda
  if (smoothing.log10Lambda >= low && smoothing.log10Lambda <= high) return
  throw new InvalidInputError('SETTING_INVALID', `log10 λ must lie between ${low} and ${high}.`, {
    field: 'log10Lambda',
  })
}

function checkInefficiency(inefficiency: number | null): void {
  const { low, high } = SETTING_LIMITS.inefficiency
  if (inefficiency === null || (inefficiency >= low && inefficiency <= high)) return
  throw new InvalidInputError('SETTING_INVALID', `The inefficiency must lie between ${low} and ${high}.`, {
    field: 'inefficiency',
  })
}

function fitCurve(
  { kind }: Histogram,
  temperature: number,
  bins: PreparedBins,
  settings: InversionSettings,
): FittedCurve {
  const { smoothing } = settings
  if (smoothing.mode === 'off' || bins.independentSamples === null) {
    return rawCurve(kind, temperature, bins, settings)
  }
  const choice =
    smoothing.mode === 'auto' ? { by: smoothing.criterion } : { log10Lambda: smoothing.log10Lambda }
  return smoothCurve(kind, temperature, bins, settings, choice)
}

function invertedBins(
  { kind, edges, weights }: Histogram,
  bins: PreparedBins,
  { curve, range: [first, end] }: FittedCurve,
  { lowTail, highTail }: Potential,
  jacobian: boolean,
  kT: number,
): InvertedBins {
  const volumes = binVolumes(kind, edges, jacobian)
  const { deviations } = curve
  const [low, high] = [lowTail?.coordinate ?? -Infinity, highTail?.coordinate ?? Infinity]
  const deviationOf = (bin: number) => {
    const place = bin + bins.added[0]
    if (deviations === null || place < first || place >= end) return NaN
    const knot = place - first
    // A raw curve ends at its outermost knots: these still count.
    return curve.knots[knot] >= low && curve.knots[knot] <= high ? deviations[knot] : NaN
  }
  return {
    edges,
    midpoints: binMidpoints(edges),
    centroids: binCentroids(kind, edges, jacobian),
    weights,
    volumes,
    rawEnergies: rawEnergies(weights, volumes, kT),
    deviations: deviations && weights.map((_, bin) => deviationOf(bin)),
  }
}

/** −kT ln(n/V) with least value 0; NaN for an empty bin. */
function rawEnergies(weights: Float64Array, volumes: Float64Array, kT: number): Float64Array {
  const energies = weights.map((weight, bin) => (weight > 0 ? -kT * Math.log(weight / volumes[bin]) : NaN))
  const least = energies.reduce((lowest, energy) => (energy < lowest ? energy : lowest), Infinity)
  return energies.map((energy) => energy - least)
}

function smoothingResult(smoothing: SmoothingSettings, { density }: FittedCurve): SmoothingResult {
  const criterion = density !== null && smoothing.mode === 'auto' ? smoothing.criterion : null
  return {
    mode: density === null ? 'off' : smoothing.mode,
    criterion,
    lambda: density && 10 ** density.log10Lambda,
    log10Lambda: density && density.log10Lambda,
    effectiveDimension: density && density.effectiveDimension,
  }
}
