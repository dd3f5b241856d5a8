/** A potential of one coordinate in internal units (nm or rad, kJ/mol), with the volume element of its kind. */
export interface AnalyticTerm {
  readonly energy: (coordinate: number) => number
  readonly jacobian: (coordinate: number) => number
}

const STEPS = 64

/** ∫ J exp(−U/kT) dq over a bin, by the midpoint rule on 64 steps. */
function binIntegral({ energy, jacobian }: AnalyticTerm, kT: number, low: number, high: number): number {
  const step = (high - low) / STEPS
  let sum = 0
  for (let index = 0; index < STEPS; index++) {
    const coordinate = low + (index + 0.5) * step
    sum += jacobian(coordinate) * Math.exp(-energy(coordinate) / kT)
  }
  return sum * step
}

/** Expected counts of `total` samples in the given bins. */
export function expectedCounts(
  term: AnalyticTerm,
  kT: number,
  edges: readonly number[],
  total: number,
): number[] {
  const masses = edges.slice(1).map((high, bin) => binIntegral(term, kT, edges[bin], high))
  const sum = masses.reduce((all, mass) => all + mass, 0)
  return masses.map((mass) => (total * mass) / sum)
}

/** `bins` + 1 equally spaced edges. */
export function equalEdges(low: number, high: number, bins: number): number[] {
  return Array.from({ length: bins + 1 }, (_, edge) => low + ((high - low) * edge) / bins)
}

/** Rows of a downloaded table: coordinate, energy, force. */
export function tableRowsOf(text: string): number[][] {
  return text
    .split('\n')
    .filter((line) => line !== '' && !line.startsWith('#'))
    .map((line) => line.trim().split(/\s+/).map(Number))
}

/**
 * The largest distance, in kT, between a table and the potential it was made from, both with least value 0, where the
 * probability density is above 1 % of its peak.
 *
 * @param rows coordinate in internal units and energy in kJ/mol
 */
export function largestDeviation(
  { energy, jacobian }: AnalyticTerm,
  kT: number,
  rows: readonly (readonly [number, number])[],
): { readonly deviation: number; readonly rows: number } {
  const exact = rows.map(([coordinate]) => energy(coordinate))
  const least = Math.min(...exact)
  const densities = rows.map(([coordinate], row) => jacobian(coordinate) * Math.exp(-exact[row] / kT))
  const peak = Math.max(...densities)
  const judged = rows.flatMap(([, tabulated], row) =>
    densities[row] > 0.01 * peak ? [Math.abs(tabulated - (exact[row] - least)) / kT] : [],
  )
  return { deviation: Math.max(...judged), rows: judged.length }
}
