import { potentialEnergy, type Inversion } from '@shared/inversion'
import {
  coordinateFromInternal,
  coordinateToInternal,
  energyScale,
  thermalEnergy,
  type CoordinateKind,
  type EnergyUnit,
} from '@shared/units'
import {
  coordinateNames,
  coordinateUnitOf,
  type CoordinateNames,
  type DisplayUnits,
} from '@/components/figure/coordinate-names'
import { steppedOutline, type Point } from '@/components/figure/stepped-outline'
import { BAND_DEVIATIONS, bandPolygons } from './band-polygon'
import { dataRange } from './data-range'
import { emptyRuns, populatedBins, type EmptyRun } from './empty-bins'
import { figureBins, type FigureBins } from './figure-bins'
import { densityTop, energyDomain, shownDomain } from './figure-domain'
import { evenly, potentialCurve, type Comparison } from './potential-curve'
import { regeneratedCurve } from './regenerated-curve'

/** The axes of the figure, in the units shown. They do not depend on the smoothing, so nothing jumps under a slider. */
export interface FigureAxes {
  readonly kind: CoordinateKind
  readonly names: CoordinateNames
  readonly energyUnit: EnergyUnit
  readonly degrees: boolean
  readonly domain: readonly [number, number]
  readonly densityTop: number
  readonly energyDomain: readonly [number, number]
  /** The second energy axis: kT, or kJ/mol beside kT; `perUnit` of it make one of the unit shown. */
  readonly secondEnergy: { readonly unit: string; readonly perUnit: number }
}

/** The axes alone of a model. */
export function axesOf(model: FigureAxes): FigureAxes {
  const { kind, names, energyUnit, degrees, domain, densityTop, energyDomain, secondEnergy } = model
  return { kind, names, energyUnit, degrees, domain, densityTop, energyDomain, secondEnergy }
}

/** Everything the figure draws, in the units shown. */
export interface FigureModel extends FigureAxes {
  readonly bins: FigureBins
  readonly empty: readonly EmptyRun[]
  readonly measured: readonly Point[]
  readonly regenerated: readonly Point[]
  readonly potential: readonly Point[]
  /** The potential outside the data, to the left and to the right. */
  readonly tails: readonly (readonly Point[])[]
  /** One polygon per stretch where the error is known; null without a stated sample size. */
  readonly band: readonly (readonly Point[])[] | null
  /** Half width of the band at each point of the potential, NaN where it is not known; null without a stated sample size. */
  readonly halfWidths: Float64Array | null
  readonly rings: readonly Point[]
  /** The smooth curve a form stands for; null while the potential is that curve. */
  readonly smooth: readonly Point[] | null
  readonly comparison: readonly Point[] | null
  /** The comparison at any coordinate, in internal units. */
  readonly comparisonAt: Comparison['at'] | null
}

const TAIL_POINTS = 60

/** The smooth inversion behind a form, and what lays its energies over it, kJ/mol. */
export interface SmoothBehind {
  readonly smooth: Inversion
  readonly smoothOffset: number
}

/** Turns an inversion into axes and curves in the units shown. */
export function figureModel(
  inversion: Inversion,
  units: DisplayUnits,
  behind: SmoothBehind | null = null,
): FigureModel {
  const { kind, bins } = inversion
  const names = coordinateNames(kind, units)
  const unit = coordinateUnitOf(kind, units)
  const shown = (coordinate: number): number => coordinateFromInternal(coordinate, unit)
  const yFactor = energyScale(units.energy, inversion.temperature)
  const scaled = (xs: Float64Array, ys: Float64Array, factor: number): Point[] =>
    Array.from(xs, (x, index): Point => [shown(x), ys[index] * factor])

  const seen = figureBins(inversion, shown, names.densityFactor, yFactor)
  const populated = populatedBins(bins.weights)
  const domain = shownDomain(kind, seen.edges, populated, unit)
  const [low, high] = dataRange(inversion, populated)
  const curve = potentialCurve(inversion, low, high)
  const back = regeneratedCurve(inversion, bins.edges[populated.first], bins.edges[populated.last + 1])
  const rings = ringPoints(seen)
  const comparison = curve.comparison?.energies.map((energy) => energy * yFactor) ?? null

  return {
    kind,
    names,
    energyUnit: units.energy,
    degrees: unit === 'degree',
    domain,
    densityTop: densityTop(seen.measured),
    energyDomain: energyDomain(
      rings.map(([, energy]) => energy),
      comparison ?? [],
    ),
    secondEnergy: secondEnergy(units.energy, inversion.temperature),
    bins: seen,
    empty: emptyRuns(bins.weights),
    measured: steppedOutline(seen.edges, seen.measured),
    regenerated: scaled(back.coordinates, back.densities, names.densityFactor / shown(1)),
    potential: scaled(curve.coordinates, curve.energies, yFactor),
    tails: tailRanges(
      [coordinateToInternal(domain[0], unit), coordinateToInternal(domain[1], unit)],
      [low, high],
    ).map(([from, to]) => {
      const coordinates = evenly(from, to, TAIL_POINTS)
      const energies = coordinates.map((coordinate) => potentialEnergy(inversion.potential, coordinate))
      return scaled(coordinates, energies, yFactor)
    }),
    band:
      curve.deviations &&
      bandPolygons(
        curve.coordinates.map(shown),
        curve.energies.map((energy) => energy * yFactor),
        curve.deviations.map((deviation) => deviation * yFactor),
      ),
    halfWidths: curve.deviations?.map((deviation) => BAND_DEVIATIONS * deviation * yFactor) ?? null,
    rings,
    smooth: behind && smoothPoints(behind, curve.coordinates, shown, yFactor),
    comparison: comparison && scaled(curve.coordinates, comparison, 1),
    comparisonAt: curve.comparison?.at ?? null,
  }
}

function smoothPoints(
  { smooth, smoothOffset }: SmoothBehind,
  coordinates: Float64Array,
  shown: (coordinate: number) => number,
  yFactor: number,
): Point[] {
  return Array.from(coordinates, (coordinate): Point => [
    shown(coordinate),
    (potentialEnergy(smooth.potential, coordinate) + smoothOffset) * yFactor,
  ])
}

/** The axis at the right: kT beside a molar unit, kJ/mol beside kT. */
export function secondEnergy(unit: EnergyUnit, temperature: number): FigureAxes['secondEnergy'] {
  const kT = thermalEnergy(temperature)
  if (unit === 'kT') return { unit: 'kJ/mol', perUnit: kT }
  return { unit: 'kT', perUnit: 1 / (energyScale(unit, temperature) * kT) }
}

/** Bin by bin energies at their centroids; bins without counts are left out. */
function ringPoints({ centroids, energies }: FigureBins): Point[] {
  return Array.from(centroids, (centroid, bin): Point => [centroid, energies[bin]]).filter(([, energy]) =>
    Number.isFinite(energy),
  )
}

type Range = readonly [number, number]

/** The parts of the shown range left and right of the data. */
function tailRanges(shown: Range, data: Range): Range[] {
  const left: Range = [shown[0], data[0]]
  const right: Range = [data[1], shown[1]]
  return [left, right].filter(([from, to]) => to - from > 1e-9)
}
