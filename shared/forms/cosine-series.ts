import { cosinePowersFromSeries } from './cosine-conversion'
import { type FormDefinition, type FormSolution, parameterName } from './form-definition'
import type { LikelihoodCells } from './likelihood-cells'
import { linearShape } from './linear-shape'
import { solveForm } from './solve-form'

const SERIES_TERMS = { least: 1, most: 6, patience: null }
/** The published form ends with the fifth power. */
const POWER_TERMS = { least: 1, most: 5, patience: null }
const SCANNED = 256
const NARROWINGS = 60

/** U = k1 (1 + cos φ) + k2 (1 + cos 2φ) + … for a dihedral; k_n of either sign. Linear in β = −k/kT. */
export const cosineSeries: FormDefinition = {
  form: 'cosine-series',
  kinds: ['dihedral'],
  terms: SERIES_TERMS,
  formula: (_, terms) => `U = ${listed(terms, (n) => `k${n} (1 + cos ${multiple(n)})`)}`,
  parameters: (_, terms) => numbers(terms).map((n) => parameterName(`k${n}`, 1, 0)),
  freeParameters: (terms) => terms,
  energy: (values, coordinate) =>
    values.reduce((sum, k, index) => sum + k * (1 + Math.cos((index + 1) * coordinate)), 0),
  fit: (cells, terms, smaller) =>
    solveForm(cells, cosineShape(cells, terms), extended(smaller, terms), (beta) =>
      Array.from(beta, (value) => -cells.kT * value),
    ),
}

/**
 * U = C0 + C1 cos ψ + C2 cos² ψ + …, ψ = φ − 180° (Ryckaert & Bellemans, Chem. Phys. Lett. 30 (1975) 123): the cosine
 * series of as many terms in other words, with the same likelihood. C0 makes the least value 0.
 */
export const cosinePowers: FormDefinition = {
  form: 'cosine-powers',
  kinds: ['dihedral'],
  terms: POWER_TERMS,
  formula: (_, terms) =>
    `U = C0 + ${listed(terms, (n) => `C${n} cos${SUPERSCRIPTS[n]} ψ`)} with ψ = φ − 180°`,
  parameters: (_, terms) => [0, ...numbers(terms)].map((n) => parameterName(`C${n}`, 1, 0)),
  freeParameters: (terms) => terms,
  energy: (values, coordinate) => powerSum(values, -Math.cos(coordinate)),
  fit: (cells, terms, smaller) =>
    solveForm(cells, cosineShape(cells, terms), extended(smaller, terms), (beta) => {
      const [constant, ...rest] = cosinePowersFromSeries([0, ...beta].map((value) => -cells.kT * value))
      return [constant - leastOnTurn([constant, ...rest]), ...rest]
    }),
}

/** U = k1 [1 + cos(φ − δ1)] + k2 [1 + cos(2φ − δ2)] + … with k_n ≥ 0, for a dihedral that is not symmetric. */
export const cosineSeriesPhases: FormDefinition = {
  form: 'cosine-series-phases',
  kinds: ['dihedral'],
  terms: SERIES_TERMS,
  formula: (_, terms) => `U = ${listed(terms, (n) => `k${n} [1 + cos(${multiple(n)} − δ${n})]`)}`,
  parameters: (_, terms) =>
    numbers(terms).flatMap((n) => [parameterName(`k${n}`, 1, 0), parameterName(`δ${n}`, 0, 1)]),
  freeParameters: (terms) => 2 * terms,
  energy: (values, coordinate) => {
    let sum = 0
    for (let n = 1; 2 * n <= values.length; n++) {
      sum += values[2 * n - 2] * (1 + Math.cos(n * coordinate - values[2 * n - 1]))
    }
    return sum
  },
  fit: (cells, terms, smaller) => {
    const features = numbers(terms).flatMap((n) => [
      (q: number) => Math.cos(n * q),
      (q: number) => Math.sin(n * q),
    ])
    const shape = linearShape(cells.points, features)
    const solution = solveForm(cells, shape, extended(smaller, 2 * terms), (beta) =>
      amplitudes(beta, cells.kT),
    )
    return solution
  },
}

function cosineShape({ points }: LikelihoodCells, terms: number) {
  return linearShape(
    points,
    numbers(terms).map((n) => (q) => Math.cos(n * q)),
  )
}

/** From a cos nφ + b sin nφ to k ≥ 0 and δ in (−π, π]. */
function amplitudes(beta: Float64Array, kT: number): number[] {
  const values: number[] = []
  for (let index = 0; index < beta.length; index += 2) {
    const [a, b] = [-kT * beta[index], -kT * beta[index + 1]]
    values.push(Math.hypot(a, b), Math.atan2(b, a))
  }
  return values
}

/** β of the fit with fewer terms, filled up with zeros. */
function extended(smaller: FormSolution | null, size: number): Float64Array {
  const start = new Float64Array(size)
  if (smaller !== null) start.set(smaller.maximum.beta)
  return start
}

/** Least value of Σ C_n cⁿ over c in [−1, 1]: scanned along the turn, then narrowed by golden sections. */
function leastOnTurn(powers: readonly number[]): number {
  const value = (angle: number) => powerSum(powers, Math.cos(angle))
  let best = 0
  for (let index = 1; index <= SCANNED; index++) {
    if (value((index * Math.PI) / SCANNED) < value((best * Math.PI) / SCANNED)) best = index
  }
  let [low, high] = [best - 1, best + 1].map((index) => (index * Math.PI) / SCANNED)
  const golden = (Math.sqrt(5) - 1) / 2
  for (let step = 0; step < NARROWINGS; step++) {
    const width = golden * (high - low)
    if (value(high - width) < value(low + width)) high = low + width
    else low = high - width
  }
  return Math.min(value((low + high) / 2), value(0), value(Math.PI))
}

function powerSum(powers: readonly number[], cosine: number): number {
  return powers.reduceRight((sum, coefficient) => sum * cosine + coefficient, 0)
}

const SUPERSCRIPTS = ['', '', '²', '³', '⁴', '⁵']

const numbers = (count: number) => Array.from({ length: count }, (_, index) => index + 1)
const listed = (terms: number, term: (n: number) => string) => numbers(terms).map(term).join(' + ')
const multiple = (n: number) => (n === 1 ? 'φ' : `${n}φ`)
