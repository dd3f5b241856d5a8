import type { Correlation, CorrelationBasins, CorrelationVerdict } from '../../shared/correlation'
import { coordinateFromInternal, type CoordinateUnit } from '../../shared/units'

/** Basins of the map against those of the product of the marginals. */
export interface BasinsJson {
  /** Number of basins of each. */
  readonly map: number
  readonly product: number
  /** kT: what they were asked at; a basin must also be deeper than twice its error. */
  readonly depth: number
  /** Basins of the map that the product lacks, and the reverse. */
  readonly mapOnly: number
  readonly productOnly: number
  /** Those of the map, lowest first; depth and error in kT, null for the lowest. */
  readonly found: readonly {
    readonly x: number
    readonly y: number
    readonly depth: number | null
    readonly error: number | null
    readonly population: number | null
    readonly inProduct: boolean
  }[]
}

/** What `correlate --json` prints; informations in nats, couplings in kT, null for "unknown". */
export interface CorrelationJson {
  readonly kinds: readonly [string, string]
  readonly units: readonly [CoordinateUnit, CoordinateUnit]
  readonly input: { readonly name: string; readonly sha256: string }
  readonly samples: number | null
  readonly independentSamples: number | null
  /** Bins of the verdict grid. */
  readonly grid: readonly [number, number]
  readonly mutualInformation: number
  readonly mutualInformationMillerMadow: number | null
  readonly mutualInformationCorrected: number | null
  readonly nullMean: number | null
  readonly pValue: number | null
  readonly totalVariation: number
  readonly pearson: number | null
  readonly spearman: number | null
  readonly largestCoupling: { readonly value: number; readonly x: number; readonly y: number } | null
  readonly basins: BasinsJson | null
  readonly verdict: CorrelationVerdict
  readonly warnings: readonly { readonly code: string; readonly message: string }[]
}

/** The JSON of a correlation. */
export function correlationJson(
  correlation: Correlation,
  units: readonly [CoordinateUnit, CoordinateUnit],
  input: { readonly name: string; readonly sha256: string },
): CorrelationJson {
  const { verdictGrid, largestCoupling: largest } = correlation
  return {
    kinds: correlation.kinds,
    units,
    input: { name: input.name, sha256: input.sha256 },
    samples: correlation.samples,
    independentSamples: correlation.independentSamples,
    grid: [verdictGrid.xEdges.length - 1, verdictGrid.yEdges.length - 1],
    mutualInformation: correlation.mutualInformation,
    mutualInformationMillerMadow: correlation.mutualInformationMillerMadow,
    mutualInformationCorrected: correlation.mutualInformationCorrected,
    nullMean: correlation.nullMean,
    pValue: correlation.pValue,
    totalVariation: correlation.totalVariation,
    pearson: correlation.pearson,
    spearman: correlation.spearman,
    largestCoupling: largest && {
      value: largest.value,
      x: coordinateFromInternal(largest.x, units[0]),
      y: coordinateFromInternal(largest.y, units[1]),
    },
    basins: correlation.basins && basinsJson(correlation.basins, units),
    verdict: correlation.verdict,
    warnings: correlation.warnings.map(({ code, message }) => ({ code, message })),
  }
}

function basinsJson(
  { map, product, depth, mapOnly, productOnly }: CorrelationBasins,
  units: readonly [CoordinateUnit, CoordinateUnit],
): BasinsJson {
  return {
    map: map.basins.length,
    product: product.basins.length,
    depth,
    mapOnly,
    productOnly,
    found: map.basins.map((basin) => ({
      x: coordinateFromInternal(basin.x, units[0]),
      y: coordinateFromInternal(basin.y, units[1]),
      depth: basin.depth,
      error: basin.deviation,
      population: basin.population,
      inProduct: basin.counterpart !== null,
    })),
  }
}
