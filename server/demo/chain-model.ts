import type { Random } from '../../shared/numeric/random'
import { createBoltzmannSampler, type BoltzmannSampler } from './boltzmann-sampler'
import { CHAIN_POTENTIALS, CONFORMERS } from './chain-potentials'
import { placeBead, weightedMean, type Point } from './geometry'

/** Beads of the model: five per repeat unit, and H, the whole hexyl group, which is their mass-weighted S1, S2, S3. */
export const MODEL_BEADS = ['B', 'E', 'S1', 'S2', 'S3', 'H'] as const
export type ModelBead = (typeof MODEL_BEADS)[number]

/** Positions of one repeat unit; a chain's first and last unit have a backbone bead only. */
export type UnitPositions = Readonly<Partial<Record<ModelBead, Point>>>

/** g/mol: C2H4, C2H4, C2H5 from the IUPAC abridged atomic weights (C 12.011, H 1.008). */
const SIDE_MASSES = [28.054, 28.054, 29.062]

/**
 * Chance per frame that a repeat unit is drawn anew, all its coordinates at once; otherwise it stays as it is. Each unit is
 * then a Markov chain with the Boltzmann distribution, and whatever is measured within it has the same statistical
 * inefficiency, (2 − c)/c = 4: the one number that a file can state is the right one for bonds, angles, turns and pairs.
 */
const RENEWAL = 0.4

type Coordinate = keyof typeof CHAIN_POTENTIALS
const COORDINATES = Object.keys(CHAIN_POTENTIALS) as Coordinate[]

/** The samplers of every coordinate at one temperature; made once, used for all chains. */
export interface ChainModel {
  readonly samplers: Readonly<Record<Coordinate, BoltzmannSampler>>
  readonly conformers: readonly {
    readonly population: number
    readonly angleAtS1: BoltzmannSampler
    readonly turnAtE: BoltzmannSampler
  }[]
}

/** One chain that moves from frame to frame. */
export interface Chain {
  /** Draws the units that are due anew and gives the beads in space, one entry per repeat unit. */
  nextFrame(): readonly UnitPositions[]
}

interface UnitState {
  /** +1 or −1, drawn once: the stereo centre of the backbone bead. */
  readonly centre: 1 | -1
  readonly coordinates: Readonly<Record<Coordinate, number>>
  readonly angleAtS1: number
  readonly turnAtE: number
}

/** @param thermalEnergy kT in kJ/mol */
export function createChainModel(thermalEnergy: number): ChainModel {
  const sampler = (potential: Parameters<typeof createBoltzmannSampler>[0]) =>
    createBoltzmannSampler(potential, thermalEnergy)
  const conformers = CONFORMERS.map(({ energy, angleAtS1, turnAtE }) => {
    const parts = { angleAtS1: sampler(angleAtS1), turnAtE: sampler(turnAtE) }
    const weight = Math.exp(-energy / thermalEnergy) * parts.angleAtS1.partition * parts.turnAtE.partition
    return { ...parts, weight }
  })
  const total = conformers.reduce((sum, { weight }) => sum + weight, 0)
  const samplers = Object.fromEntries(
    Object.entries(CHAIN_POTENTIALS).map(([name, potential]) => [name, sampler(potential)]),
  ) as Record<Coordinate, BoltzmannSampler>
  return {
    samplers,
    conformers: conformers.map(({ weight, ...parts }) => ({ ...parts, population: weight / total })),
  }
}

/** A chain in equilibrium from its first frame on, atactic, without excluded volume. */
export function createChain(model: ChainModel, units: number, random: Random): Chain {
  let states: UnitState[] | null = null
  return {
    nextFrame: () => {
      states =
        states === null
          ? Array.from({ length: units }, () => drawUnit(model, random))
          : states.map((state) => renewUnit(model, state, random))
      return placeChain(states)
    },
  }
}

function drawUnit(model: ChainModel, random: Random): UnitState {
  const coordinates = {} as Record<Coordinate, number>
  for (const name of COORDINATES) coordinates[name] = model.samplers[name].draw(random)
  return { centre: random.uniform() < 0.5 ? 1 : -1, coordinates, ...drawSide(model, random) }
}

function renewUnit(model: ChainModel, state: UnitState, random: Random): UnitState {
  return random.uniform() < RENEWAL ? { ...drawUnit(model, random), centre: state.centre } : state
}

/** The conformer with its angle and its turn: one coordinate of three numbers, drawn together. */
function drawSide(model: ChainModel, random: Random): Pick<UnitState, 'angleAtS1' | 'turnAtE'> {
  const { angleAtS1, turnAtE } = model.conformers[drawConformer(model, random)]
  return { angleAtS1: angleAtS1.draw(random), turnAtE: turnAtE.draw(random) }
}

function drawConformer(model: ChainModel, random: Random): number {
  let rest = random.uniform()
  for (let i = 0; i < model.conformers.length - 1; i++) {
    rest -= model.conformers[i].population
    if (rest < 0) return i
  }
  return model.conformers.length - 1
}

function placeChain(states: readonly UnitState[]): UnitPositions[] {
  const backbone: Point[] = []
  states.forEach(({ coordinates }, i) => {
    const { backboneBond, backboneAngle, backboneTurn } = coordinates
    const a = backbone[i - 3] ?? [0, 1, 0]
    const b = backbone[i - 2] ?? [-1, 0, 0]
    const c = backbone[i - 1]
    backbone.push(c === undefined ? [0, 0, 0] : placeBead(a, b, c, backboneBond, backboneAngle, backboneTurn))
  })
  return states.map((state, i) => {
    const before = backbone[i - 1]
    const after = backbone[i + 1]
    if (before === undefined || after === undefined) return { B: backbone[i] }
    return placeUnit(state, before, backbone[i], after)
  })
}

function placeUnit(state: UnitState, before: Point, B: Point, after: Point): UnitPositions {
  const q = state.coordinates
  const E = placeBead(after, before, B, q.esterBond, q.esterAngle, state.centre * q.esterTurn)
  const S1 = placeBead(before, B, E, q.firstSideBond, q.angleAtE, q.turnAtEsterBond)
  const S2 = placeBead(B, E, S1, q.secondSideBond, state.angleAtS1, state.turnAtE)
  const S3 = placeBead(E, S1, S2, q.thirdSideBond, q.angleAtS2, q.turnAtS1)
  return { B, E, S1, S2, S3, H: weightedMean([S1, S2, S3], SIDE_MASSES) }
}
