import { describe, expect, it } from 'vitest'
import { type Layout, NO_FIELDS, writeLayout } from '@shared/layouts'
import type { CoordinateKind } from '@shared/units'
import { layoutWith } from '../../../support/layout-builder'
import { analyticTable, CURVES, TEMPERATURE } from '../../../support/layout-tables'
import { readLayoutFile } from '../../../support/read-layout-file'

const fixed = (digits: number, width = 0) => ({ style: 'fixed', digits, width }) as const
const scientific = (digits: number, width = 0) => ({ style: 'scientific', digits, width }) as const
const shortest = (digits: number, width = 0) => ({ style: 'shortest', digits, width }) as const
const angular = { coordinateUnit: 'radian', force: { per: 'radian' } } as const

/** Layouts that differ in as much as they can; digits such that what is read back is good to the tolerances below. */
const LAYOUTS: Record<string, { layout: Layout; pattern?: RegExp }> = {
  'plain, seven digits': { layout: layoutWith() },
  'commas, no comments, scientific, CRLF': {
    layout: layoutWith({
      separator: 'comma',
      comment: '',
      header: 'x,u,f\n',
      lineEnd: 'crlf',
      numbers: { coordinate: scientific(8), energy: scientific(8), force: scientific(8) },
    }),
  },
  'row number from 0, fixed width, kcal/mol, Å, derivative, own comment sign': {
    layout: layoutWith({
      columns: ['row', 'coordinate', 'energy', 'derivative'],
      firstRow: 0,
      comment: '!!',
      bond: {
        coordinateUnit: 'angstrom',
        energyUnit: 'kcal/mol',
        force: { energyUnit: 'kcal/mol', per: 'angstrom' },
      },
      angle: { energyUnit: 'kcal/mol', force: { energyUnit: 'kcal/mol' } },
      dihedral: { energyUnit: 'kcal/mol', force: { energyUnit: 'kcal/mol' } },
      numbers: { row: { width: 6 }, coordinate: fixed(6, 14), energy: fixed(7, 18), force: fixed(8, 20) },
    }),
  },
  'supplement, dihedral from trans, degrees but force per radian': {
    layout: layoutWith({
      angle: { reading: 'supplement', force: { per: 'radian' } },
      dihedral: { zero: 'trans', force: { per: 'radian' } },
      numbers: { coordinate: fixed(7), energy: fixed(7), force: fixed(7) },
    }),
  },
  'radians, 0 to 360, without the repeated row, semicolons': {
    layout: layoutWith({
      separator: 'semicolon',
      angle: angular,
      dihedral: { ...angular, range: '0..360', repeatEnd: false },
      numbers: { coordinate: shortest(12), energy: shortest(12), force: shortest(12) },
    }),
  },
  'supplement in radians, dihedral from trans in 0 to 360, derivative before energy, tabs, kT': {
    layout: layoutWith({
      separator: 'tab',
      columns: ['derivative', 'coordinate', 'energy'],
      bond: { energyUnit: 'kT', force: { energyUnit: 'kJ/mol' } },
      angle: {
        ...angular,
        reading: 'supplement',
        energyUnit: 'kT',
        force: { energyUnit: 'kT', per: 'radian' },
      },
      dihedral: {
        ...angular,
        zero: 'trans',
        range: '0..360',
        energyUnit: 'kT',
        force: { energyUnit: 'kT', per: 'radian' },
      },
      numbers: { coordinate: shortest(10), energy: shortest(10), force: shortest(10) },
    }),
  },
  'rows by a template, with words between the numbers': {
    layout: layoutWith({
      writing: 'template',
      rowTemplate: 'put {{row}} ({{energy}} | {{coordinate}}) slope={{derivative}}{{^last}},{{/last}}',
      numbers: { coordinate: scientific(9), energy: scientific(9), force: scientific(9) },
    }),
    pattern: /^put +(?<row>\d+) \((?<energy>\S+) \| (?<coordinate>\S+)\) slope=(?<derivative>[^,]+),?$/,
  },
  'JSON, energies before coordinates, force per degree beside radians': {
    layout: layoutWith({
      writing: 'json',
      columns: ['row', 'energy', 'coordinate', 'force'],
      angle: { coordinateUnit: 'radian' },
      dihedral: { coordinateUnit: 'radian' },
      numbers: { coordinate: shortest(14), energy: shortest(14), force: shortest(14) },
    }),
  },
  'other rows and limits: 1001 rows between given ends': {
    layout: layoutWith({
      bond: { rows: 1001, low: 0.25, high: 0.5 },
      angle: { rows: 1001, low: 10, high: 170 },
      dihedral: { rows: 1001 },
      numbers: { coordinate: shortest(9), energy: shortest(12), force: shortest(12) },
    }),
  },
  'sevenths of a turn and no comment: 700 rows of a dihedral without the repeated one': {
    layout: layoutWith({
      bond: { rows: 700 },
      angle: { rows: 700, reading: 'supplement' },
      dihedral: { rows: 700, repeatEnd: false, zero: 'trans', range: '0..360' },
      numbers: { coordinate: shortest(12), energy: shortest(12), force: shortest(12) },
    }),
  },
}

/** Rounding of the layouts above, kJ/mol and kJ/mol per nm or rad; and of the curve between rows 721 to a domain. */
const TOLERANCE: Record<CoordinateKind, { energy: number; force: number }> = {
  // Energies to 90 kJ/mol at seven digits; forces to 1,800 kJ/mol/nm; a coordinate rounded by 5e-8 nm moves both.
  bond: { energy: 2e-4, force: 2e-3 },
  angle: { energy: 1e-5, force: 2e-5 },
  dihedral: { energy: 1e-5, force: 2e-5 },
}

describe.each(['bond', 'angle', 'dihedral'] as const)('a %s', (kind) => {
  it.each(Object.entries(LAYOUTS))('is read back from: %s', (_, { layout, pattern }) => {
    const table = analyticTable(kind, 721)
    const text = writeLayout(table, layout, { ...NO_FIELDS, comments: ['a comment 1 2 3'], term: 'A–B' })
    const rows = readLayoutFile(text, layout, kind, TEMPERATURE, pattern)
    const { energy, force } = CURVES[kind]
    expect(rows).toHaveLength(expectedRows(layout, kind))
    for (const row of rows) {
      expect(Math.abs(row.energy! - energy(row.coordinate!))).toBeLessThan(TOLERANCE[kind].energy)
      expect(Math.abs(row.force! - force(row.coordinate!))).toBeLessThan(TOLERANCE[kind].force)
    }
  })
})

function expectedRows(layout: Layout, kind: CoordinateKind): number {
  if (layout[kind].rows !== null) return layout[kind].rows
  return kind === 'dihedral' && !layout.dihedral.repeatEnd ? 720 : 721
}
