import type { Histogram, JointHistogram } from '../../shared/histogram'
import type { CoordinateKind } from '../../shared/units'
import type { Distribution } from '../entities/distribution.entity'
import type { JointDistribution } from '../entities/joint-distribution.entity'
import { sha256 } from './hashes'

/**
 * A stored distribution as the core takes it: it was validated by the reader when it came in.
 *
 * @param kind kind of its term
 */
export function histogramOf(kind: CoordinateKind, distribution: Distribution): Histogram {
  const { edges, weights, content, blocks, settings } = distribution
  return {
    kind,
    edges: Float64Array.from(edges),
    weights: Float64Array.from(weights),
    content,
    independentSamples: settings.independentSamples,
    blocks,
  }
}

/** A stored joint distribution as the core takes it: it was validated by the reader when it came in. */
export function jointHistogramOf(joint: JointDistribution): JointHistogram {
  const { settings, xEdges, yEdges, weights, content, independentSamples } = joint
  return {
    kinds: settings.kinds,
    xEdges: Float64Array.from(xEdges),
    yEdges: Float64Array.from(yEdges),
    weights: Float64Array.from(weights),
    content,
    independentSamples,
  }
}

/** SHA-256 of a histogram, bins and what they stand for (stated samples, blocks), and of the file it came from. */
export function contentSha256(histogram: Histogram, fileSha256: string): string {
  const { kind, edges, weights, content, independentSamples, blocks = null } = histogram
  // In the order of the contract: a database gives the keys of an object back in an order of its own.
  const measured = blocks && [blocks.kind, blocks.count, blocks.inefficiency, blocks.deviation]
  return sha256(
    JSON.stringify([kind, content, independentSamples, measured, fileSha256, [...edges], [...weights]]),
  )
}

/**
 * SHA-256 of everything an inversion rests on, settings aside. Two inversions of one hash and one setting give the same
 * numbers.
 *
 * @param temperature K
 */
export function inputSha256(contentSha256: string, temperature: number): string {
  return sha256(`${contentSha256} ${temperature} K`)
}
