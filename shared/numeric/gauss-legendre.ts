/**
 * Gauss–Legendre rule with five points on [−1, 1]; exact for polynomials up to degree 9 (Abramowitz & Stegun,
 * table 25.4). The middle point is the midpoint of the interval.
 */
export const GAUSS_LEGENDRE: readonly { readonly node: number; readonly weight: number }[] = [
  { node: -0.906179845938664, weight: 0.23692688505618908 },
  { node: -0.5384693101056831, weight: 0.47862867049936647 },
  { node: 0, weight: 0.5688888888888889 },
  { node: 0.5384693101056831, weight: 0.47862867049936647 },
  { node: 0.906179845938664, weight: 0.23692688505618908 },
]
