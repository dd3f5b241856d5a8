import { expect, it, vi } from 'vitest'
import { InvalidInputError } from '@shared/errors'
import { type BinContent, type CoordinateKind, createHistogram, type HistogramInput } from '@shared/histogram'
import {
  DEFAULT_INVERSION_SETTINGS,
  invert,
  type InversionSettings,
  type SmoothingSettings,
} from '@shared/inversion'
import { createRandom, type Random } from '@shared/numeric'
import { makeTable } from '@shared/tables'

const CASES = 10_000
/**
 * Most banded systems one inversion may solve, one for each Newton step: the worst of these cases takes about 600. A
 * limit on steps finds what never ends on any machine, where a clock would not.
 */
const MOST_STEPS = 2000

const steps = vi.hoisted(() => ({ taken: 0, limit: Infinity }))

vi.mock(import('@shared/numeric'), async (original) => {
  const numeric = await original()
  return {
    ...numeric,
    bandedSolve: (...input: Parameters<typeof numeric.bandedSolve>) => {
      steps.taken += 1
      if (steps.taken > steps.limit) throw new Error(`More than ${steps.limit} steps`)
      return numeric.bandedSolve(...input)
    },
  }
})

const KINDS: readonly CoordinateKind[] = ['bond', 'angle', 'dihedral']
const CONTENTS: readonly BinContent[] = ['count', 'count', 'count', 'density', 'probability']

const pick = <T>(random: Random, choices: readonly T[]): T => choices[random.integer(choices.length)]
const between = (random: Random, low: number, high: number): number => low + (high - low) * random.uniform()

/** Equal or ragged bins inside the domain, up to its ends or not; now and then beyond it, or out of order. */
function edgesFrom(random: Random, kind: CoordinateKind): number[] {
  const bins = 1 + random.integer(60)
  const ragged = random.uniform() < 0.5
  const widths = Array.from({ length: bins }, () => (ragged ? 10 ** between(random, -2, 0) : 1))
  const total = widths.reduce((sum, width) => sum + width, 0)
  const [least, most] = kind === 'bond' ? [0, 2] : kind === 'angle' ? [0, Math.PI] : [-Math.PI, Math.PI]
  const low = random.uniform() < 0.4 ? least : between(random, least - 0.01, most)
  const high = random.uniform() < 0.4 ? most : between(random, low, most + 0.01)
  let sum = 0
  return [low, ...widths.map((width) => low + ((high - low) * (sum += width)) / total)]
}

function weightsFrom(random: Random, bins: number): number[] {
  const draw = pick<() => number>(random, [
    () => random.integer(30),
    () => (random.uniform() < 0.8 ? 0 : random.integer(1000)),
    () => 10 ** between(random, -12, 9),
    () => random.poisson(10 ** between(random, -2, 5)),
    () => (random.uniform() < 0.02 ? -1 : between(random, 0, 3)),
    () => (random.uniform() < 0.01 ? NaN : 1e6),
  ])
  const bell = random.uniform() < 0.3 ? between(random, 0.01, 0.5) : null
  return Array.from({ length: bins }, (_, bin) =>
    bell === null ? draw() : Math.round(1e5 * Math.exp(-0.5 * ((bin / bins - 0.5) / bell) ** 2)),
  )
}

function histogramFrom(random: Random): HistogramInput {
  const kind = pick(random, KINDS)
  const edges = edgesFrom(random, kind)
  const independentSamples = random.uniform() < 0.3 ? 10 ** between(random, -1, 6) : null
  const weights = weightsFrom(random, edges.length - 1)
  return { kind, edges, weights, content: pick(random, CONTENTS), independentSamples }
}

function settingsFrom(random: Random): InversionSettings {
  const smoothing = pick<SmoothingSettings>(random, [
    DEFAULT_INVERSION_SETTINGS.smoothing,
    { mode: 'auto', criterion: 'aic' },
    { mode: 'off' },
    { mode: 'manual', log10Lambda: between(random, -6, 30) },
  ])
  const maybe = (low: number, high: number) => (random.uniform() < 0.7 ? null : between(random, low, high))
  return {
    ...DEFAULT_INVERSION_SETTINGS,
    jacobian: random.uniform() < 0.7,
    smoothing,
    inefficiency: maybe(1, 100),
    straightAngle: pick(random, ['free', 'level']),
    tails: { stiffness: between(random, 0.05, 20) },
    table: { rows: 2 + random.integer(300), low: maybe(-0.1, 1), high: maybe(0.5, 3.2), cap: maybe(-1, 100) },
  }
}

it('gives a finite table or a named error for any bins, counts and settings, in few steps', () => {
  const broken: string[] = []
  const outcomes = { table: 0, refused: 0 }
  for (let seed = 0; seed < CASES; seed++) {
    const random = createRandom(seed)
    const input = histogramFrom(random)
    const settings = settingsFrom(random)
    Object.assign(steps, { taken: 0, limit: MOST_STEPS })
    try {
      const inversion = invert(createHistogram(input), between(random, 1, 1000), settings)
      const { energies, forces } = makeTable(inversion.potential, settings.table)
      const { knots, energies: levels, curvatures } = inversion.potential
      for (const values of [energies, forces, knots, levels, curvatures, inversion.regenerated]) {
        if (!values.every(Number.isFinite)) broken.push(`seed ${seed}: a number that is not finite`)
      }
      if (inversion.bins.deviations?.includes(Infinity)) broken.push(`seed ${seed}: an endless band`)
      const words = inversion.warnings.map(({ message, action }) => message + action).join()
      if (/NaN|Infinity|undefined/.test(words)) broken.push(`seed ${seed}: ${words}`)
      outcomes.table += 1
    } catch (error) {
      if (!(error instanceof InvalidInputError)) broken.push(`seed ${seed}: ${String(error)}`)
      outcomes.refused += 1
    }
  }
  expect(broken).toEqual([])
  // Both ends are tried often, or the cases would prove little.
  expect(outcomes.table).toBeGreaterThan(CASES / 4)
  expect(outcomes.refused).toBeGreaterThan(CASES / 20)
}, 300_000)
