import { coordinateDomain } from '../histogram'
import { buildPotential, type Potential, potentialEnergy, tableDomain } from '../inversion'
import { thermalEnergy } from '../units'
import type { FormFit } from './form'
import { energyOf, formDeviations } from './form-energy'

const FIRST_PIECES = 512
const MOST_PIECES = 16_384
/** Largest distance between the spline and the form halfway between knots, in kT; above 100 kT in hundredths of the energy. */
const SPLINE_ERROR = 1e-7
const FAR_SHARE = 0.01
/** Least curvature of the tail beyond the knots of a bond, in kT/σ²; where a form bends less, it goes on so. */
const TAIL_STIFFNESS = 0.5
/** Rows do not matter where only the bounds of the default table are wanted. */
const BOUNDS_ONLY = { rows: 2, low: null, high: null }

/** A form as a potential, and where that is least, nm or rad. */
export interface FormCurve {
  readonly potential: Potential
  readonly minimum: number
}

/**
 * A fitted form as a potential, so that it can take the place of the smoothed curve in a table. Knots are doubled until the
 * spline is within 1e-7 kT of the form between them. An angle is covered from 0 to π, a dihedral over the turn, a bond
 * over the default range of its table and `range`; a quadratic tail goes on from there, which for a harmonic bond is the
 * form itself. Its least value is 0, and its deviations are those of U − U_min by the delta method.
 *
 * @param range for a bond: more of the coordinate that has to be covered by the form itself, nm, above 0
 */
export function formPotential(fit: FormFit, range?: readonly [low: number, high: number]): Potential {
  return formCurve(fit, range).potential
}

/** `formPotential` with the place of its least value. */
export function formCurve(fit: FormFit, range?: readonly [low: number, high: number]): FormCurve {
  const { populated } = fit
  const covered = coveredRange(fit, range)
  let pieces = FIRST_PIECES
  let built = splineThrough(fit, covered, pieces)
  while (pieces < MOST_PIECES && !isClose(fit, built)) {
    pieces *= 2
    built = splineThrough(fit, covered, pieces)
  }
  const deviations = formDeviations(fit, built.potential.knots, built.minimum)
  return { potential: { ...built.potential, deviations, populated }, minimum: built.minimum }
}

type Built = ReturnType<typeof buildPotential>

function splineThrough(fit: FormFit, [low, high]: readonly [number, number], pieces: number): Built {
  const { kind, temperature, variance } = fit
  // The last knot of a turn is the first one again.
  const knots = Float64Array.from({ length: kind === 'dihedral' ? pieces : pieces + 1 }, (_, index) =>
    index === pieces ? high : low + ((high - low) * index) / pieces,
  )
  const energies = knots.map(energyOf(fit))
  // The form holds over the whole range: no tail may take over before its end.
  const range = [low, high] as const
  return buildPotential(
    { kind, temperature, knots, energies, deviations: null, populated: range, reach: range, variance },
    { stiffness: TAIL_STIFFNESS, level: false },
  )
}

/** Whether the spline meets the form halfway between its knots. */
function isClose(fit: FormFit, { potential, constant }: Built): boolean {
  const kT = thermalEnergy(fit.temperature)
  const energy = energyOf(fit)
  const { knots } = potential
  for (let index = 1; index < knots.length; index++) {
    const middle = (knots[index - 1] + knots[index]) / 2
    const exact = energy(middle) - constant
    const error = Math.abs(potentialEnergy(potential, middle) - exact)
    if (error > SPLINE_ERROR * Math.max(kT, FAR_SHARE * exact)) return false
  }
  return true
}

function coveredRange(
  { kind, populated }: FormFit,
  range: readonly [number, number] | undefined,
): [number, number] {
  if (kind !== 'bond') {
    const [low, high] = coordinateDomain(kind)
    return [low, high]
  }
  const [low, high] = tableDomain(kind, { populated }, BOUNDS_ONLY)
  return [Math.min(low, range?.[0] ?? low), Math.max(high, range?.[1] ?? high)]
}
