const AROUND = 2

/**
 * Rows of a table worth a look: the first, the last, and the one nearest to the reading with two on each side. Without a
 * reading the middle of the table takes its place.
 *
 * @param coordinates ascending
 * @param reading in the unit of the coordinates
 * @returns ascending row numbers from 0, each once
 */
export function previewRows(coordinates: ArrayLike<number>, reading: number | null): number[] {
  const last = coordinates.length - 1
  const low = coordinates[0]
  const share = reading === null ? 0.5 : (reading - low) / (coordinates[last] - low)
  const centre = Math.min(last, Math.max(0, Math.round(share * last)))
  const rows = new Set([0, last])
  for (let row = Math.max(0, centre - AROUND); row <= Math.min(last, centre + AROUND); row += 1) rows.add(row)
  return [...rows].sort((one, other) => one - other)
}
