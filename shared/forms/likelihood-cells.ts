import { type AppliedInefficiency, coordinateDomain, type CoordinateKind, type Histogram } from '../histogram'
import { prepareBins, type PreparedBins } from '../inversion'
import { thermalEnergy } from '../units'
import { layOut } from './lay-out-cells'

/** More effective counts than this in the outermost bin, and the distribution goes on beyond it: the histogram cuts it off. */
const CUT_OFF_COUNT = 3
/** Share of the populated range that a bond may reach beyond a histogram that does not cut it off; as for a bond table. */
const BOND_TAIL = 0.4
/**
 * What a likelihood is computed on: cells that partition the region a form is normalised over, each with the
 * same number of Gauss–Legendre points. Cells ascend: those of a lower tail, which hold no counts, the histogram's bins, an upper tail.
 */
export interface LikelihoodCells {
  readonly kind: CoordinateKind
  /** false takes J = 1. */
  readonly useJacobian: boolean
  readonly temperature: number
  readonly kT: number
  /** nm or rad, cell after cell. */
  readonly points: Float64Array
  readonly pointsPerCell: number
  /** Quadrature weight times Jacobian at each point. */
  readonly measures: Float64Array
  /** Share of the counts in each cell, sum 1. */
  readonly shares: Float64Array
  /** The cells that are bins: first, and one past the last. */
  readonly bins: readonly [first: number, end: number]
  /** Edges of those bins. */
  readonly edges: Float64Array
  readonly volumes: Float64Array
  readonly filledBins: number
  /** Mean and standard deviation of the coordinate: origin and scale of fits. */
  readonly mean: number
  readonly deviation: number
  /** First and last coordinate of the region. */
  readonly region: readonly [low: number, high: number]
  readonly populated: readonly [low: number, high: number]
  readonly independentSamples: number | null
  /** What counts were divided by; null for a density or a probability. */
  readonly inefficiency: AppliedInefficiency | null
  /** Sides on which the histogram cuts the distribution off. */
  readonly cutOff: readonly [low: boolean, high: boolean]
}

/**
 * Lays a histogram out for a likelihood. Every form is normalised over the same region, so that their AIC compare: the
 * histogram's own range and, on a side where it does not cut the distribution off, what lies beyond, which then was never
 * visited: an angle to the end of its domain, a dihedral the rest of the turn, a bond 40 % of the populated range further
 * (and not below 0). A side is cut off when its outermost bin holds more than 3 effective counts (or anything, where the
 * number of independent samples is unknown); the likelihood is then conditional on lying inside. A dihedral that is cut
 * off on one side is conditional on both, since its gap is one.
 *
 * @param useJacobian false takes J = 1
 * @param inefficiency as for an inversion; null takes what the histogram says
 * @throws {InvalidInputError} TEMPERATURE_INVALID; SETTING_INVALID; TOO_FEW_BINS, TOO_FEW_SAMPLES as for an inversion
 */
export function likelihoodCells(
  histogram: Histogram,
  temperature: number,
  useJacobian: boolean,
  inefficiency: number | null,
): LikelihoodCells {
  const { kind } = histogram
  const kT = thermalEnergy(temperature)
  const prepared = prepareBins(histogram, useJacobian, inefficiency)
  const cutOff = sidesCutOff(kind, prepared)
  const [first, end] = ownBins(prepared, cutOff)
  const edges = prepared.edges.slice(first, end + 1)
  const populated = [prepared.edges[prepared.filled[0]], prepared.edges[prepared.filled[1] + 1]] as const
  const region = regionOf(kind, edges, populated, cutOff)
  return {
    ...layOut({ kind, useJacobian, region }, edges, prepared.counts.subarray(first, end)),
    temperature,
    kT,
    populated,
    independentSamples: prepared.independentSamples,
    inefficiency: prepared.inefficiency,
    cutOff,
  }
}

/**
 * The same cells with neighbouring bins merged, for a first look that is quick.
 *
 * @param most number of bins to stay below
 */
export function mergeCells(cells: LikelihoodCells, most: number): LikelihoodCells {
  const { edges, shares, bins } = cells
  const factor = Math.ceil((edges.length - 1) / most)
  if (factor === 1) return cells
  const counts = new Float64Array(Math.ceil((edges.length - 1) / factor))
  const merged = Float64Array.from(
    { length: counts.length + 1 },
    (_, edge) => edges[Math.min(edge * factor, edges.length - 1)],
  )
  for (let cell = bins[0]; cell < bins[1]; cell++)
    counts[Math.floor((cell - bins[0]) / factor)] += shares[cell]
  return { ...cells, ...layOut(cells, merged, counts) }
}

function sidesCutOff(kind: CoordinateKind, prepared: PreparedBins): [boolean, boolean] {
  const { counts, edges, independentSamples } = prepared
  const [first, end] = ownBins(prepared, [true, true])
  const [low, high] = coordinateDomain(kind)
  const most = independentSamples === null ? 0 : CUT_OFF_COUNT
  const cutLow = edges[first] > low && counts[first] > most
  const cutHigh = edges[end] < high && counts[end - 1] > most
  return kind === 'dihedral' ? [cutLow || cutHigh, cutLow || cutHigh] : [cutLow, cutHigh]
}

/** First bin and one past the last: all of them, or without those that were added to fill the turn. */
function ownBins({ counts, added }: PreparedBins, cutOff: readonly [boolean, boolean]): [number, number] {
  return [cutOff[0] ? added[0] : 0, counts.length - (cutOff[1] ? added[1] : 0)]
}

function regionOf(
  kind: CoordinateKind,
  edges: Float64Array,
  populated: readonly [number, number],
  cutOff: readonly [boolean, boolean],
): [number, number] {
  const [first, last] = [edges[0], edges[edges.length - 1]]
  const tail = BOND_TAIL * (populated[1] - populated[0])
  const [low, high] =
    kind === 'bond'
      ? [Math.max(0, Math.min(first, populated[0] - tail)), Math.max(last, populated[1] + tail)]
      : coordinateDomain(kind)
  return [cutOff[0] ? first : low, cutOff[1] ? last : high]
}
