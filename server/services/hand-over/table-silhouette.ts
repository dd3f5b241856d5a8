import type { JointTable } from '../../../shared/joint-potential'
import type { Table } from '../../../shared/tables'
import { thermalEnergy } from '../../../shared/units'

const POINTS = 60
/** Energies that the small picture of a table shows, kJ/mol above the least. */
const SHOWN_ENERGY = 25
const GRID = { columns: 21, rows: 12 } as const

/**
 * The small picture of a table: energies at 60 places over its domain, 0 the least, 1 at 25 kJ/mol and above.
 *
 * @returns length 60, each in [0, 1]
 */
export function curveSilhouette({ energies }: Pick<Table, 'energies'>): number[] {
  const least = energies.reduce((low, energy) => Math.min(low, energy), Infinity)
  const last = energies.length - 1
  return Array.from({ length: POINTS }, (_, point) => {
    const energy = energies[Math.round((point / (POINTS - 1)) * last)] - least
    return round(Math.min(1, energy / SHOWN_ENERGY))
  })
}

/**
 * The small picture of a joint table: exp(−U/kT) on a grid of 21 × 12 places over the range in which it is at least a hundredth
 * of its largest, x first.
 *
 * @returns length 252, each in [0, 1]
 */
export function gridSilhouette({ x, y, energies, temperature }: JointTable): number[] {
  const kT = thermalEnergy(temperature)
  const weights = energies.map((energy) => Math.exp(-energy / kT))
  const shown = (axis: 0 | 1): [number, number] => {
    const length = axis === 0 ? x.length : y.length
    const filled = Array.from({ length }, (_, at) => at).filter((at) =>
      weights.some(
        (w, cell) => w > 0.01 && (axis === 0 ? Math.floor(cell / y.length) : cell % y.length) === at,
      ),
    )
    return [filled[0] ?? 0, filled.at(-1) ?? length - 1]
  }
  const [[left, right], [low, high]] = [shown(0), shown(1)]
  const along = (from: number, to: number, step: number, steps: number): number =>
    Math.round(from + ((to - from) * step) / (steps - 1))
  return Array.from({ length: GRID.columns * GRID.rows }, (_, cell) => {
    const column = along(left, right, Math.floor(cell / GRID.rows), GRID.columns)
    const row = along(low, high, cell % GRID.rows, GRID.rows)
    return round(weights[column * y.length + row])
  })
}

function round(value: number): number {
  return Math.round(value * 1000) / 1000
}
