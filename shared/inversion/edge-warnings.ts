import { coordinateDomain } from '../histogram'
import { coordinateFromInternal } from '../units'
import type { Inversion } from './inversion'
import { potentialEnergy, potentialSlope } from './potential-energy'
import type { PreparedBins } from './prepared-bins'
import type { Warning } from './warning'
import { placeWords } from './warning-words'

/** An outermost bin with a free energy below this many kT above the least is still inside the distribution. */
const EDGE_DEPTH = 4
/** Straight angles are populated when data reach to within 5° of 180° and U(180°) is below this many kT. */
const STRAIGHT_REACH = (5 * Math.PI) / 180
const STRAIGHT_DEPTH = 5
/** A change of U over the last 5° before 180° that is not small, in kT. */
const STRAIGHT_CHANGE = 0.2

/** Doubts about what the histogram covers: data at its edge, part of a turn missing, a slope at 180°. */
export function edgeWarnings(
  inversion: Omit<Inversion, 'warnings'>,
  bins: PreparedBins,
  kT: number,
): Warning[] {
  return [
    ...(inversion.kind === 'dihedral' ? incompleteTurn(bins) : dataAtEdge(inversion, kT)),
    ...slopeAtStraightAngle(inversion, kT),
  ]
}

function incompleteTurn({ edges, added: [before, after] }: PreparedBins): Warning[] {
  if (before + after === 0) return []
  const last = edges.length - 1
  const missing = edges[before] - edges[0] + edges[last] - edges[last - after]
  return [
    {
      code: 'TURN_INCOMPLETE',
      message: `The histogram leaves out ${coordinateFromInternal(missing, 'degree').toFixed(1)}° of the turn; it was taken as never visited.`,
      action: 'Give a histogram from −180° to 180°, with zeros where nothing was seen.',
    },
  ]
}

function dataAtEdge({ kind, bins }: Omit<Inversion, 'warnings'>, kT: number): Warning[] {
  const { edges, rawEnergies } = bins
  const last = rawEnergies.length - 1
  const [low, high] = coordinateDomain(kind)
  const sides = [
    { edge: edges[0], inside: edges[0] > low, energy: rawEnergies[0] },
    { edge: edges[last + 1], inside: edges[last + 1] < high, energy: rawEnergies[last] },
  ]
  return sides
    .filter(({ inside, energy }) => inside && energy < EDGE_DEPTH * kT)
    .map(({ edge, energy }) => ({
      code: 'DATA_AT_EDGE',
      message: `The histogram ends at ${placeWords(kind, edge)}, where the free energy is only ${(energy / kT).toFixed(1)} kT above the least: part of the distribution is cut off.`,
      action: 'Bin the distribution over a wider range.',
    }))
}

/** A slope at 180° that is not small although straight angles are populated. */
export function slopeAtStraightAngle(
  { kind, potential }: Pick<Inversion, 'kind' | 'potential'>,
  kT: number,
): Warning[] {
  if (kind !== 'angle' || potential.populated[1] < Math.PI - STRAIGHT_REACH) return []
  if (potentialEnergy(potential, Math.PI) > STRAIGHT_DEPTH * kT) return []
  const change = Math.abs(potentialSlope(potential, Math.PI)) * STRAIGHT_REACH
  if (change < STRAIGHT_CHANGE * kT) return []
  return [
    {
      code: 'SLOPE_AT_STRAIGHT_ANGLE',
      message: `Straight angles are populated, but the potential does not level off at 180°: it changes by ${(change / kT).toFixed(2)} kT over the last 5°, so the force jumps when the angle passes through straight.`,
      action:
        'Set the straight angle to level, so that the slope vanishes at 180°, or check the bins next to it.',
    },
  ]
}
