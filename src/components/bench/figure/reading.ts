import type { Histogram } from '@shared/histogram'
import { potentialEnergy, potentialSlope, type Inversion } from '@shared/inversion'
import { coordinateFromInternal, coordinateScale, energyScale, thermalEnergy } from '@shared/units'
import { coordinateUnitOf, type DisplayUnits } from '@/components/figure/coordinate-names'
import { BAND_DEVIATIONS } from './band-polygon'
import { deviationAt } from './deviation-at'
import type { FigureModel } from './figure-model'

/** What stands under the reading line at one bin, in the units shown. */
export interface Reading {
  readonly bin: number
  readonly coordinate: number
  readonly low: number
  readonly high: number
  /** Counts of the bin; null for a density or probability. */
  readonly counts: number | null
  /** Share of all weight that lies in the bin. */
  readonly share: number
  /** Independent samples in the bin; null where their number is unknown. */
  readonly independent: number | null
  /** Difference to the regenerated distribution in units of its error; null where no error is known. */
  readonly residual: number | null
  readonly energy: number
  /** Half width of the 95 % band; null without a stated sample size or where the data say nothing. */
  readonly halfWidth: number | null
  readonly thermal: number
  /** −dU/dq per unit of the coordinate. */
  readonly force: number
  /** Energy with the Jacobian left out (or put in); null for a dihedral. */
  readonly comparison: number | null
  /** Height of the regenerated distribution, where the bead of the upper panel sits; null outside the data. */
  readonly density: number | null
}

/** Reads the inversion at the midpoint of a bin. */
export function readingAt(
  histogram: Histogram,
  inversion: Inversion,
  model: FigureModel,
  units: DisplayUnits,
  bin: number,
): Reading {
  const { bins, potential, kind, temperature } = inversion
  const unit = coordinateUnitOf(kind, units)
  const scale = energyScale(units.energy, temperature)
  const midpoint = bins.midpoints[bin]
  const energy = potentialEnergy(potential, midpoint)
  const deviation = deviationAt(potential, midpoint)
  const share = histogram.weights[bin] / histogram.weights.reduce((sum, weight) => sum + weight, 0)
  const { independentSamples } = inversion
  return {
    bin,
    coordinate: coordinateFromInternal(midpoint, unit),
    low: coordinateFromInternal(bins.edges[bin], unit),
    high: coordinateFromInternal(bins.edges[bin + 1], unit),
    counts: histogram.content === 'count' ? histogram.weights[bin] : null,
    share,
    independent: independentSamples === null ? null : share * independentSamples,
    residual: residualAt(model, bin),
    energy: energy * scale,
    halfWidth:
      deviation === null || Number.isNaN(deviation) || !inData(potential.populated, midpoint)
        ? null
        : BAND_DEVIATIONS * deviation * scale,
    thermal: energy / thermalEnergy(temperature),
    force: -potentialSlope(potential, midpoint) * scale * coordinateScale(unit),
    comparison: model.comparisonAt && model.comparisonAt(midpoint) * scale,
    density: densityAt(model.regenerated, coordinateFromInternal(midpoint, unit)),
  }
}

function residualAt({ bins }: FigureModel, bin: number): number | null {
  const residual = bins.residuals?.[bin] ?? NaN
  return Number.isNaN(residual) ? null : residual
}

const inData = ([low, high]: readonly [number, number], coordinate: number): boolean =>
  coordinate >= low && coordinate <= high

/** Height of an evenly sampled curve, linear between its points; null outside. */
function densityAt(curve: FigureModel['regenerated'], coordinate: number): number | null {
  const low = curve[0][0]
  const step = (curve[curve.length - 1][0] - low) / (curve.length - 1)
  const position = (coordinate - low) / step
  if (position < 0 || position > curve.length - 1) return null
  const before = Math.min(Math.floor(position), curve.length - 2)
  return curve[before][1] + (curve[before + 1][1] - curve[before][1]) * (position - before)
}

/** Decimals that write every edge exactly enough to tell it from a neighbour, six at most. */
export function edgeDecimals(edges: ArrayLike<number>): number {
  const width = (edges[edges.length - 1] - edges[0]) / (edges.length - 1)
  for (let decimals = 0; decimals < 6; decimals += 1) {
    const factor = 10 ** decimals
    if (
      Array.from(edges).every((edge) => Math.abs(Math.round(edge * factor) / factor - edge) < 0.02 * width)
    ) {
      return decimals
    }
  }
  return Math.min(6, Math.max(0, Math.ceil(-Math.log10(width)) + 1))
}
