import type { CoordinateKind } from '../units'
import type { PreparedBins } from './prepared-bins'
import type { Warning } from './warning'

/** Bins wider than this cannot tell sin θ next to 180° from a well, rad. */
const WIDEST_BIN = (4.5 * Math.PI) / 180
/**
 * ln V of equal bins next to 180° steps by ln 3 and then ln 5/3. A density that was divided by sin θ already falls by this
 * when divided again: the first step alone is 1.1 kT, and 0.6 kT more than the second.
 */
const LEAST_FALL = 0.7
const LEAST_BEND = 0.3
/** The bend must stand out from noise by this many standard deviations. */
const DEVIATIONS = 4

/** Doubts about the Jacobian: left out, or divided out twice. */
export function jacobianWarnings(kind: CoordinateKind, jacobian: boolean, bins: PreparedBins): Warning[] {
  if (kind === 'dihedral') return []
  return jacobian ? dividedTwice(kind, bins) : leftOut(kind)
}

function leftOut(kind: CoordinateKind): Warning[] {
  return [
    {
      code: 'JACOBIAN_OFF',
      message: `The Jacobian is off: the table holds −kT ln p with the ${kind === 'bond' ? 'r²' : 'sin θ'} of geometry in it, which a simulation adds once more by itself.`,
      action: 'Switch the Jacobian on for a table that is to be simulated; leave it off to compare only.',
    },
  ]
}

function dividedTwice(kind: CoordinateKind, bins: PreparedBins): Warning[] {
  if (kind !== 'angle' || !looksDivided(bins)) return []
  return [
    {
      code: 'JACOBIAN_TWICE',
      message:
        'Next to 180° the distribution is level, where sin θ has to bring it down to zero: it was probably divided by sin θ before, and now falls towards 180° without end.',
      action: 'Say when the file is read that its Jacobian was divided out, or give plain counts.',
    },
  ]
}

/** Whether the free energy of the last three bins before 180° falls and bends as the logarithm of their volumes does. */
function looksDivided({ counts, volumes, edges, independentSamples }: PreparedBins): boolean {
  const last = counts.length - 1
  if (last < 2 || edges[last + 1] !== Math.PI) return false
  const three = [last - 2, last - 1, last]
  const widths = three.map((bin) => edges[bin + 1] - edges[bin])
  const [narrowest, widest] = [Math.min(...widths), Math.max(...widths)]
  if (widest > WIDEST_BIN || widest > 1.01 * narrowest) return false
  if (three.some((bin) => counts[bin] === 0)) return false
  const [third, second, first] = three.map((bin) => -Math.log(counts[bin] / volumes[bin]))
  const fall = second - first
  const bend = fall - (third - second)
  const [a, b, c] = three.map((bin) => counts[bin])
  const noise = independentSamples === null ? 0 : Math.sqrt(1 / a + 4 / b + 1 / c)
  return fall > LEAST_FALL && bend > Math.max(LEAST_BEND, DEVIATIONS * noise)
}
