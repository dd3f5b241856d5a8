/** Bins across the data in which the scatter is judged. */
const JUDGED_BINS = 16

/**
 * Statistical inefficiency g of a histogram from the scatter between independent chains: the count-weighted mean, over
 * bins, of the variance between chains over the multinomial variance. It holds everything that makes samples of one
 * chain alike: slow turns, stereo centres that never change, places that share an angle.
 * The bins are merged to about sixteen across the data: the count of a narrow bin forgets itself much faster than the
 * shape of the curve does, and it is the shape that a potential is made from.
 *
 * @param perChain counts, one row per chain, all chains with the same number of samples
 * @returns g, at least 1, since a sample never stands for more than itself
 */
export function inefficiencyBetweenChains(perChain: readonly Float64Array[]): number {
  const rows = mergedRows(perChain)
  const chains = rows.length
  const bins = rows[0].length
  const samples = rows[0].reduce((sum, count) => sum + count, 0)
  let ratio = 0
  for (let bin = 0; bin < bins; bin++) {
    const mean = rows.reduce((sum, row) => sum + row[bin], 0) / chains
    if (mean === 0) continue
    const between = rows.reduce((sum, row) => sum + (row[bin] - mean) ** 2, 0) / (chains - 1)
    ratio += (mean / samples) * (between / (mean * (1 - mean / samples)))
  }
  return Math.max(1, ratio)
}

function mergedRows(perChain: readonly Float64Array[]): Float64Array[] {
  const holds = (bin: number) => perChain.some((row) => row[bin] > 0)
  const bins = [...perChain[0].keys()].filter(holds)
  const first = bins[0]
  const width = Math.ceil((bins[bins.length - 1] + 1 - first) / JUDGED_BINS)
  return perChain.map((row) => {
    const merged = new Float64Array(JUDGED_BINS)
    for (const bin of bins) merged[Math.floor((bin - first) / width)] += row[bin]
    return merged
  })
}
