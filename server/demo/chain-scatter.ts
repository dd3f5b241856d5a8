/** Bins across the data in which the scatter is judged, per coordinate. */
const JUDGED_BINS = 16

/**
 * Statistical inefficiency g of a histogram from the scatter between independent chains: the count-weighted mean, over
 * bins, of the variance between chains over the multinomial variance. It holds everything that makes samples of one chain
 * alike: slow turns, stereo centres that never change, places that share an angle.
 *
 * The bins are merged to about sixteen across the data: the count of a narrow bin forgets itself much faster than the
 * shape of the curve does, and it is the shape that a potential is made from.
 *
 * @param perChain counts, one row per chain, all chains with the same number of samples
 * @param columns for a joint histogram, the number of bins of the second coordinate (row-major); else 1
 * @returns g, at least 1, since a sample never stands for more than itself
 */
export function inefficiencyBetweenChains(perChain: readonly Float64Array[], columns = 1): number {
  const rows = mergedRows(perChain, columns)
  const chains = rows.length
  const samples = rows[0].reduce((sum, count) => sum + count, 0)
  let ratio = 0
  for (let bin = 0; bin < rows[0].length; bin++) {
    const mean = rows.reduce((sum, row) => sum + row[bin], 0) / chains
    if (mean === 0) continue
    const between = rows.reduce((sum, row) => sum + (row[bin] - mean) ** 2, 0) / (chains - 1)
    ratio += (mean / samples) * (between / (mean * (1 - mean / samples)))
  }
  return Math.max(1, ratio)
}

/** Rows on the merged bins of both coordinates. */
function mergedRows(perChain: readonly Float64Array[], columns: number): Float64Array[] {
  const filled = [...perChain[0].keys()].filter((index) => perChain.some((row) => row[index] > 0))
  const first = mergedBins(filled.map((index) => Math.floor(index / columns)))
  const second = mergedBins(filled.map((index) => index % columns))
  return perChain.map((row) => {
    const merged = new Float64Array(JUDGED_BINS * JUDGED_BINS)
    for (const index of filled) {
      merged[first(Math.floor(index / columns)) * JUDGED_BINS + second(index % columns)] += row[index]
    }
    return merged
  })
}

/** Where each bin goes when those that hold something are merged to sixteen of equal width. */
function mergedBins(filled: readonly number[]): (bin: number) => number {
  const low = filled.reduce((least, bin) => Math.min(least, bin), Infinity)
  const high = filled.reduce((most, bin) => Math.max(most, bin), 0)
  const width = Math.ceil((high + 1 - low) / JUDGED_BINS)
  return (bin) => Math.floor((bin - low) / width)
}
