import { createHash } from 'node:crypto'
import { describe, expect, it } from 'vitest'
import { InvalidInputError } from '@shared/errors'
import {
  DEFAULT_JOINT_SETTINGS,
  DEFAULT_JOINT_TABLE,
  formatJointRows,
  formatJointTable,
  jointEnergy,
  jointPotential,
  jointSlopes,
  jointTable,
  jointTableComments,
  jointTableRows,
  type JointTableUnits,
} from '@shared/joint-potential'
import { edgesOf } from '../../../support/exact-histograms'
import { jointCase } from '../../../support/joint-histograms'

const potential = jointPotential(
  jointCase(
    {
      kinds: ['bond', 'angle'],
      xEdges: edgesOf(0.3, 0.46, 24),
      yEdges: edgesOf(1.2, 2.7, 24),
      energy: (r, theta) => 0.5 * (((r - 0.38) / 0.02) ** 2 + ((theta - 1.9) / 0.22) ** 2),
    },
    20_000,
    1,
  ),
  400,
  { ...DEFAULT_JOINT_SETTINGS, smoothing: { mode: 'manual', log10Lambdas: [3, 3] } },
)
const { surface } = potential
const UNITS: JointTableUnits = { coordinateUnits: ['angstrom', 'degree'], energyUnit: 'kcal/mol' }
const SMALL = { x: { rows: 3, low: 0.36, high: 0.4 }, y: { rows: 4, low: 1.5, high: 2.1 } }

describe('a joint table', () => {
  it('covers the whole domain of both kinds by default', () => {
    const { x, y, kinds } = jointTable(surface, DEFAULT_JOINT_TABLE)
    expect(kinds).toEqual(['bond', 'angle'])
    expect([x.length, y.length]).toEqual([101, 181])
    expect([y[0], y[180]]).toEqual([0, Math.PI])
    expect(x[0]).toBeGreaterThan(0)
    expect(x[0]).toBeLessThan(surface.axes[0].populated[0])
    expect(x[100]).toBeGreaterThan(surface.axes[0].populated[1])
  })

  it('holds energy and both forces of the surface at its places', () => {
    const table = jointTable(surface, SMALL)
    table.energies.forEach((energy, cell) => {
      const [x, y] = [table.x[Math.floor(cell / 4)], table.y[cell % 4]]
      expect(energy).toBe(jointEnergy(surface, x, y))
      expect([-table.xForces[cell], -table.yForces[cell]]).toEqual(jointSlopes(surface, x, y))
    })
  })

  it('is refused with bounds outside the domain, or with too few or too many rows', () => {
    const codeOf = (settings: typeof SMALL) => {
      try {
        jointTable(surface, settings)
      } catch (error) {
        return error instanceof InvalidInputError && `${error.code} ${error.place.field}`
      }
      return 'accepted'
    }
    expect(codeOf(SMALL)).toBe('accepted')
    expect(codeOf({ ...SMALL, x: { rows: 501, low: 0.36, high: 0.4 } })).toBe('SETTING_INVALID rows')
    expect(codeOf({ ...SMALL, y: { rows: 1, low: 1.5, high: 2.1 } })).toBe('SETTING_INVALID rows')
    expect(codeOf({ ...SMALL, y: { rows: 4, low: 1.5, high: 4 } })).toBe('SETTING_INVALID high')
  })

  it('converts coordinates, energies and forces to the units asked for', () => {
    const table = jointTable(surface, SMALL)
    const [row] = jointTableRows(table, UNITS)
    expect(row.x).toBe(3.6)
    expect(row.y).toBeCloseTo((1.5 * 180) / Math.PI, 4)
    // Seven significant digits are printed.
    expect(row.energy / (table.energies[0] / 4.184)).toBeCloseTo(1, 6)
    expect(row.xForce / (table.xForces[0] / 4.184 / 10)).toBeCloseTo(1, 6)
    expect(row.yForce / ((table.yForces[0] / 4.184) * (Math.PI / 180))).toBeCloseTo(1, 6)
  })

  it('reads back as blocks of one x each, parted by blank lines', () => {
    const table = jointTable(surface, SMALL)
    const blocks = formatJointRows(table, UNITS)
      .split('\n\n')
      .map((block) => block.trimEnd().split('\n'))
    expect(blocks.map((block) => block.length)).toEqual([4, 4, 4])
    const read = blocks.flat().map((line) => line.trim().split(/\s+/).map(Number))
    const rows = jointTableRows(table, UNITS)
    expect(read).toEqual(rows.map(({ x, y, energy, xForce, yForce }) => [x, y, energy, xForce, yForce]))
    blocks.forEach((block) => expect(new Set(block.map((line) => line.slice(0, 15))).size).toBe(1))
  })

  it('says in its comments what it is, at which state point, in which units and how it was made', () => {
    const table = jointTable(surface, SMALL)
    const rowsSha256 = createHash('sha256').update(formatJointRows(table, UNITS)).digest('hex')
    const comments = jointTableComments({
      invented: false,
      polymer: null,
      mapping: null,
      terms: ['B–E', 'B–E–H'],
      beadOrders: null,
      statePoint: 'melt',
      units: UNITS,
      potential,
      input: { name: 'map.txt', sha256: 'f'.repeat(64) },
      rowsSha256,
    })
    const text = formatJointTable(table, UNITS, comments)
    const lines = text.split('\n')
    const head = lines.filter((line) => line.startsWith('#')).join('\n')
    for (const part of [
      'B–E (x) with B–E–H (y)',
      '400 K, melt',
      'xforce = -dE/dx in kcal/mol per angstrom',
      'log10 lambda 3.00 along x and 3.00 along y, chosen by hand',
      `SHA-256 ${rowsSha256}`,
      'map.txt',
      'Validate it in a simulation',
    ]) {
      expect(head).toContain(part)
    }
    expect(lines.findIndex((line) => !line.startsWith('#'))).toBe(comments.length + 2)
    expect(text.endsWith('\n')).toBe(true)
    expect(text).toContain(formatJointRows(table, UNITS))
  })
})
