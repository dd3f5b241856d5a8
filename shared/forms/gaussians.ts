import { COORDINATE_SYMBOLS, type FormDefinition, type FormSolution, parameterName } from './form-definition'
import type { MixtureComponent } from './expectation-maximisation'
import { mixtureStarts } from './gaussian-starts'
import { gaussianShape } from './gaussian-shape'
import { type LikelihoodCells, mergeCells } from './likelihood-cells'
import { type Maximum, maximiseLikelihood } from './maximise-likelihood'
import { RefusedForm } from './refused-form'
import { solutionAt } from './solve-form'

const MOST_GAUSSIANS = 4
/** Starts are compared after some steps on at most this many bins; the best goes on, until less is left to gain in ln L. */
const COARSE_BINS = 90
const FIRST_STEPS = 24
const COARSE_GAIN = 0.02
const COARSE_STEPS = 12
/** Gains are per sample of at least so many, also where their number is unknown. */
const LEAST_SAMPLES = 10_000
/**
 * A fit has arrived when less than this is left to gain in log-likelihood. Gaussians that the data hardly tell apart come
 * closer very slowly, by shares of standard errors that are huge then; well-separated ones arrive to the last digit.
 */
const ARRIVED_GAIN = 0.05
const FINAL = { decrement: 1e-16, mostSteps: 30 }
/** A fit that has not arrived, but gained more in ln L than its three new parameters may by chance, gets more time. */
const WORTH_WAITING = 6
const PATIENT = { decrement: 1e-16, mostSteps: 300 }
/** A Gaussian whose s is below this many bins describes single bins, not a state. */
const LEAST_WIDTH = 1

/**
 * p/J as a sum of Gaussians (Milano, Goudeau, Müller-Plathe, J. Polym. Sci. B 43 (2005) 871): U = −kT ln Σ (w/s)
 * exp[−(q − c)²/(2s²)] for a bond or an angle, with shares w that add up to 1 and s the standard deviation of each. Fitted
 * in centres, ln s and ln(w/w1) from several starts; Gaussians are numbered by their centres. One Gaussian is the harmonic
 * form with k = kT/s².
 */
export const gaussians: FormDefinition = {
  form: 'gaussians',
  kinds: ['bond', 'angle'],
  terms: { least: 1, most: MOST_GAUSSIANS, patience: 2 },
  formula: (kind, terms) => {
    const q = COORDINATE_SYMBOLS[kind]
    const one = (n: number) => `(w${n}/s${n}) exp[−(${q} − c${n})²/(2 s${n}²)]`
    return `U = −kT ln{${Array.from({ length: terms }, (_, index) => one(index + 1)).join(' + ')}}`
  },
  parameters: (_, terms) =>
    Array.from({ length: terms }, (_, index) => [
      parameterName(`w${index + 1}`, 0, 0),
      parameterName(`c${index + 1}`, 0, 1),
      parameterName(`s${index + 1}`, 0, 1),
    ]).flat(),
  freeParameters: (terms) => 3 * terms - 1,
  energy: gaussianEnergy,
  fit: (cells, terms, smaller) => {
    const samples = Math.max(LEAST_SAMPLES, cells.independentSamples ?? 0)
    const shape = gaussianShape(cells, terms)
    const hasArrived = ({ decrement }: Maximum) => decrement * samples < ARRIVED_GAIN
    let maximum = maximiseLikelihood(cells, shape, bestStart(cells, terms, smaller), FINAL)
    const gain = samples * (maximum.value - (smaller?.maximum.value ?? -Infinity))
    if (!hasArrived(maximum) && gain > WORTH_WAITING) {
      maximum = maximiseLikelihood(cells, shape, maximum.beta, PATIENT)
    }
    if (!hasArrived(maximum)) {
      throw new RefusedForm('NOT_CONVERGED', `The fit of ${terms} Gaussians does not settle.`)
    }
    const solution = solutionAt(maximum, (beta) => naturalOf(beta, cells, terms))
    refuseEmptyOrNarrow(solution, cells)
    return solution
  },
}

/** β of the best start, improved on coarse bins. */
function bestStart(cells: LikelihoodCells, terms: number, smaller: FormSolution | null): Float64Array {
  const coarse = mergeCells(cells, COARSE_BINS)
  const shape = gaussianShape(coarse, terms)
  const decrement = COARSE_GAIN / Math.max(LEAST_SAMPLES, cells.independentSamples ?? 0)
  const improved = (start: Float64Array, mostSteps: number) =>
    maximiseLikelihood(coarse, shape, start, { decrement, mostSteps })
  const first = mixtureStarts(coarse, terms, smaller && components(smaller, coarse))
    .map((start) => improved(start, FIRST_STEPS))
    .reduce((one, other) => (other.value > one.value ? other : one))
  const best = improved(first.beta, COARSE_STEPS)
  // The scale of β is that of the cells' own mean and deviation.
  const ratio = coarse.deviation / cells.deviation
  const shift = (coarse.mean - cells.mean) / cells.deviation
  return best.beta.map((value, j) => {
    if (j < terms) return value * ratio + shift
    return j < 2 * terms ? value + Math.log(ratio) : value
  })
}

/** −kT ln Σ, the largest exponent taken out, so that it is finite however far out. */
function gaussianEnergy(values: readonly number[], coordinate: number, kT: number): number {
  let top = -Infinity
  for (let n = 0; n < values.length; n += 3) top = Math.max(top, exponent(values, n, coordinate))
  let sum = 0
  for (let n = 0; n < values.length; n += 3) sum += Math.exp(exponent(values, n, coordinate) - top)
  return -kT * (top + Math.log(sum))
}

function exponent(values: readonly number[], n: number, coordinate: number): number {
  const [weight, centre, width] = [values[n], values[n + 1], values[n + 2]]
  return Math.log(weight / width) - (coordinate - centre) ** 2 / (2 * width * width)
}

/** w, c, s of each Gaussian by ascending centres. */
function naturalOf(beta: Float64Array, { mean, deviation }: LikelihoodCells, terms: number): number[] {
  const logs = Array.from({ length: terms }, (_, n) => (n === 0 ? 0 : beta[2 * terms + n - 1]))
  const top = Math.max(...logs)
  const sum = logs.reduce((all, log) => all + Math.exp(log - top), 0)
  return logs
    .map((log, n) => [
      Math.exp(log - top) / sum,
      mean + deviation * beta[n],
      deviation * Math.exp(beta[terms + n]),
    ])
    .sort(([, one], [, other]) => one - other)
    .flat()
}

function components({ values }: FormSolution, { mean, deviation }: LikelihoodCells): MixtureComponent[] {
  return Array.from({ length: values.length / 3 }, (_, n) => ({
    weight: values[3 * n],
    centre: (values[3 * n + 1] - mean) / deviation,
    width: values[3 * n + 2] / deviation,
  }))
}

function refuseEmptyOrNarrow({ values }: FormSolution, { edges }: LikelihoodCells): void {
  const least = (LEAST_WIDTH * (edges[edges.length - 1] - edges[0])) / (edges.length - 1)
  for (let n = 0; n < values.length; n += 3) {
    if (values[n + 2] >= least) continue
    throw new RefusedForm('DEGENERATE', 'One Gaussian shrinks into a single bin: there are too many of them.')
  }
}
