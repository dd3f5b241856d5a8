import type { CoordinateKind } from '../units'
import type { PreparedBins } from './prepared-bins'
import { populatedRange } from './smooth-curve'
import type { Warning } from './warning'
import { placeWords } from './warning-words'

/** Radians up to π that were read as degrees end here, rad; with room for rounding. */
const RADIANS_AS_DEGREES = (Math.PI / 180) * 3.15
/** Bonds between beads are a few tenths of a nm long: means outside these bounds are another unit or another quantity, nm. */
const SHORTEST_BOND = 0.08
const LONGEST_BOND = 2

/** Doubts about what the axis stands for: a unit that was mistaken, bonds down to length zero. */
export function axisWarnings(kind: CoordinateKind, bins: PreparedBins): Warning[] {
  return [...(kind === 'bond' ? doubtfulLength(bins) : doubtfulAngle(kind, bins)), ...zeroLength(kind, bins)]
}

function doubtfulAngle(kind: CoordinateKind, bins: PreparedBins): Warning[] {
  const [low, high] = populatedRange(bins)
  const widest = Math.max(Math.abs(low), Math.abs(high))
  if (widest > RADIANS_AS_DEGREES) return []
  return [
    {
      code: 'UNIT_DOUBTFUL',
      message: `All values lie within ${placeWords(kind, widest)} of 0°: these are probably radians that were read as degrees.`,
      action: 'Check the unit that was chosen when the file was read.',
    },
  ]
}

function doubtfulLength({ counts, midpoints }: PreparedBins): Warning[] {
  const total = counts.reduce((sum, count) => sum + count, 0)
  const mean = counts.reduce((sum, count, bin) => sum + count * midpoints[bin], 0) / total
  if (mean >= SHORTEST_BOND && mean <= LONGEST_BOND) return []
  const [taken, meant] = mean > LONGEST_BOND ? ['nm', 'Å'] : ['Å', 'nm']
  return [
    {
      code: 'UNIT_DOUBTFUL',
      message: `The mean length is ${placeWords('bond', mean)}, which is no usual bond between beads: perhaps ${meant} were read as ${taken}.`,
      action: 'Check the unit that was chosen when the file was read.',
    },
  ]
}

function zeroLength(kind: CoordinateKind, { edges, filled: [first] }: PreparedBins): Warning[] {
  if (kind !== 'bond' || edges[first] > 0) return []
  return [
    {
      code: 'BOND_AT_ZERO',
      message:
        'The distribution reaches length 0, where two beads coincide and the bin has almost no volume: its free energy there is mostly noise.',
      action:
        'Check which atoms the distance was measured between, and whether missing values were written as 0.',
    },
  ]
}
