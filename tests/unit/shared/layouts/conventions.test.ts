import { describe, expect, it } from 'vitest'
import { layoutRows, NO_FIELDS, writeLayout } from '@shared/layouts'
import type { Table } from '@shared/tables'
import { errorOf } from '../../../support/error-of'
import { type LayoutChanges, layoutWith } from '../../../support/layout-builder'
import { analyticTable, CURVES, TEMPERATURE } from '../../../support/layout-tables'

const NUMBERS = {
  row: { width: 0 },
  coordinate: { style: 'shortest', digits: 12, width: 0 },
  energy: { style: 'shortest', digits: 12, width: 0 },
  force: { style: 'shortest', digits: 12, width: 0 },
} as const

const rowsOf = (table: Table, changes: LayoutChanges): number[][] =>
  layoutRows(table, layoutWith({ numbers: NUMBERS, ...changes }), NO_FIELDS)
    .trim()
    .split('\n')
    .map((line) => line.split(' ').map(Number))

const column = (rows: number[][], index: number): number[] => rows.map((row) => row[index])

describe('the supplement of an angle', () => {
  const table = analyticTable('angle', 7)
  const plain = rowsOf(table, {})
  const turned = rowsOf(table, { angle: { reading: 'supplement' } })

  it('runs from the straight angle to the closed one, rows in reverse', () => {
    expect(column(turned, 0)).toEqual([0, 30, 60, 90, 120, 150, 180])
    expect(column(turned, 1)).toEqual(column(plain, 1).toReversed())
  })

  it('turns the sign of the force', () => {
    expect(column(turned, 2)).toEqual(
      column(plain, 2)
        .toReversed()
        .map((force) => 0 - force),
    )
  })

  it('takes limits as they are written', () => {
    const rows = rowsOf(table, { angle: { reading: 'supplement', low: 0, high: 60, rows: 3 } })
    expect(rows).toEqual(turned.slice(0, 3))
  })
})

describe('a dihedral', () => {
  const table = analyticTable('dihedral', 9)
  const { energy } = CURVES.dihedral

  it('runs from −180 to 180 and ends where it began', () => {
    const rows = rowsOf(table, {})
    expect(column(rows, 0)).toEqual([-180, -135, -90, -45, 0, 45, 90, 135, 180])
    expect(rows[8].slice(1)).toEqual(rows[0].slice(1))
  })

  it('counted from trans has the energy of cis at ±180, and keeps the sense of rotation', () => {
    const rows = rowsOf(table, { dihedral: { zero: 'trans' } })
    expect(column(rows, 0)).toEqual([-180, -135, -90, -45, 0, 45, 90, 135, 180])
    const degrees = Math.PI / 180
    rows.forEach(([written, value]) => expect(value).toBeCloseTo(energy((written + 180) * degrees), 9))
    // 45° written is −135° from cis: a mirror image would stand at 135°, where this potential differs.
    expect(rows[5][1]).toBeCloseTo(energy(-135 * degrees), 9)
    expect(Math.abs(energy(135 * degrees) - energy(-135 * degrees))).toBeGreaterThan(1)
  })

  it('from 0 to 360 holds the same rows in the order of the turn', () => {
    const rows = rowsOf(table, { dihedral: { range: '0..360' } })
    const plain = rowsOf(table, {})
    expect(column(rows, 0)).toEqual([0, 45, 90, 135, 180, 225, 270, 315, 360])
    expect(column(rows, 1)).toEqual([...column(plain, 1).slice(4), ...column(plain, 1).slice(1, 5)])
    expect(column(rows, 2)).toEqual([...column(plain, 2).slice(4), ...column(plain, 2).slice(1, 5)])
  })

  it('without the repeated row ends one step before', () => {
    const rows = rowsOf(table, { dihedral: { repeatEnd: false } })
    expect(column(rows, 0)).toEqual([-180, -135, -90, -45, 0, 45, 90, 135])
  })

  it('has as many rows as asked for, with or without the repeated one', () => {
    expect(column(rowsOf(table, { dihedral: { rows: 4, repeatEnd: false } }), 0)).toEqual([-180, -90, 0, 90])
    expect(column(rowsOf(table, { dihedral: { rows: 5 } }), 0)).toEqual([-180, -90, 0, 90, 180])
  })

  it('over a part of the turn is shifted with its rows, or refused where it would fall apart', () => {
    const part = analyticTable('dihedral', 5, [-Math.PI / 2, Math.PI / 2])
    const rows = rowsOf(part, { dihedral: { zero: 'trans', range: '0..360' } })
    expect(column(rows, 0)).toEqual([90, 135, 180, 225, 270])
    expect(column(rows, 1)).toEqual(column(rowsOf(part, {}), 1))
    expect(errorOf(() => rowsOf(part, { dihedral: { range: '0..360' } }))).toMatchObject({
      code: 'LAYOUT_INVALID',
      place: { field: 'dihedral.high' },
    })
  })
})

describe('units', () => {
  it('of the force do not depend on those of the coordinate', () => {
    const table = analyticTable('angle', 5)
    const [perDegree] = rowsOf(table, {}).slice(1)
    const [perRadian] = rowsOf(table, { angle: { force: { per: 'radian' } } }).slice(1)
    expect(perRadian[0]).toBe(perDegree[0])
    expect(perRadian[2] / perDegree[2]).toBeCloseTo(180 / Math.PI, 9)
  })

  it('may differ between the kinds', () => {
    const changes: LayoutChanges = {
      bond: { coordinateUnit: 'angstrom' },
      angle: { energyUnit: 'kT' },
      dihedral: { coordinateUnit: 'radian' },
    }
    expect(rowsOf(analyticTable('bond', 3), changes)[0][0]).toBeCloseTo(2.1, 12)
    const kT = 8.31446261815324e-3 * TEMPERATURE
    expect(rowsOf(analyticTable('angle', 3), changes)[0][1] * kT).toBeCloseTo(CURVES.angle.energy(0), 9)
    expect(rowsOf(analyticTable('dihedral', 3), changes)[0][0]).toBeCloseTo(-Math.PI, 11)
  })
})

describe('limits of a layout', () => {
  it('beyond the table are refused with the field', () => {
    const table = analyticTable('bond')
    expect(errorOf(() => rowsOf(table, { bond: { low: 0.1 } }))).toMatchObject({
      code: 'LAYOUT_BEYOND_TABLE',
      place: { field: 'bond.low' },
    })
    expect(errorOf(() => rowsOf(table, { bond: { high: 0.6 } }))).toMatchObject({
      code: 'LAYOUT_BEYOND_TABLE',
      place: { field: 'bond.high' },
    })
  })

  it('beyond the table are filled from the potential where that is given', () => {
    const { energy, force } = CURVES.bond
    const layout = layoutWith({ bond: { low: 0.1, high: 0.8, rows: 71 }, numbers: NUMBERS })
    const beyond = (r: number) => ({ energy: energy(r), force: force(r) })
    const text = layoutRows(analyticTable('bond'), layout, NO_FIELDS, beyond)
    const rows = text
      .trim()
      .split('\n')
      .map((line) => line.split(' ').map(Number))
    expect(rows).toHaveLength(71)
    rows.forEach(([r, value, slope]) => {
      expect(value).toBeCloseTo(energy(r), 7)
      expect(slope).toBeCloseTo(force(r), 5)
    })
  })

  it.each([
    ['bond.low', { bond: { low: 0 } }],
    ['angle.high', { angle: { high: 190 } }],
    ['dihedral.low', { dihedral: { low: -20, range: '0..360' } }],
  ] as const)('outside the domain are refused: %s', (field, changes) => {
    const kind = field.split('.')[0] as 'bond' | 'angle' | 'dihedral'
    expect(errorOf(() => rowsOf(analyticTable(kind), changes))).toMatchObject({
      code: 'LAYOUT_INVALID',
      place: { field },
    })
  })
})

describe('the text of a layout', () => {
  it('has the line ends asked for, and closes its last line', () => {
    const layout = layoutWith({ lineEnd: 'crlf', header: 'one\ntwo', footer: 'end' })
    const text = writeLayout(analyticTable('angle', 3), layout, NO_FIELDS)
    expect(text.startsWith('one\r\ntwo\r\n')).toBe(true)
    expect(text.endsWith('end\r\n')).toBe(true)
    expect(text.replace(/\r\n/g, '')).not.toMatch(/[\r\n]/)
  })

  it('pads numbers to the width of their column and never writes −0', () => {
    const layout = layoutWith({
      columns: ['row', 'coordinate', 'force'],
      numbers: {
        row: { width: 4 },
        coordinate: { style: 'fixed', digits: 1, width: 8 },
        force: { style: 'scientific', digits: 2, width: 11 },
      },
    })
    const table = { ...analyticTable('angle', 3), forces: Float64Array.of(-0, 1000, -1e-30) }
    expect(layoutRows(table, layout, NO_FIELDS)).toBe(
      ['   1      0.0    0.00e+00', '   2     90.0    1.75e+01', '   3    180.0    0.00e+00', ''].join('\n'),
    )
  })
})
