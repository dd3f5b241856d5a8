import { hypergeometric } from '../numeric/hypergeometric'
import type { Random } from '../numeric/random'

/**
 * A random table of counts with given margins, as if the pairs had been shuffled: each cell is hypergeometric given the
 * cells before it (Patefield, Appl. Stat. 30 (1981) 159). Exact, and its cost grows with the number of cells times the
 * spread of their counts instead of with the number of samples, as a shuffle would.
 *
 * @param x row sums, whole numbers; length nx
 * @param y column sums with the same total; length ny
 * @param table length nx · ny, overwritten, row-major
 */
export function fillRandomTable(random: Random, x: Float64Array, y: Float64Array, table: Float64Array): void {
  const ny = y.length
  const left = Float64Array.from(y)
  let total = y.reduce((sum, count) => sum + count, 0)
  for (let ix = 0; ix < x.length; ix++) {
    let drawn = x[ix]
    let urn = total
    for (let iy = 0; iy < ny; iy++) {
      urn -= left[iy]
      const count = drawn === 0 ? 0 : hypergeometric(random, left[iy], urn, drawn)
      table[ix * ny + iy] = count
      left[iy] -= count
      drawn -= count
    }
    total -= x[ix]
  }
}

/**
 * Margins as whole numbers with the given total, in proportion to masses: rounded down, and the rest given to the largest
 * remainders.
 *
 * @param masses not negative, with a positive sum
 * @param total whole
 * @example wholeMargins(Float64Array.of(0.5, 0.25, 0.25), 10) // 5, 3, 2
 */
export function wholeMargins(masses: Float64Array, total: number): Float64Array {
  const sum = masses.reduce((all, mass) => all + mass, 0)
  const exact = masses.map((mass) => (mass / sum) * total)
  const whole = exact.map(Math.floor)
  const missing = total - whole.reduce((all, count) => all + count, 0)
  const order = Array.from(exact.keys()).sort((a, b) => exact[b] - whole[b] - (exact[a] - whole[a]))
  for (const index of order.slice(0, missing)) whole[index]++
  return whole
}
