import { describe, expect, it } from 'vitest'
import { notAKnotCurvatures, periodicCurvatures, pieceSlope, pieceValue } from '@shared/numeric'
import fixture from './fixtures/spline-tables.json'

interface Errors {
  readonly max_abs_U_error: number
  readonly max_abs_F_error: number
}
interface Row {
  readonly table: string
  readonly rows_N: number
  readonly splines: Readonly<Record<string, Errors | undefined>>
}
interface Curve {
  readonly low: number
  readonly high: number
  readonly energy: (q: number) => number
  readonly slope: (q: number) => number
  readonly spline: 'not-a-knot' | 'periodic'
}

const [k, r0, low, high] = fixture.inputs.harmonic_bond_k_r0_lo_hi
const [angleK, theta0] = fixture.inputs.harmonic_angle_k_theta0_deg
const powers = fixture.inputs.C_kJ_per_mol

const CURVES: Record<string, Curve> = {
  'harmonic bond': {
    low,
    high,
    spline: 'not-a-knot',
    energy: (r) => (k / 2) * (r - r0) ** 2,
    slope: (r) => k * (r - r0),
  },
  'harmonic angle': {
    low: 0,
    high: Math.PI,
    spline: 'not-a-knot',
    energy: (theta) => (angleK / 2) * (theta - (theta0 * Math.PI) / 180) ** 2,
    slope: (theta) => angleK * (theta - (theta0 * Math.PI) / 180),
  },
  'Ryckaert-Bellemans': {
    low: -Math.PI,
    high: Math.PI,
    spline: 'periodic',
    energy: (phi) => powers.reduce((sum, c, n) => sum + c * Math.cos(phi - Math.PI) ** n, 0),
    slope: (phi) =>
      powers.reduce(
        (sum, c, n) =>
          n === 0 ? sum : sum - n * c * Math.cos(phi - Math.PI) ** (n - 1) * Math.sin(phi - Math.PI),
        0,
      ),
  },
}
const SCANNED = 48

/** Cubic splines of an independent implementation, errors scanned between the knots; tolerance of the fixture. */
describe.each(fixture.expected.tables as readonly Row[])(
  '$table in $rows_N rows',
  ({ table, rows_N, splines }) => {
    const [, curve] = Object.entries(CURVES).find(([name]) => table.startsWith(name)) ?? []
    if (curve === undefined) throw new Error(`No curve is called ${table}.`)

    it('has the errors of the reference', () => {
      const errors = largestErrors(curve, rows_N)
      const reference = splines[curve.spline]
      if (reference === undefined) throw new Error('The fixture holds this spline.')
      const floor = fixture.tolerance.abs_floor
      for (const [error, expected] of [
        [errors.energy, reference.max_abs_U_error],
        [errors.slope, reference.max_abs_F_error],
      ]) {
        if (expected < floor * 100) expect(error).toBeLessThan(1e-9)
        else expect(Math.abs(error / expected - 1)).toBeLessThan(fixture.tolerance.rel)
      }
    })
  },
)

function largestErrors({ low, high, energy, slope, spline }: Curve, rows: number) {
  const all = Float64Array.from({ length: rows }, (_, row) => low + ((high - low) * row) / (rows - 1))
  const knots = spline === 'periodic' ? all.subarray(0, rows - 1) : all
  const values = knots.map(energy)
  const curvatures =
    spline === 'periodic' ? periodicCurvatures(knots, values, high - low) : notAKnotCurvatures(knots, values)
  let [worstEnergy, worstSlope] = [0, 0]
  for (let row = 0; row < rows - 1; row++) {
    const next = (row + 1) % knots.length
    const width = all[row + 1] - all[row]
    const piece = {
      width,
      startValue: values[row],
      endValue: values[next],
      startCurvature: curvatures[row],
      endCurvature: curvatures[next],
    }
    for (let step = 0; step <= SCANNED; step++) {
      const t = (width * step) / SCANNED
      worstEnergy = Math.max(worstEnergy, Math.abs(pieceValue(piece, t) - energy(all[row] + t)))
      worstSlope = Math.max(worstSlope, Math.abs(pieceSlope(piece, t) - slope(all[row] + t)))
    }
  }
  return { energy: worstEnergy, slope: worstSlope }
}
