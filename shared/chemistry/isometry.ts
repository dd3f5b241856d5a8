/** A point of a drawing; y points down, as on a screen. */
export interface Point {
  readonly x: number
  readonly y: number
}

/** A motion of the plane that keeps lengths: x′ = a·x + c·y + e, y′ = b·x + d·y + f (the order of an SVG matrix). */
export interface Isometry {
  readonly a: number
  readonly b: number
  readonly c: number
  readonly d: number
  readonly e: number
  readonly f: number
}

/**
 * Moves a point.
 *
 * @example moved({ a: 1, b: 0, c: 0, d: 1, e: 2, f: 0 }, { x: 1, y: 1 }) // { x: 3, y: 1 }
 */
export function moved({ a, b, c, d, e, f }: Isometry, { x, y }: Point): Point {
  return { x: a * x + c * y + e, y: b * x + d * y + f }
}

/** The motion that takes back another; its linear part is orthogonal, so its transpose inverts it. */
export function inverse({ a, b, c, d, e, f }: Isometry): Isometry {
  return { a, b: c, c: b, d, e: -(a * e + b * f), f: -(c * e + d * f) }
}

/**
 * The motion that turns by an angle, or mirrors in the line through the origin at half that angle, and takes one point to
 * another.
 *
 * @param angle rad
 */
export function motion(angle: number, mirrored: boolean, from: Point, to: Point): Isometry {
  const [cos, sin] = [Math.cos(angle), Math.sin(angle)]
  const linear = mirrored
    ? { a: cos, b: sin, c: sin, d: -cos, e: 0, f: 0 }
    : { a: cos, b: sin, c: -sin, d: cos, e: 0, f: 0 }
  const { x, y } = moved(linear, from)
  return { ...linear, e: to.x - x, f: to.y - y }
}
