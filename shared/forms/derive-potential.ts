import type { Histogram } from '../histogram'
import {
  type Inversion,
  type InversionSettings,
  invert,
  placeWords,
  potentialEnergy,
  regenerate,
  replacedWarnings,
  type Warning,
} from '../inversion'
import { type ChosenForm, fitChosenForm } from './chosen-form'
import type { FormFit } from './form'
import { formDeviation } from './form-deviation'
import { formDeviations } from './form-energy'

/** Pearson's χ² of a form this many of its own deviations above its mean is no accident. */
const MISFIT_DEVIATIONS = 6
/** A form that misses the smooth curve by less does not matter even where that is significant, in kT. */
const MISFIT_ENERGY = 0.1

/** What a table is written from, and the smooth curve beside it. */
export interface DerivedPotential {
  /** The smooth inversion; with a form the same one with the form's potential, errors and warnings in its place. */
  readonly inversion: Inversion
  readonly smooth: Inversion
  /** With its largest deviation from the smooth curve; null when the table has the smooth curve itself. */
  readonly form: FormFit | null
  /** Add to energies of `smooth` to lay them over `inversion`, kJ/mol: the constant that leaves no mean difference. */
  readonly smoothOffset: number
}

/**
 * From a histogram and settings to the potential that the table is written from: the one way that the browser, the server
 * and the command line take.
 *
 * @param temperature K
 * @throws {InvalidInputError} as `invert` and `fitChosenForm`
 */
export function derivePotential(
  histogram: Histogram,
  temperature: number,
  settings: InversionSettings,
): DerivedPotential {
  return withForm(invert(histogram, temperature, settings), fitChosenForm(histogram, temperature, settings))
}

/**
 * Puts a form in the place of a smooth curve.
 *
 * @param chosen fitted to the same histogram; null leaves the curve as it is
 */
export function withForm(smooth: Inversion, chosen: ChosenForm | null): DerivedPotential {
  if (chosen === null) return { inversion: smooth, smooth, form: null, smoothOffset: 0 }
  const { kind, bins, jacobian } = smooth
  const { potential, minimum } = chosen
  const form: FormFit = { ...chosen.fit, largestDeviation: formDeviation(chosen.fit, smooth) }
  const smoothOffset = meanDifference(smooth, chosen)
  const replaced: Inversion = {
    ...smooth,
    potential,
    bins: { ...bins, deviations: formDeviations(form, bins.midpoints, minimum) },
    rawOffset: smooth.rawOffset + smoothOffset,
    regenerated: regenerate(kind, potential, bins.edges, jacobian),
    minimum: { coordinate: minimum, energy: 0 },
  }
  const warnings = [...replacedWarnings(replaced), ...missedData(form)]
  return { inversion: { ...replaced, warnings }, smooth, form, smoothOffset }
}

/** Mean of U(form) − U(smooth) under the smooth distribution, kJ/mol. */
function meanDifference({ bins, potential, regenerated }: Inversion, chosen: ChosenForm): number {
  return regenerated.reduce((sum, mass, bin) => {
    const at = bins.midpoints[bin]
    return sum + mass * (potentialEnergy(chosen.potential, at) - potentialEnergy(potential, at))
  }, 0)
}

function missedData({ form, kind, goodness, largestDeviation }: FormFit): Warning[] {
  if (largestDeviation === null || largestDeviation.value < MISFIT_ENERGY) return []
  if (goodness !== null) {
    const { chiSquare, freedom } = goodness
    if ((chiSquare - freedom) / Math.sqrt(2 * freedom) < MISFIT_DEVIATIONS) return []
  }
  const { value, coordinate } = largestDeviation
  return [
    {
      code: 'FORM_MISSES_DATA',
      message: `The form ${form} differs from the smooth curve by up to ${value.toFixed(2)} kT, at ${placeWords(kind, coordinate)}, where the data live: more than their noise. What it leaves out is lost in the table.`,
      action: 'Choose a form that follows the data, or the table itself.',
    },
  ]
}
