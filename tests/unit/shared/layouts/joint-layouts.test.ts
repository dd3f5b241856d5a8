import { describe, expect, it } from 'vitest'
import { formatJointRows, formatJointTable, type JointTable } from '@shared/joint-potential'
import { jointLayoutRows, NO_FIELDS, writeJointLayout } from '@shared/layouts'
import type { CoordinateKind } from '@shared/units'
import { errorOf } from '../../../support/error-of'
import { type LayoutChanges, layoutWith } from '../../../support/layout-builder'

const RANGES: Record<CoordinateKind, readonly [number, number]> = {
  bond: [0.2, 0.5],
  angle: [0, Math.PI],
  dihedral: [-Math.PI, Math.PI],
}
const energy = (x: number, y: number) => 40 + 10 * Math.sin(x) + 5 * x * Math.cos(y + 0.4)
const xForce = (x: number, y: number) => -(10 * Math.cos(x) + 5 * Math.cos(y + 0.4))
const yForce = (x: number, y: number) => 5 * x * Math.sin(y + 0.4)

function joint(kinds: readonly [CoordinateKind, CoordinateKind], nx = 5, ny = 9): JointTable {
  const grid = (kind: CoordinateKind, rows: number) => {
    const [low, high] = RANGES[kind]
    return Float64Array.from({ length: rows }, (_, row) => (low * (rows - 1 - row) + high * row) / (rows - 1))
  }
  const [x, y] = [grid(kinds[0], nx), grid(kinds[1], ny)]
  const over = (value: (x: number, y: number) => number) =>
    Float64Array.from({ length: nx * ny }, (_, cell) => value(x[Math.floor(cell / ny)], y[cell % ny]))
  return {
    kinds,
    temperature: 400,
    x,
    y,
    energies: over(energy),
    xForces: over(xForce),
    yForces: over(yForce),
  }
}

const PRECISE = {
  row: { width: 0 },
  coordinate: { style: 'shortest', digits: 12, width: 0 },
  energy: { style: 'shortest', digits: 12, width: 0 },
  force: { style: 'shortest', digits: 12, width: 0 },
} as const
const RADIANS = { coordinateUnit: 'radian', force: { per: 'radian' } } as const

const rowsOf = (table: JointTable, changes: LayoutChanges) =>
  jointLayoutRows(
    table,
    layoutWith({ numbers: PRECISE, angle: RADIANS, dihedral: RADIANS, ...changes }),
    NO_FIELDS,
  )
    .split('\n')
    .filter((line) => line !== '')
    .map((line) => line.split(' ').map(Number))

describe('a joint table in a layout', () => {
  it('of three columns is the plain joint table, to the byte', () => {
    const table = joint(['bond', 'angle'])
    const units = { coordinateUnits: ['nm', 'degree'], energyUnit: 'kJ/mol' } as const
    const comments = ['one', 'two']
    expect(jointLayoutRows(table, layoutWith(), NO_FIELDS)).toBe(formatJointRows(table, units))
    expect(writeJointLayout(table, layoutWith(), { ...NO_FIELDS, comments })).toBe(
      formatJointTable(table, units, comments),
    )
  })

  it('turns the supplement of an angle with its rows and the sign of its force only', () => {
    const rows = rowsOf(joint(['bond', 'angle']), { angle: { ...RADIANS, reading: 'supplement' } })
    expect(rows).toHaveLength(45)
    expect(rows[0][1]).toBe(0)
    rows.forEach(([x, written, value, alongX, alongY]) => {
      const y = Math.PI - written
      expect(value).toBeCloseTo(energy(x, y), 9)
      expect(alongX).toBeCloseTo(xForce(x, y), 9)
      expect(alongY).toBeCloseTo(-yForce(x, y), 9)
    })
  })

  it('shifts a dihedral by half a turn, in either range, with or without the repeated row', () => {
    for (const [range, least] of [
      ['-180..180', -Math.PI],
      ['0..360', 0],
    ] as const) {
      for (const repeatEnd of [true, false]) {
        const rows = rowsOf(joint(['angle', 'dihedral']), {
          dihedral: { ...RADIANS, zero: 'trans', range, repeatEnd },
        })
        expect(rows).toHaveLength(5 * (repeatEnd ? 9 : 8))
        expect(rows[0][1]).toBeCloseTo(least, 9)
        rows.forEach(([x, written, value, alongX, alongY]) => {
          const y = written + Math.PI
          expect(value).toBeCloseTo(energy(x, y), 9)
          expect(alongX).toBeCloseTo(xForce(x, y), 9)
          expect(alongY).toBeCloseTo(yForce(x, y), 9)
        })
      }
    }
  })

  it('keeps its own places where half a turn is no whole number of steps', () => {
    const rows = rowsOf(joint(['angle', 'dihedral'], 3, 8), { dihedral: { ...RADIANS, zero: 'trans' } })
    expect(rows).toHaveLength(3 * 8)
    rows.forEach(([x, written, value]) => expect(value).toBeCloseTo(energy(x, written + Math.PI), 9))
  })

  it('writes columns in any order, derivatives, row numbers, and y outside', () => {
    const changes: LayoutChanges = {
      firstRow: 0,
      joint: {
        columns: ['row', 'yDerivative', 'y', 'x', 'xDerivative', 'energy'],
        outer: 'y',
        blankLines: false,
      },
    }
    const rows = rowsOf(joint(['bond', 'angle']), changes)
    expect(rows.map(([row]) => row)).toEqual(Array.from({ length: 45 }, (_, row) => row))
    expect(new Set(rows.slice(0, 5).map(([, , y]) => y)).size).toBe(1)
    rows.forEach(([, alongY, y, x, alongX, value]) => {
      expect(value).toBeCloseTo(energy(x, y), 9)
      expect(alongX).toBeCloseTo(-xForce(x, y), 9)
      expect(alongY).toBeCloseTo(-yForce(x, y), 9)
    })
  })

  it('fills its own templates, with an end of each block', () => {
    const layout = layoutWith({
      writing: 'template',
      rowTemplate: '{{energy}}',
      joint: {
        header: '{{xKind}} {{xRows}} x {{yKind}} {{yRows}}, {{yLow}} to {{yHigh}} {{yUnit}}',
        rowTemplate: '{{x}}/{{y}}{{#blockEnd}} |{{/blockEnd}}{{#last}} done{{/last}}',
        blankLines: false,
        footer: 'end',
      },
      numbers: { coordinate: { width: 0 } },
    })
    expect(writeJointLayout(joint(['bond', 'angle'], 2, 3), layout, NO_FIELDS).split('\n')).toEqual([
      'bond 2 x angle 3, 0 to 180 deg',
      '0.2/0',
      '0.2/90',
      '0.2/180 |',
      '0.5/0',
      '0.5/90',
      '0.5/180 | done',
      'end',
      '',
    ])
  })

  it('is one JSON object where the layout writes JSON', () => {
    const layout = layoutWith({ writing: 'json' })
    const json = JSON.parse(writeJointLayout(joint(['bond', 'dihedral']), layout, NO_FIELDS)) as Record<
      string,
      unknown
    >
    expect(json).toMatchObject({
      format: 'beadwright joint table',
      kinds: ['bond', 'dihedral'],
      units: { x: 'nm', y: 'deg', energy: 'kJ/mol', xForce: 'kJ/mol/nm', yForce: 'kJ/mol/deg' },
      columns: ['x', 'y', 'energy', 'xForce', 'yForce'],
    })
    expect(json.rows).toHaveLength(45)
  })

  it('is refused where a part of the turn would fall apart', () => {
    const table = joint(['angle', 'dihedral'])
    const part = { ...table, y: table.y.map((value) => value / 2) }
    expect(errorOf(() => rowsOf(part, { dihedral: { ...RADIANS, range: '0..360' } }))).toMatchObject({
      code: 'LAYOUT_INVALID',
      place: { field: 'dihedral.range' },
    })
  })
})
