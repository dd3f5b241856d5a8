import { coordinateDomain } from '../histogram'
import type { WarningCode } from '../inversion'
import type { SmoothJointDensity } from '../smoothing'
import { type CoordinateKind, coordinateFromInternal } from '../units'
import type { JointAxisBins, JointBins } from './joint-bins'

/** Stable: tests, the API and the command line compare codes, never messages. */
export type JointWarningCode =
  'JOINT_SPARSE' | Extract<WarningCode, 'DATA_AT_EDGE' | 'TURN_INCOMPLETE' | 'CURVE_MISSES_DATA'>

/** A doubt about a joint potential: `message` says what is wrong and why it matters, `action` what to do about it. */
export interface JointWarning {
  readonly code: JointWarningCode
  readonly message: string
  readonly action: string
}

/** With N samples and D effective parameters the mean variance of U where the samples are is D/N (kT)²: here (0.2 kT)². */
const SAMPLES_PER_PARAMETER = 25
/** Fewer independent samples than this leave most cells empty on any useful grid. */
const LEAST_SAMPLES = 1000
/** An outermost bin with a free energy below this many kT above the least is still inside the distribution. */
const EDGE_DEPTH = 4
/** Cells with fewer expected counts do not speak about the fit. */
const LEAST_EXPECTED = 5
/** Pearson's χ² this many of its own deviations above its mean is no accident. */
const MISFIT_DEVIATIONS = 6
/** Smaller misses in the energy do not matter even where they are significant, in kT. */
const MISFIT_ENERGY = 0.1

/** What may be wrong with a joint potential, each with the number it rests on; the gravest kind first. */
export function jointWarnings(bins: JointBins, density: SmoothJointDensity): JointWarning[] {
  return [
    ...sparse(bins, density),
    ...bins.axes.flatMap((axis) => (axis.kind === 'dihedral' ? incompleteTurn(axis) : dataAtEdge(axis))),
    ...missedData(bins, density),
  ]
}

function sparse(
  { independentSamples }: JointBins,
  { effectiveDimension }: SmoothJointDensity,
): JointWarning[] {
  const wanted = Math.max(LEAST_SAMPLES, SAMPLES_PER_PARAMETER * effectiveDimension)
  if (independentSamples >= wanted) return []
  const noise = Math.sqrt(effectiveDimension / independentSamples).toFixed(2)
  return [
    {
      code: 'JOINT_SPARSE',
      message: `${Math.round(independentSamples)} independent samples carry a surface with ${effectiveDimension.toFixed(0)} effective parameters: its energies are uncertain by ${noise} kT on average where the samples are, and by much more beside them.`,
      action: `Sample longer or over more chains, to at least ${Math.ceil(wanted)} independent samples, or keep the terms separate.`,
    },
  ]
}

function dataAtEdge({ kind, alone: { edges, counts, volumes, added } }: JointAxisBins): JointWarning[] {
  const energies = counts.map((count, bin) => -Math.log(count / volumes[bin]))
  const least = energies.reduce((lowest, energy) => Math.min(lowest, energy), Infinity)
  const [first, last] = [added[0], counts.length - 1 - added[1]]
  const [low, high] = coordinateDomain(kind)
  const sides = [
    { edge: edges[first], inside: edges[first] > low, depth: energies[first] - least },
    { edge: edges[last + 1], inside: edges[last + 1] < high, depth: energies[last] - least },
  ]
  return sides
    .filter(({ inside, depth }) => inside && depth < EDGE_DEPTH)
    .map(({ edge, depth }) => ({
      code: 'DATA_AT_EDGE',
      message: `The joint histogram ends at ${place(kind, edge)}, where the free energy of the ${kind} is only ${depth.toFixed(1)} kT above the least: part of the distribution is cut off.`,
      action: 'Bin the joint distribution over a wider range.',
    }))
}

function incompleteTurn({ alone: { edges, added } }: JointAxisBins): JointWarning[] {
  if (added[0] + added[1] === 0) return []
  const last = edges.length - 1
  const missing = edges[added[0]] - edges[0] + edges[last] - edges[last - added[1]]
  return [
    {
      code: 'TURN_INCOMPLETE',
      message: `The joint histogram leaves out ${coordinateFromInternal(missing, 'degree').toFixed(1)}° of the turn; it was taken as never visited.`,
      action: 'Give a joint histogram from −180° to 180°, with zeros where nothing was seen.',
    },
  ]
}

function missedData(
  { counts }: JointBins,
  { means, effectiveDimension }: SmoothJointDensity,
): JointWarning[] {
  let [squares, used, worst] = [0, 0, 0]
  means.forEach((mean, cell) => {
    if (mean < LEAST_EXPECTED) return
    squares += (counts[cell] - mean) ** 2 / mean
    used += 1
    if (counts[cell] > 0) worst = Math.max(worst, Math.abs(Math.log(counts[cell] / mean)))
  })
  const freedom = used - effectiveDimension
  if (freedom < 1 || worst < MISFIT_ENERGY) return []
  if ((squares - freedom) / Math.sqrt(2 * freedom) < MISFIT_DEVIATIONS) return []
  return [
    {
      code: 'CURVE_MISSES_DATA',
      message: `The surface misses the joint histogram by more than noise: by up to ${worst.toFixed(2)} kT where the data live.`,
      action:
        'Choose smaller λ, state how many independent samples the counts stand for, or leave out parts of the grid that are far from the rest.',
    },
  ]
}

function place(kind: CoordinateKind, coordinate: number): string {
  if (kind === 'bond') return `${Number(coordinate.toPrecision(4))} nm`
  return `${Number(coordinateFromInternal(coordinate, 'degree').toFixed(1))}°`
}
