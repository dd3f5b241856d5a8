import { beforeAll, describe, expect, it } from 'vitest'
import { parseRepeatUnit } from '@shared/chemistry'
import type { CoordinateKind } from '@shared/histogram'
import { readHistogram } from '@shared/intake'
import { DEFAULT_INVERSION_SETTINGS, invert, potentialEnergy, type Inversion } from '@shared/inversion'
import { deriveTerms } from '@shared/mapping'
import { thermalEnergy } from '@shared/units'
import { createChainModel } from '../../../../server/demo/chain-model'
import { CHAIN_POTENTIALS } from '../../../../server/demo/chain-potentials'
import { DEMO_POLYMER, FIVE_TO_ONE, THREE_TO_ONE } from '../../../../server/demo/demo-mappings'
import {
  findTerm,
  makeDemoFiles,
  type DemoFiles,
  type DemoTerm,
} from '../../../../server/demo/make-demo-files'

const TEMPERATURE = 400
const kT = thermalEnergy(TEMPERATURE)

/**
 * Tolerance 0.3 kT where the density is above a tenth of its peak: 3 000 to 9 000 independent samples over some 20 bins give
 * a standard deviation of 0.05 to 0.1 kT there, and the largest of many points is about three of them.
 */
const TOLERANCE = 0.3
const POPULATED = 0.1

let terms: DemoTerm[]
let files: DemoFiles
let threeTerms: DemoTerm[]
let threeFiles: DemoFiles

beforeAll(async () => {
  const unit = await parseRepeatUnit(DEMO_POLYMER.smiles)
  terms = deriveTerms(unit, FIVE_TO_ONE.document)
  threeTerms = deriveTerms(unit, THREE_TO_ONE.document)
  const requests = [
    { mapping: FIVE_TO_ONE, terms, pairs: [] },
    { mapping: THREE_TO_ONE, terms: threeTerms, pairs: [] },
  ]
  ;[files, threeFiles] = makeDemoFiles(requests, TEMPERATURE)
})

function inverted(all: DemoTerm[], of: DemoFiles, types: string[]): Inversion {
  const { text, settings } = of.distributions[all.indexOf(findTerm(all, types))]
  return invert(readHistogram(text, settings).histogram, TEMPERATURE, DEFAULT_INVERSION_SETTINGS)
}

/** Largest difference in kT, after shifting by the mean difference, where the chain mostly is. */
function largestDifference(inversion: Inversion, energy: (q: number) => number): number {
  const { midpoints, weights } = inversion.bins
  const peak = Math.max(...weights)
  const at = [...midpoints].filter((_, bin) => weights[bin] > POPULATED * peak)
  const differences = at.map((q) => (potentialEnergy(inversion.potential, q) - energy(q)) / kT)
  const mean = differences.reduce((sum, value) => sum + value, 0) / differences.length
  return Math.max(...differences.map((value) => Math.abs(value - mean)))
}

const OWN: [string, string[], keyof typeof CHAIN_POTENTIALS][] = [
  ['B–B', ['B', 'B'], 'backboneBond'],
  ['B–E', ['B', 'E'], 'esterBond'],
  ['E–S1', ['E', 'S1'], 'firstSideBond'],
  ['S1–S2', ['S1', 'S2'], 'secondSideBond'],
  ['S2–S3', ['S2', 'S3'], 'thirdSideBond'],
  ['B–B–B', ['B', 'B', 'B'], 'backboneAngle'],
  ['B–E–S1', ['B', 'E', 'S1'], 'angleAtE'],
  ['S1–S2–S3', ['S1', 'S2', 'S3'], 'angleAtS2'],
  ['B–B–B–B', ['B', 'B', 'B', 'B'], 'backboneTurn'],
  ['E–S1–S2–S3', ['E', 'S1', 'S2', 'S3'], 'turnAtS1'],
]

describe('the invented distributions', () => {
  it.each(OWN)('of %s invert to the potential the model has for it', (_name, types, potential) => {
    expect(largestDifference(inverted(terms, files, types), CHAIN_POTENTIALS[potential].energy)).toBeLessThan(
      TOLERANCE,
    )
  })

  it.each([
    ['E–S1–S2', ['E', 'S1', 'S2'], 'angleAtS1'],
    ['B–E–S1–S2', ['B', 'E', 'S1', 'S2'], 'turnAtE'],
  ] as [string, string[], 'angleAtS1' | 'turnAtE'][])(
    'of %s invert to the free energy over both conformers',
    (_name, types, coordinate) => {
      const { conformers } = createChainModel(kT)
      const inversion = inverted(terms, files, types)
      const jacobian = (q: number) => (inversion.kind === 'angle' ? Math.sin(q) : 1)
      const energy = (q: number) =>
        -kT *
        Math.log(
          conformers.reduce((sum, each) => sum + each.population * each[coordinate].density(q), 0) /
            jacobian(q),
        )
      expect(largestDifference(inversion, energy)).toBeLessThan(TOLERANCE)
    },
  )

  it('of the hexyl bead have two wells in bond and angle, and the backbone bond has one', () => {
    const wells = (types: string[]) => {
      const { potential, bins } = inverted(threeTerms, threeFiles, types)
      const peak = Math.max(...bins.weights)
      const energies = [...bins.midpoints]
        .filter((_, bin) => bins.weights[bin] > 0.02 * peak)
        .map((q) => potentialEnergy(potential, q) / kT)
      return deepWells(energies, 0.1)
    }
    expect(wells(['E', 'H'])).toBe(2)
    expect(wells(['B', 'E', 'H'])).toBe(2)
    expect(wells(['B', 'B'])).toBe(1)
  })

  it('populate straight angles, with counts that vanish there as sin θ does', () => {
    const { bins } = inverted(terms, files, ['B', 'B', 'B'])
    const last = bins.weights.length - 1
    expect(bins.edges[last + 1]).toBeCloseTo(Math.PI, 6)
    // The last 6° hold a third of the solid angle of the 6° before: counts fall, the free energy hardly changes.
    const over = (values: Float64Array, from: number) =>
      values.slice(from, from + 3).reduce((sum, value) => sum + value, 0)
    const [near, before] = [last - 2, last - 5].map((from) => ({
      count: over(bins.weights, from),
      volume: over(bins.volumes, from),
    }))
    expect(near.volume / before.volume).toBeCloseTo(1 / 3, 2)
    expect(near.count).toBeGreaterThan(0)
    expect(near.count).toBeLessThan(0.5 * before.count)
    expect(Math.abs(Math.log(near.count / near.volume / (before.count / before.volume)))).toBeLessThan(0.5)
  })

  it('of every term of both mappings invert without a refusal', () => {
    const kinds = new Set<CoordinateKind>()
    for (const [all, of] of [
      [terms, files],
      [threeTerms, threeFiles],
    ] as const) {
      for (const { types } of all) {
        const inversion = inverted(all, of, types)
        kinds.add(inversion.kind)
        expect(inversion.smoothing.effectiveDimension).toBeGreaterThan(2)
        expect(inversion.bins.deviations).not.toBeNull()
      }
    }
    expect(kinds).toEqual(new Set(['bond', 'angle', 'dihedral']))
  })
})

/** Minima of a curve that lie at least `depth` below the walls on both sides. */
function deepWells(energies: readonly number[], depth: number): number {
  let wells = 0
  let lowest = Infinity
  let highest = -Infinity
  let falling = true
  for (const energy of energies) {
    if (falling) {
      lowest = Math.min(lowest, energy)
      if (energy > lowest + depth) {
        wells += 1
        falling = false
        highest = energy
      }
    } else {
      highest = Math.max(highest, energy)
      if (energy < highest - depth) {
        falling = true
        lowest = energy
      }
    }
  }
  return wells
}
