/** A cell is averaged with its neighbours until they hold this many independent samples: an error of a half. */
export const SAMPLES_AVERAGED = 4

/** The square of neighbours grows to this many cells on either side at most. */
const LARGEST_REACH = 4

/**
 * Density per volume, each cell averaged over the smallest square of cells around it that holds four independent samples:
 * mass over volume. Where cells hold that many themselves nothing is averaged. It keeps a single count in a tiny volume, as
 * near 180°, from outshining everything.
 *
 * @param masses row-major, length nx · ny, sum 1
 * @param volumes of the cells, same order
 * @param independentSamples null when nobody stated it: then nothing is averaged
 */
export function adaptiveDensity(
  masses: ArrayLike<number>,
  volumes: ArrayLike<number>,
  nx: number,
  ny: number,
  independentSamples: number | null,
): Float64Array {
  const least = independentSamples === null ? 0 : SAMPLES_AVERAGED / independentSamples
  const mass = summedArea(masses, nx, ny)
  const volume = summedArea(volumes, nx, ny)
  const density = new Float64Array(nx * ny)
  for (let ix = 0; ix < nx; ix += 1) {
    for (let iy = 0; iy < ny; iy += 1) {
      const index = ix * ny + iy
      if (masses[index] >= least) {
        density[index] = masses[index] / volumes[index]
        continue
      }
      let reach = 1
      let held = mass(ix, iy, reach)
      while (held < least && reach < LARGEST_REACH) {
        reach += 1
        held = mass(ix, iy, reach)
      }
      density[index] = held / volume(ix, iy, reach)
    }
  }
  return density
}

/** Sums over squares of cells, from one table of sums from the corner. */
function summedArea(values: ArrayLike<number>, nx: number, ny: number) {
  const table = new Float64Array((nx + 1) * (ny + 1))
  for (let ix = 0; ix < nx; ix += 1) {
    let column = 0
    for (let iy = 0; iy < ny; iy += 1) {
      column += values[ix * ny + iy]
      table[(ix + 1) * (ny + 1) + iy + 1] = table[ix * (ny + 1) + iy + 1] + column
    }
  }
  return (ix: number, iy: number, reach: number): number => {
    const [left, right] = [Math.max(0, ix - reach), Math.min(nx, ix + reach + 1)]
    const [low, high] = [Math.max(0, iy - reach), Math.min(ny, iy + reach + 1)]
    const at = (x: number, y: number) => table[x * (ny + 1) + y]
    // Differences of sums may leave a trace of rounding where nothing is.
    return Math.max(0, at(right, high) - at(left, high) - at(right, low) + at(left, low))
  }
}
