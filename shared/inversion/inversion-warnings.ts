import { thermalEnergy } from '../units'
import { axisWarnings } from './axis-warnings'
import { binWarnings } from './bin-warnings'
import { curveWarnings } from './curve-warnings'
import { edgeWarnings } from './edge-warnings'
import type { Inversion } from './inversion'
import { jacobianWarnings } from './jacobian-warnings'
import type { PreparedBins } from './prepared-bins'
import type { FittedCurve } from './smooth-curve'
import { tableWarnings } from './table-warnings'
import type { Warning } from './warning'

/** Below this number of independent samples a curve is rather a guess. */
const FEW_SAMPLES = 200

/**
 * What may be wrong with an inversion, each with the number it rests on and what to do; the gravest kind first: samples,
 * histogram, curve, table.
 *
 * @throws {InvalidInputError} SETTING_INVALID when the table settings are outside the domain
 */
export function inversionWarnings(
  inversion: Omit<Inversion, 'warnings'>,
  bins: PreparedBins,
  fitted: FittedCurve,
): Warning[] {
  const kT = thermalEnergy(inversion.temperature)
  return [
    ...sampleWarnings(inversion.independentSamples),
    ...axisWarnings(inversion.kind, bins),
    ...jacobianWarnings(inversion.kind, inversion.jacobian, bins),
    ...binWarnings(inversion.kind, bins),
    ...edgeWarnings(inversion, bins, kT),
    ...curveWarnings(inversion, bins, fitted, kT),
    ...tableWarnings(inversion, kT),
  ]
}

function sampleWarnings(independentSamples: number | null): Warning[] {
  if (independentSamples === null) {
    return [
      {
        code: 'SAMPLE_SIZE_UNKNOWN',
        message:
          'The file holds no counts and nobody has said how many independent samples it stands for, so the curve follows every bin and has no error band.',
        action: 'State the number of independent samples to smooth the curve and to see its error band.',
      },
    ]
  }
  if (independentSamples >= FEW_SAMPLES) return []
  return [
    {
      code: 'FEW_SAMPLES',
      message: `The distribution stands for ${Math.round(independentSamples)} independent samples only; flanks and barriers are little more than the smoothing.`,
      action: `Measure longer or over more chains: ${FEW_SAMPLES} independent samples are the least to rely on.`,
    },
  ]
}
