import { InvalidInputError } from '../errors'
import { coordinateDomain } from '../histogram'
import { type CoordinateKind } from '../units'
import { SETTING_LIMITS, type TableSettings } from './inversion-settings'
import type { Potential } from './potential'

/** Share of the populated range that a bond table adds on each side by default. */
const BOND_MARGIN = 0.4
/** Default bounds of a bond are whole multiples of this, nm. */
const BOND_GRID = 0.01
/** Rounding that a converted bound may lie outside the domain, rad. */
const BOUND_SLACK = 1e-9

/**
 * First and last coordinate of a table. Defaults: angle 0 to π, dihedral −π to π (both ends, the same point), bond 40 % of
 * the populated range beyond it on each side, rounded outwards to 0.01 nm, the low bound at least half of the shortest
 * measured bond and always above 0.
 *
 * @param potential only its populated range is read
 * @param table bounds in nm or rad, null for the default
 * @returns low below high, in nm or rad
 * @throws {InvalidInputError} SETTING_INVALID, with the field, when a bound is not finite or outside the domain of the kind,
 *   a bond starts at or below 0, low is not below high, or rows is not a whole number within `SETTING_LIMITS.rows`
 */
export function tableDomain(
  kind: CoordinateKind,
  potential: Pick<Potential, 'populated'>,
  table: Omit<TableSettings, 'cap'>,
): [low: number, high: number] {
  const [defaultLow, defaultHigh] = kind === 'bond' ? bondDomain(potential.populated) : coordinateDomain(kind)
  const low = table.low ?? defaultLow
  const high = table.high ?? defaultHigh
  const [least, most] = coordinateDomain(kind)
  if (!(Number.isFinite(low) && low >= least - BOUND_SLACK && (kind !== 'bond' || low > 0))) {
    throw refuse(
      'low',
      kind === 'bond' ? 'A bond table must start above 0.' : 'The table starts outside its domain.',
    )
  }
  if (!(Number.isFinite(high) && high <= most + BOUND_SLACK)) {
    throw refuse('high', 'The table ends outside its domain.')
  }
  if (!(low < high)) throw refuse('high', 'The table must end above its start.')
  const { low: fewest, high: mostRows } = SETTING_LIMITS.rows
  if (!(Number.isInteger(table.rows) && table.rows >= fewest && table.rows <= mostRows)) {
    throw refuse('rows', `A table has a whole number of rows from ${fewest} to ${mostRows}.`)
  }
  return [low, high]
}

function bondDomain([first, last]: readonly [number, number]): [number, number] {
  const margin = BOND_MARGIN * (last - first)
  const low = Math.max(first - margin, first / 2)
  // Dividing by whole numbers per nm gives 0.21, where multiplying by 0.01 gives 0.21000000000000002.
  const perNanometre = Math.round(1 / BOND_GRID)
  const rounded = Math.floor(low * perNanometre + 1e-9) / perNanometre
  const high = Math.ceil((last + margin) * perNanometre - 1e-9) / perNanometre
  // A histogram that starts at 0 has no half of its first edge: a table then starts one grid step above 0.
  return [rounded > 0 ? rounded : low > 0 ? low : Math.min(BOND_GRID, last / 2), high]
}

function refuse(field: string, message: string): InvalidInputError {
  return new InvalidInputError('SETTING_INVALID', message, { field })
}
