/** A linear map from data to pixels and back. */
export interface LinearScale {
  readonly domain: readonly [number, number]
  readonly range: readonly [number, number]
  /** Pixels of a value. */
  at(value: number): number
  /** Value under a pixel. */
  invert(pixel: number): number
}

/** Linear scale that takes `domain[0]` to `range[0]` and `domain[1]` to `range[1]`; the range may run backwards. */
export function linearScale(
  domain: readonly [number, number],
  range: readonly [number, number],
): LinearScale {
  const factor = (range[1] - range[0]) / (domain[1] - domain[0])
  return {
    domain,
    range,
    at: (value) => range[0] + (value - domain[0]) * factor,
    invert: (pixel) => domain[0] + (pixel - range[0]) / factor,
  }
}
