import type { BinContent } from '../histogram/histogram'

/**
 * Merges the first and the last row of a row-major grid, which are one bin a full turn apart, into the first. Equal rows
 * are one row written twice; different ones are the two halves of the bin.
 *
 * @param cells counts or masses (a density times its area), changed in place
 * @param ny cells in a row
 */
export function mergeDoubledRows(cells: Float64Array, ny: number, content: BinContent): void {
  const last = cells.length - ny
  merge(cells, ny, content, (index) => [index, last + index])
}

/** As `mergeDoubledRows`, for the first and the last column. */
export function mergeDoubledColumns(cells: Float64Array, ny: number, content: BinContent): void {
  merge(cells, cells.length / ny, content, (index) => [index * ny, index * ny + ny - 1])
}

function merge(
  cells: Float64Array,
  count: number,
  content: BinContent,
  pair: (index: number) => [number, number],
): void {
  const indices = Array.from({ length: count }, (_, index) => pair(index))
  if (indices.every(([first, last]) => cells[first] === cells[last])) return
  // Each density stands for half the bin, whose whole width it was multiplied by.
  const factor = content === 'density' ? 0.5 : 1
  for (const [first, last] of indices) cells[first] = factor * (cells[first] + cells[last])
}
