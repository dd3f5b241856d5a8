/** Pixels of a silhouette: its box, with the base line on the last row. */
export const SILHOUETTE = { width: 62, height: 24 } as const

/**
 * The line of a silhouette in pixels. Values from 0 to 1 are spread over the width; 1 reaches two pixels below the top.
 *
 * @returns path data of the open line; empty for fewer than two values
 */
export function silhouetteLine(values: readonly number[]): string {
  if (values.length < 2) return ''
  const left = 0.5
  const step = (SILHOUETTE.width - 2 * left) / (values.length - 1)
  const base = SILHOUETTE.height - 1.5
  return values
    .map(
      (value, index) =>
        `${index === 0 ? 'M' : 'L'}${round(left + index * step)} ${round(base - value * (base - 2))}`,
    )
    .join('')
}

/** The same line closed along the base line, for the filled area. */
export function silhouetteArea(values: readonly number[]): string {
  const line = silhouetteLine(values)
  if (line === '') return ''
  const floor = SILHOUETTE.height - 0.5
  return `${line}V${floor}H0.5z`
}

const round = (pixel: number): number => Math.round(pixel * 10) / 10
