import { describe, expect, it } from 'vitest'
import { layoutDocumentSchema } from '@shared/contracts/layout'
import {
  BUILT_IN_LAYOUTS,
  builtInLayout,
  checkLayout,
  type Layout,
  layoutRows,
  NO_FIELDS,
  writeLayout,
} from '@shared/layouts'
import { formatRows, formatTable } from '@shared/tables'
import { analyticTable } from '../../../support/layout-tables'

const KINDS = ['bond', 'angle', 'dihedral'] as const

describe('layouts of the house', () => {
  it.each(KINDS)('three columns of a %s are those of the plain table, to the byte', (kind) => {
    const table = analyticTable(kind)
    const comments = ['term: B–E', 'warning: none']
    const units = {
      coordinateUnit: kind === 'bond' ? 'angstrom' : 'degree',
      energyUnit: 'kcal/mol',
    } as const
    const layout = builtInLayout('three-columns', { length: 'angstrom', angle: 'degree', energy: 'kcal/mol' })
    expect(writeLayout(table, layout, { ...NO_FIELDS, comments })).toBe(formatTable(table, units, comments))
    expect(layoutRows(table, layout, NO_FIELDS)).toBe(formatRows(table, units))
  })

  it.each(BUILT_IN_LAYOUTS.map(({ key }) => key))('%s fits its contract and its own rules', (key) => {
    const layout: Layout = builtInLayout(key, { length: 'nm', angle: 'radian', energy: 'kT' })
    expect(() => checkLayout(layout)).not.toThrow()
    expect(layoutDocumentSchema.parse(layout)).toEqual(layout)
  })

  it('hold the number of columns that their name says', () => {
    const cells = (key: 'two-columns' | 'four-columns' | 'two-columns-comma' | 'four-columns-comma') => {
      const layout = builtInLayout(key, { length: 'nm', angle: 'degree', energy: 'kJ/mol' })
      const [line] = layoutRows(analyticTable('angle'), layout, NO_FIELDS).split('\n')
      return line.trim().split(/[ ,]+/)
    }
    expect(cells('two-columns')).toEqual(['0', '67.5'])
    expect(cells('four-columns')).toEqual(['1', '0', '67.5', '-0.03490659'])
    expect(cells('two-columns-comma')).toEqual(['0', '67.5'])
    expect(cells('four-columns-comma')).toEqual(['1', '0', '67.5', '-0.03490659'])
  })

  it('write JSON with units, conventions and rows that any parser reads', () => {
    const layout = builtInLayout('json', { length: 'nm', angle: 'radian', energy: 'kT' })
    const json = JSON.parse(
      writeLayout(analyticTable('dihedral', 5), layout, {
        ...NO_FIELDS,
        term: 'A–B–B–A',
        types: ['A', 'B', 'B', 'A'],
      }),
    ) as Record<string, unknown>
    expect(json).toMatchObject({
      format: 'beadwright table',
      version: 1,
      kind: 'dihedral',
      term: 'A–B–B–A',
      units: { coordinate: 'rad', energy: 'kT', force: 'kT/rad' },
      zero: 'cis',
      range: '-180..180',
      columns: ['coordinate', 'energy', 'force'],
    })
    expect((json.rows as number[][]).map(([coordinate]) => coordinate)).toEqual([
      -3.141593, -1.570796, 0, 1.570796, 3.141593,
    ])
  })
})
