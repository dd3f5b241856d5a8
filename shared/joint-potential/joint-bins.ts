import { InvalidInputError } from '../errors'
import { jacobian as jacobianOf, type JointHistogram } from '../histogram'
import { prepareBins, type PreparedBins } from '../inversion/prepared-bins'
import type { BinGeometry } from '../smoothing'
import type { CoordinateKind } from '../units'

/** Empty bins beside the filled ones that take part in the fit: at least this many, or this share of the filled range. */
const LEAST_PAD = 4
const PAD_SHARE = 0.1

/** One axis of a joint histogram laid out for the fit. */
export interface JointAxisBins {
  readonly kind: CoordinateKind
  /** The axis by itself, with the marginal counts. */
  readonly alone: PreparedBins
  /** First bin of the fit and one past the last, counted in `alone`. */
  readonly range: readonly [first: number, end: number]
  /** The bins of the fit. */
  readonly geometry: BinGeometry
}

/** A joint histogram laid out for the fit: the filled range of both axes and a pad, whole turns for dihedrals. */
export interface JointBins {
  readonly axes: readonly [x: JointAxisBins, y: JointAxisBins]
  /** Effective counts of the cells of the fit, row-major; they add up to the number of independent samples. */
  readonly counts: Float64Array
  readonly independentSamples: number
}

/**
 * Lays a joint histogram out. Counts without a stated number of independent samples are taken as independent.
 *
 * @throws {InvalidInputError} SAMPLE_SIZE_UNKNOWN for a density or probability without a stated number: without it nothing
 *   says how much of a surface is noise, and cells without data would have no energy; TOO_FEW_BINS when fewer than 5 bins of
 *   an axis hold data; TOO_FEW_SAMPLES when counts stand for less than 1
 */
export function jointBins(joint: JointHistogram, useJacobian: boolean): JointBins {
  const { weights, content } = joint
  const total = weights.reduce((sum, weight) => sum + weight, 0)
  const independentSamples = joint.independentSamples ?? (content === 'count' ? total : null)
  if (independentSamples === null) {
    throw new InvalidInputError(
      'SAMPLE_SIZE_UNKNOWN',
      'The joint distribution holds no counts and nobody has said how many independent samples it stands for, so nothing tells its shape from noise. State the number of independent samples, or give the counts.',
      { field: 'independentSamples' },
    )
  }
  const axes = [
    axisBins(joint, 0, independentSamples, useJacobian),
    axisBins(joint, 1, independentSamples, useJacobian),
  ] as const
  const [nx, ny] = [axes[0].geometry.midpoints.length, axes[1].geometry.midpoints.length]
  const ownRows = joint.yEdges.length - 1
  const counts = Float64Array.from({ length: nx * ny }, (_, cell) => {
    const column = Math.floor(cell / ny) + axes[0].range[0] - axes[0].alone.added[0]
    const row = (cell % ny) + axes[1].range[0] - axes[1].alone.added[0]
    const inside = column >= 0 && column < joint.xEdges.length - 1 && row >= 0 && row < ownRows
    return inside ? (weights[column * ownRows + row] / total) * independentSamples : 0
  })
  return { axes, counts, independentSamples }
}

function axisBins(
  joint: JointHistogram,
  axis: 0 | 1,
  independentSamples: number,
  useJacobian: boolean,
): JointAxisBins {
  const kind = joint.kinds[axis]
  const edges = axis === 0 ? joint.xEdges : joint.yEdges
  const { content } = joint
  const marginal = { kind, edges, weights: marginalOf(joint, axis), content, independentSamples }
  const alone = prepareBins(marginal, useJacobian)
  const [first, end] = fittedRange(kind, alone)
  return {
    kind,
    alone,
    range: [first, end],
    geometry: {
      edges: alone.edges.slice(first, end + 1),
      midpoints: alone.midpoints.slice(first, end),
      volumes: alone.volumes.slice(first, end),
      jacobian: (coordinate) => (useJacobian ? jacobianOf(kind, coordinate) : 1),
      period: kind === 'dihedral' ? 2 * Math.PI : null,
      mirrored: false,
    },
  }
}

function marginalOf({ weights, xEdges, yEdges }: JointHistogram, axis: 0 | 1): Float64Array {
  const rows = yEdges.length - 1
  const marginal = new Float64Array(axis === 0 ? xEdges.length - 1 : rows)
  weights.forEach((weight, cell) => {
    marginal[axis === 0 ? Math.floor(cell / rows) : cell % rows] += weight
  })
  return marginal
}

function fittedRange(
  kind: CoordinateKind,
  { counts, filled: [first, last] }: PreparedBins,
): [number, number] {
  if (kind === 'dihedral') return [0, counts.length]
  const pad = Math.max(LEAST_PAD, Math.ceil(PAD_SHARE * (last - first + 1)))
  return [Math.max(0, first - pad), Math.min(counts.length, last + 1 + pad)]
}
