/**
 * Statistical inefficiency g of a histogram from the scatter between independent chains: the count-weighted mean, over
 * bins, of the variance between chains over the multinomial variance. It holds everything that makes samples of one
 * chain alike: slow turns, stereo centres that never change, places that share an angle.
 *
 * @param perChain counts, one row per chain, all chains with the same number of samples
 * @returns g, at least 1, since a sample never stands for more than itself
 */
export function inefficiencyBetweenChains(perChain: readonly Float64Array[]): number {
  const chains = perChain.length
  const bins = perChain[0].length
  const samples = perChain[0].reduce((sum, count) => sum + count, 0)
  let ratio = 0
  for (let bin = 0; bin < bins; bin++) {
    const mean = perChain.reduce((sum, row) => sum + row[bin], 0) / chains
    if (mean === 0) continue
    const between = perChain.reduce((sum, row) => sum + (row[bin] - mean) ** 2, 0) / (chains - 1)
    ratio += (mean / samples) * (between / (mean * (1 - mean / samples)))
  }
  return Math.max(1, ratio)
}
