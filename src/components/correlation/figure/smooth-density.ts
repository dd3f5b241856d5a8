/**
 * The density per volume with every cell averaged over its neighbours, 1-2-1 along both axes, `passes` times: mass and
 * volume are averaged alike, so that a flat density stays flat up to the border. For contours, which would otherwise follow
 * the noise of single cells; the map itself is never smoothed.
 *
 * @param masses row-major, length nx · ny
 * @param volumes of the cells, same order
 */
export function smoothDensity(
  masses: ArrayLike<number>,
  volumes: ArrayLike<number>,
  nx: number,
  ny: number,
  passes: number,
): Float64Array {
  let mass = Float64Array.from(masses)
  let volume = Float64Array.from(volumes)
  for (let pass = 0; pass < passes; pass += 1) {
    mass = alongX(alongY(mass, nx, ny), nx, ny)
    volume = alongX(alongY(volume, nx, ny), nx, ny)
  }
  return mass.map((value, index) => value / volume[index])
}

function alongY(values: Float64Array, nx: number, ny: number): Float64Array<ArrayBuffer> {
  return filtered(values, nx, ny, (ix, iy) => ix * ny + iy)
}

function alongX(values: Float64Array, nx: number, ny: number): Float64Array<ArrayBuffer> {
  return filtered(values, ny, nx, (iy, ix) => ix * ny + iy)
}

/** 1-2-1 along the second index of `at`; at the ends the cell stands in for the neighbour it lacks. */
function filtered(
  values: Float64Array,
  lines: number,
  length: number,
  at: (line: number, place: number) => number,
): Float64Array<ArrayBuffer> {
  const result = new Float64Array(values.length)
  for (let line = 0; line < lines; line += 1) {
    for (let place = 0; place < length; place += 1) {
      const before = values[at(line, Math.max(0, place - 1))]
      const after = values[at(line, Math.min(length - 1, place + 1))]
      result[at(line, place)] = (before + 2 * values[at(line, place)] + after) / 4
    }
  }
  return result
}
