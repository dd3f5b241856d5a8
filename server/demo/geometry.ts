/** A point in space, nm. */
export type Point = readonly [x: number, y: number, z: number]

/** Distance of two beads, nm. */
export function distanceOf(a: Point, b: Point): number {
  return Math.hypot(b[0] - a[0], b[1] - a[1], b[2] - a[2])
}

/** Internal angle at b, rad in [0, π], by atan2, which keeps its digits near 0 and π. */
export function angleOf(a: Point, b: Point, c: Point): number {
  const u = minus(a, b)
  const v = minus(c, b)
  const n = cross(u, v)
  return Math.atan2(Math.hypot(n[0], n[1], n[2]), dot(u, v))
}

/** Dihedral a–b–c–d, rad in [−π, π): 0 is cis, looking along b→c the rear bond clockwise from the front one is positive. */
export function dihedralOf(a: Point, b: Point, c: Point, d: Point): number {
  const axis = minus(c, b)
  const front = cross(minus(b, a), axis)
  const rear = cross(axis, minus(d, c))
  const sine = dot(cross(front, rear), axis) / Math.hypot(axis[0], axis[1], axis[2])
  const angle = Math.atan2(sine, dot(front, rear))
  return angle >= Math.PI ? -Math.PI : angle
}

/** The point d with the given distance c–d, angle b–c–d and dihedral a–b–c–d; a, b and c must not lie on one line. */
export function placeBead(
  a: Point,
  b: Point,
  c: Point,
  distance: number,
  angle: number,
  dihedral: number,
): Point {
  const axis = unit(minus(c, b))
  const normal = unit(cross(minus(b, a), axis))
  const side = cross(normal, axis)
  const along = -distance * Math.cos(angle)
  const across = distance * Math.sin(angle) * Math.cos(dihedral)
  const out = distance * Math.sin(angle) * Math.sin(dihedral)
  return [
    c[0] + along * axis[0] + across * side[0] + out * normal[0],
    c[1] + along * axis[1] + across * side[1] + out * normal[1],
    c[2] + along * axis[2] + across * side[2] + out * normal[2],
  ]
}

/** Mean of points with weights that need not sum to 1. */
export function weightedMean(points: readonly Point[], weights: readonly number[]): Point {
  let x = 0
  let y = 0
  let z = 0
  let sum = 0
  points.forEach((point, i) => {
    x += weights[i] * point[0]
    y += weights[i] * point[1]
    z += weights[i] * point[2]
    sum += weights[i]
  })
  return [x / sum, y / sum, z / sum]
}

function minus(a: Point, b: Point): Point {
  return [a[0] - b[0], a[1] - b[1], a[2] - b[2]]
}

function cross(a: Point, b: Point): Point {
  return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]]
}

function dot(a: Point, b: Point): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2]
}

function unit(a: Point): Point {
  const length = Math.hypot(a[0], a[1], a[2])
  return [a[0] / length, a[1] / length, a[2] / length]
}
