import type { DistributionUpload, JointDistributionUpload } from '../../shared/contracts/distribution'
import type { DerivedTerm } from '../../shared/mapping/term'
import { distributionFile, jointFile, type DemoFile, type DemoOrigin } from './demo-files'
import type { DemoMapping } from './demo-mappings'
import {
  DEMO_ENSEMBLE,
  measureChains,
  type Ensemble,
  type MeasuredPair,
  type MeasuredTerm,
} from './measure-chains'

/** What of a term the files need. */
export type DemoTerm = Pick<DerivedTerm, 'kind' | 'types' | 'places'>

/** Two terms of a mapping to be measured together, by their types: a bond, and an angle that holds it. */
export interface DemoPair {
  readonly bond: readonly string[]
  readonly angle: readonly string[]
  /** nm */
  readonly bondWidth: number
}

/** A mapping with its terms, and the pairs wanted of it. */
export interface DemoRequest {
  readonly mapping: DemoMapping
  readonly terms: readonly DemoTerm[]
  readonly pairs: readonly DemoPair[]
}

/** The files of one mapping at one temperature, in the order of its terms and pairs. */
export interface DemoFiles {
  readonly distributions: readonly DemoFile<DistributionUpload['settings']>[]
  readonly joints: readonly DemoFile<JointDistributionUpload['settings']>[]
}

/** The stretched and the folded side chain differ in both: one joint potential. */
export const COUPLED_PAIR: DemoPair = { bond: ['E', 'H'], angle: ['B', 'E', 'H'], bondWidth: 0.008 }

/** The ester bond knows nothing of the side chain: two tables. */
export const SEPARABLE_PAIR: DemoPair = { bond: ['B', 'E'], angle: ['B', 'E', 'H'], bondWidth: 0.004 }

/** Each bond of the 5-to-1 mapping with each angle that it is a side of. */
export const FIVE_TO_ONE_PAIRS: readonly DemoPair[] = [
  [
    ['B', 'B'],
    ['B', 'B', 'B'],
  ],
  [
    ['B', 'B'],
    ['B', 'B', 'E'],
  ],
  [
    ['B', 'E'],
    ['B', 'B', 'E'],
  ],
  [
    ['B', 'E'],
    ['B', 'E', 'S1'],
  ],
  [
    ['E', 'S1'],
    ['B', 'E', 'S1'],
  ],
  [
    ['E', 'S1'],
    ['E', 'S1', 'S2'],
  ],
  [
    ['S1', 'S2'],
    ['E', 'S1', 'S2'],
  ],
  [
    ['S1', 'S2'],
    ['S1', 'S2', 'S3'],
  ],
  [
    ['S2', 'S3'],
    ['S1', 'S2', 'S3'],
  ],
].map(([bond, angle]) => ({ bond, angle, bondWidth: 0.008 }))

/** One seed for all: the same chains are seen by every mapping, as in a real study. */
const SEED = 20_260

/**
 * Measures the invented chains at one temperature with every mapping asked for, and writes the files a user would have.
 *
 * @param temperature in K
 */
export function makeDemoFiles(
  requests: readonly DemoRequest[],
  temperature: number,
  ensemble: Ensemble = DEMO_ENSEMBLE,
): DemoFiles[] {
  const terms = requests.flatMap(({ mapping, terms }) => terms.map((term) => measuredTerm(mapping, term)))
  const pairs = requests.flatMap((request) => request.pairs.map((pair) => measuredPair(request, pair)))
  const counted = measureChains(temperature, terms, pairs, ensemble, SEED)
  let nextTerm = 0
  let nextPair = 0
  return requests.map((request) => {
    const origin: DemoOrigin = { mapping: request.mapping.name, temperature, seed: SEED, ensemble }
    const ofTerm = new Map(request.terms.map((term) => [term, counted.terms[nextTerm++]]))
    const distributions = [...ofTerm].map(([term, counts]) => distributionFile(term.types, counts, origin))
    const joints = request.pairs.map((pair) => {
      return jointFile([pair.bond, pair.angle], ['bond', 'angle'], counted.pairs[nextPair++], origin)
    })
    return { distributions, joints }
  })
}

/** The term of a type sequence, read in either direction. */
export function findTerm<Term extends Pick<DemoTerm, 'types'>>(
  terms: readonly Term[],
  types: readonly string[],
): Term {
  const names = [types.join(), types.toReversed().join()]
  const found = terms.find((term) => names.includes(term.types.join()))
  if (found === undefined) throw new Error(`The demonstration has no term ${types.join('–')}.`)
  return found
}

function measuredTerm(mapping: DemoMapping, { kind, places }: DemoTerm): MeasuredTerm {
  return {
    kind,
    places: places.map((place) => place.map(({ bead, unit }) => ({ bead: mapping.models[bead], unit }))),
  }
}

/** The bond at one end of every place of the angle. */
function measuredPair({ mapping, terms }: DemoRequest, { bond, angle, bondWidth }: DemoPair): MeasuredPair {
  const second = measuredTerm(mapping, findTerm(terms, angle))
  const { types } = findTerm(terms, angle)
  const start = bond.every((type) => types.slice(0, 2).includes(type)) ? 0 : 1
  const first: MeasuredTerm = {
    kind: 'bond',
    places: second.places.map((place) => place.slice(start, start + 2)),
  }
  return { first, second, bondWidth }
}
