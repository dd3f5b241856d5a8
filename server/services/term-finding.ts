import { curveBasins } from '../../shared/basins'
import { InvalidInputError } from '../../shared/errors'
import { dihedralFlatness } from '../../shared/flatness'
import { type Histogram, histogramDeviation } from '../../shared/histogram'
import { DEFAULT_INVERSION_SETTINGS, invert } from '../../shared/inversion'
import type { TermFinding } from '../../shared/mapping'

/** What the data of a term say, and why they say no more. */
export interface StoredFinding extends TermFinding {
  /** Why nobody counted basins; null where they were counted. */
  readonly problem: string | null
}

const SAMPLES_UNKNOWN =
  'Its number of independent samples is not stated, so nobody knows which basins are noise. State it on the bench.'

/**
 * Basins, width and flatness of a distribution. It is inverted with the default settings, whatever form or smoothing is saved
 * on the bench, so that all mappings are judged alike.
 *
 * @param temperature K
 * @param inefficiency what counts are divided by, as someone stated it; null takes what the distribution says
 * @param flatBelow of the group: a dihedral that rises by less may be dropped, in kT
 */
export function termFinding(
  histogram: Histogram,
  temperature: number,
  inefficiency: number | null,
  flatBelow: number,
): StoredFinding {
  const width = histogramDeviation(histogram)
  const deviation = Number.isFinite(width) ? width : null
  try {
    const inversion = invert(histogram, temperature, { ...DEFAULT_INVERSION_SETTINGS, inefficiency })
    const flatness = histogram.kind === 'dihedral' ? dihedralFlatness(inversion, flatBelow).verdict : null
    if (inversion.independentSamples === null) {
      return { basins: null, deviation, flatness, problem: SAMPLES_UNKNOWN }
    }
    const { basins, threshold } = curveBasins(inversion.potential)
    return {
      basins: { count: basins.length, depth: threshold.depth },
      deviation,
      flatness,
      problem: null,
    }
  } catch (error) {
    if (!(error instanceof InvalidInputError)) throw error
    return { basins: null, deviation, flatness: null, problem: error.message }
  }
}
