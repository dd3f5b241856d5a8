import type { CoordinateKind } from '../units'
import type { PreparedBins } from './prepared-bins'
import type { Warning } from './warning'
import { extentWords, placeWords } from './warning-words'

/** Filled bins whose widths differ by more than this factor do not show the same detail everywhere. */
const UNEQUAL = 4
/** A peak stands alone in its bin when it is this many kT deeper than both neighbours: a well narrower than its bin. */
const LONE_DEPTH = { counted: 1, uncounted: 1.5 }
/** Fewest counts of such a bin, or its least share where nothing was counted. */
const LONE_COUNTS = 30
const LONE_SHARE = 0.05
/** The peak must stand out from noise by this many standard deviations. */
const LONE_DEVIATIONS = 4

/** Doubts about the bins: some much wider than others, wells narrower than a bin. */
export function binWarnings(kind: CoordinateKind, bins: PreparedBins): Warning[] {
  return [...unequalBins(kind, bins), ...wideBins(kind, bins)]
}

function unequalBins(kind: CoordinateKind, { counts, edges }: PreparedBins): Warning[] {
  const widths = [...counts.keys()]
    .filter((bin) => counts[bin] > 0)
    .map((bin) => edges[bin + 1] - edges[bin])
    .sort((one, other) => one - other)
  const [narrowest, widest] = [widths[0], widths[widths.length - 1]]
  if (widest <= UNEQUAL * narrowest) return []
  return [
    {
      code: 'BINS_UNEQUAL',
      message: `The bins that hold data are between ${extentWords(kind, narrowest)} and ${extentWords(kind, widest)} wide: what is narrower than a wide bin is lost there.`,
      action: 'Bin the distribution in equal bins if the samples are at hand.',
    },
  ]
}

function wideBins(kind: CoordinateKind, bins: PreparedBins): Warning[] {
  const { edges, midpoints } = bins
  const lone = [...midpoints.keys()].filter((bin) => standsAlone(kind, bins, bin))
  if (lone.length === 0) return []
  const [bin] = lone
  return [
    {
      code: 'BINS_TOO_WIDE',
      message: `The well at ${placeWords(kind, midpoints[bin])} is narrower than its bin of ${extentWords(kind, edges[bin + 1] - edges[bin])}: its width, its depth and whether it is one well or two are not resolved.`,
      action: 'Use bins of at most half the width, or bin the samples again.',
    },
  ]
}

/** Whether the density of a bin exceeds those of both neighbours by far more than noise. */
function standsAlone(kind: CoordinateKind, bins: PreparedBins, bin: number): boolean {
  const { counts, volumes, independentSamples } = bins
  const counted = independentSamples !== null
  if (counts[bin] < (counted ? LONE_COUNTS : LONE_SHARE)) return false
  const neighbours = neighboursOf(kind, bins, bin)
  if (neighbours === null) return false
  return neighbours.every((neighbour) => {
    // The counts this bin would hold at the density of its neighbour.
    const share = volumes[bin] / volumes[neighbour]
    const level = counts[neighbour] * share
    if (!counted) return counts[bin] > level * Math.exp(LONE_DEPTH.uncounted)
    const noise = Math.sqrt(counts[bin] + level * share)
    return counts[bin] > level * Math.exp(LONE_DEPTH.counted) && counts[bin] - level > LONE_DEVIATIONS * noise
  })
}

/** Bins beside a bin, around the turn; null at an end, where one side is unknown. */
function neighboursOf(kind: CoordinateKind, { counts }: PreparedBins, bin: number): number[] | null {
  const last = counts.length - 1
  if (kind === 'dihedral') return [(bin + last) % (last + 1), (bin + 1) % (last + 1)]
  return bin === 0 || bin === last ? null : [bin - 1, bin + 1]
}
