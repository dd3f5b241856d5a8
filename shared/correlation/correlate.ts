import { type BasinThreshold, DEFAULT_BASIN_THRESHOLD } from '../basins'
import { InvalidInputError } from '../errors'
import { binMidpoints, binVolumes } from '../histogram'
import type { JointHistogram } from '../histogram/joint-histogram'
import { binRanks, pearsonCoefficient } from './coefficients'
import { conditionalMeans } from './conditional-mean'
import { type Correlation, DEFAULT_THRESHOLDS, type VerdictThresholds } from './correlation'
import { correlationBasins } from './correlation-basins'
import { correlationWarnings } from './correlation-warnings'
import { couplingMap, largestCoupling } from './coupling-map'
import { mergeCells, mergeThinBins } from './merge-bins'
import type { Marginals } from './mutual-information'
import {
  marginalsOf,
  mutualInformation,
  mutualInformationMillerMadow,
  totalVariation,
} from './mutual-information'
import { nullDistribution } from './null-tables'
import { verdictOf } from './verdict'

/** Seed of the null tables where nobody asks for another: the same file gives the same numbers every time. */
export const DEFAULT_SEED = 1

/** Bins a side of the verdict grid: √(N/8), so that a cell holds 8 independent samples on average, and at most 40. */
const SAMPLES_PER_CELL = 8
const MOST_BINS = 40
const LEAST_BINS = 2

/** What `correlate` may be told beyond the histogram. */
export interface CorrelateOptions {
  /** Whole, 0 … 2³² − 1. */
  readonly seed?: number
  /** Overrides what the histogram says. */
  readonly independentSamples?: number | null
  /** When a basin counts. */
  readonly basinThreshold?: BasinThreshold
  /** From which mutual information on the verdict speaks. */
  readonly thresholds?: VerdictThresholds
}

/**
 * Judges whether two coordinates may be treated one by one (methods §6): mutual information against tables with the same
 * margins, the basins of both, and the evidence around them. Counts without a stated number of independent samples are taken as independent;
 * a density without one gets no verdict but 'undecided'.
 *
 * @throws {InvalidInputError} SETTING_INVALID for a number of independent samples below 2 or above the sum of counts, or
 *   a seed that is not a 32-bit whole number, or a basin threshold below 0
 */
export function correlate(joint: JointHistogram, options: CorrelateOptions = {}): Correlation {
  const { kinds, content, xEdges, yEdges } = joint
  const ny = yEdges.length - 1
  const total = joint.weights.reduce((sum, weight) => sum + weight, 0)
  const samples = content === 'count' ? total : null
  const independentSamples = options.independentSamples ?? joint.independentSamples ?? samples
  checkSampleSize(independentSamples, samples)
  const thresholds = options.thresholds ?? DEFAULT_THRESHOLDS
  const masses = joint.weights.map((weight) => weight / total)
  const marginals = marginalsOf(masses, ny)
  const verdictGrid = mergedForVerdict(joint, masses, marginals, independentSamples)
  const verdictRows = verdictGrid.yEdges.length - 1
  const measured = mutualInformation(verdictGrid.masses, verdictRows)
  const chance =
    independentSamples === null
      ? null
      : nullDistribution(verdictGrid.masses, verdictRows, independentSamples, options.seed ?? DEFAULT_SEED)
  const basins =
    independentSamples === null
      ? null
      : correlationBasins(
          joint,
          masses,
          marginals,
          independentSamples,
          options.basinThreshold ?? DEFAULT_BASIN_THRESHOLD,
        )
  const verdict =
    chance === null ? 'undecided' : verdictOf(measured, chance, basins?.mapOnly ?? 0, thresholds)
  const coupling = couplingMap(masses, marginals, xEdges, yEdges, independentSamples)
  const ordered = !kinds.includes('dihedral')
  return {
    kinds,
    content,
    samples,
    independentSamples,
    xEdges,
    yEdges,
    density: densityPerVolume(joint, masses),
    marginals,
    conditionalMean: conditionalMeans(kinds[1], masses, xEdges, yEdges, independentSamples),
    coupling,
    largestCoupling: largestCoupling(coupling),
    verdictGrid,
    mutualInformation: measured,
    mutualInformationMillerMadow:
      independentSamples === null ? null : mutualInformationMillerMadow(masses, ny, independentSamples),
    mutualInformationCorrected: chance === null ? null : measured - chance.mean,
    nullMean: chance?.mean ?? null,
    nullPercentile99: chance?.percentile99 ?? null,
    pValue: chance?.pValue ?? null,
    totalVariation: totalVariation(verdictGrid.masses, verdictRows),
    totalVariationNullMean: chance?.totalVariationMean ?? null,
    pearson: ordered ? pearsonCoefficient(masses, binMidpoints(xEdges), binMidpoints(yEdges)) : null,
    spearman: ordered ? pearsonCoefficient(masses, binRanks(marginals.x), binRanks(marginals.y)) : null,
    basins,
    verdict,
    thresholds,
    warnings: correlationWarnings(kinds, independentSamples, verdict, chance, basins, thresholds),
  }
}

function checkSampleSize(independentSamples: number | null, samples: number | null): void {
  if (independentSamples === null) return
  // A sum of many fractions may miss a whole number by rounding.
  const most = samples === null ? Infinity : samples * (1 + 1e-9)
  if (independentSamples >= 2 && independentSamples <= most && Number.isFinite(independentSamples)) return
  const range = samples === null ? 'at least 2' : `from 2 to the sum of the counts, ${samples}`
  throw new InvalidInputError(
    'SETTING_INVALID',
    `The number of independent samples is ${independentSamples}; it must be ${range}.`,
    { field: 'independentSamples' },
  )
}

/** Without a sample size nothing says how far to merge, and the file's own bins stand. */
function mergedForVerdict(
  { xEdges, yEdges }: JointHistogram,
  masses: Float64Array,
  marginals: Marginals,
  independentSamples: number | null,
): Correlation['verdictGrid'] {
  if (independentSamples === null) return { xEdges, yEdges, masses }
  const side = Math.round(Math.sqrt(independentSamples / SAMPLES_PER_CELL))
  const bins = Math.min(MOST_BINS, Math.max(LEAST_BINS, side))
  const x = mergeThinBins(marginals.x, xEdges, bins)
  const y = mergeThinBins(marginals.y, yEdges, bins)
  return { xEdges: x.edges, yEdges: y.edges, masses: mergeCells(masses, x, y) }
}

function densityPerVolume({ kinds, xEdges, yEdges }: JointHistogram, masses: Float64Array): Float64Array {
  const xVolumes = binVolumes(kinds[0], xEdges)
  const yVolumes = binVolumes(kinds[1], yEdges)
  const ny = yVolumes.length
  return masses.map((mass, cell) => mass / (xVolumes[Math.floor(cell / ny)] * yVolumes[cell % ny]))
}
