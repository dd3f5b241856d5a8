import type { Correlation } from '@shared/correlation'
import { binVolumes } from '@shared/histogram'
import { coordinateScale } from '@shared/units'
import {
  coordinateNames,
  coordinateUnitOf,
  type CoordinateNames,
  type DisplayUnits,
} from '@/components/figure/coordinate-names'
import { contourLines, type ContourLine } from './contour-lines'
import { adaptiveDensity } from './adaptive-density'
import { mapBasins, type MapBasin } from './map-basins'
import { axisWindow, shareOutside } from './map-window'
import { smoothDensity } from './smooth-density'

/** One coordinate of the map, in the unit shown. */
export interface MapAxis {
  readonly names: CoordinateNames
  readonly degrees: boolean
  /** Internal value = shown value × scale. */
  readonly scale: number
  readonly edges: Float64Array
  /** The part that is drawn, from bin edge to bin edge. */
  readonly window: readonly [low: number, high: number]
  /** Distribution of this coordinate alone, per unit, as a share of its highest bin. */
  readonly alone: Float64Array
}

/** The mean of the second coordinate in one bin of the first, with its 95 % half width where that is known. */
export interface MeanPoint {
  readonly x: number
  readonly mean: number
  readonly half: number | null
}

/** What the figure draws besides its cells, in the units shown. */
export interface MapModel {
  readonly x: MapAxis
  readonly y: MapAxis
  readonly mean: readonly MeanPoint[]
  /** Density per volume of each cell as it is coloured (see `adaptiveDensity`), NaN without counts. */
  readonly shown: Float64Array
  /** Whether thin cells are averaged: only where the number of independent samples is known. */
  readonly averaged: boolean
  /** Lines at 1, 2 and 3 kT above the lowest free energy, from the averaged density. */
  readonly contours: readonly ContourLine[]
  readonly basins: readonly MapBasin[]
  /** Highest density of the cells as coloured, and where it is, in the units shown. */
  readonly highest: { readonly density: number; readonly x: number; readonly y: number }
  /** Share of the samples outside the frame. */
  readonly outside: number
}

/** kT above the lowest free energy; further out contours follow noise. */
export const CONTOUR_LEVELS = [1, 2, 3] as const

const SMOOTHING_PASSES = 2
/** Bins with fewer independent samples show no mean. */
const LEAST_COUNT = 5
/** Where nobody stated a sample size: bins with less than this share show no mean. */
const LEAST_SHARE = 0.001
const NORMAL_95 = 1.959964

/** Prepares a correlation for drawing in the units chosen. */
export function mapModel(correlation: Correlation, units: DisplayUnits): MapModel {
  const { xEdges, yEdges, density, marginals, kinds } = correlation
  const x = mapAxis(kinds[0], xEdges, marginals.x, units)
  const y = mapAxis(kinds[1], yEdges, marginals.y, units)
  const volumes = cellVolumes(correlation)
  const masses = density.map((value, index) => value * volumes[index])
  const [nx, ny] = [x.edges.length - 1, y.edges.length - 1]
  const averaged = adaptiveDensity(masses, volumes, nx, ny, correlation.independentSamples)
  const shown = averaged.map((value, index) => (masses[index] > 0 ? value : NaN))
  const averagedMasses = averaged.map((value, index) => value * volumes[index])
  const smooth = smoothDensity(averagedMasses, volumes, nx, ny, SMOOTHING_PASSES)
  return {
    x,
    y,
    shown,
    averaged: correlation.independentSamples !== null,
    mean: meanPoints(correlation, x, y),
    contours: contours(x, y, smooth),
    basins: mapBasins(correlation, x, y),
    highest: highestCell(shown, x, y),
    outside: shareOutside(x.edges, y.edges, masses, x.window, y.window),
  }
}

/** Exact volumes of the cells, row-major. */
function cellVolumes({ kinds, xEdges, yEdges }: Correlation): Float64Array {
  const ofX = binVolumes(kinds[0], xEdges)
  const ofY = binVolumes(kinds[1], yEdges)
  return Float64Array.from({ length: ofX.length * ofY.length }, (_, index) => {
    return ofX[Math.floor(index / ofY.length)] * ofY[index % ofY.length]
  })
}

function mapAxis(
  kind: Correlation['kinds'][number],
  internal: Float64Array,
  masses: Float64Array,
  units: DisplayUnits,
): MapAxis {
  const unit = coordinateUnitOf(kind, units)
  const scale = coordinateScale(unit)
  const edges = internal.map((edge) => edge / scale)
  const perUnit = masses.map((mass, bin) => mass / (edges[bin + 1] - edges[bin]))
  const highest = perUnit.reduce((high, value) => Math.max(high, value), 0)
  return {
    names: coordinateNames(kind, units),
    degrees: unit === 'degree',
    scale,
    edges,
    window: axisWindow(edges, masses),
    alone: perUnit.map((value) => value / highest),
  }
}

function meanPoints(correlation: Correlation, x: MapAxis, y: MapAxis): MeanPoint[] {
  const { conditionalMean, marginals, xEdges } = correlation
  return conditionalMean
    .filter(({ x: at, count }) => {
      if (count !== null) return count >= LEAST_COUNT
      return marginals.x[xEdges.findLastIndex((edge) => edge <= at)] >= LEAST_SHARE
    })
    .map((point) => ({
      x: point.x / x.scale,
      mean: point.mean / y.scale,
      half: point.error === null ? null : (NORMAL_95 * point.error) / y.scale,
    }))
}

function contours(x: MapAxis, y: MapAxis, smooth: Float64Array): ContourLine[] {
  const highest = smooth.reduce((high, value) => Math.max(high, value), 0)
  const energies = smooth.map((value) => -Math.log(value / highest))
  return CONTOUR_LEVELS.flatMap((level) =>
    contourLines(midpoints(x.edges), midpoints(y.edges), energies, level),
  )
}

function highestCell(density: Float64Array, x: MapAxis, y: MapAxis): MapModel['highest'] {
  const ny = y.edges.length - 1
  const highest = density.reduce((high, value) => (value > high ? value : high), 0)
  const best = density.indexOf(highest)
  return {
    density: highest,
    x: midpoints(x.edges)[Math.floor(best / ny)],
    y: midpoints(y.edges)[best % ny],
  }
}

function midpoints(edges: Float64Array): Float64Array {
  return Float64Array.from({ length: edges.length - 1 }, (_, bin) => (edges[bin] + edges[bin + 1]) / 2)
}
