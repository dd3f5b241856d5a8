import { describe, expect, it } from 'vitest'
import { type LayoutCheckCode, layoutChecks } from '@shared/layouts'
import type { Table } from '@shared/tables'
import { type LayoutChanges, layoutWith } from '../../../support/layout-builder'
import { analyticTable } from '../../../support/layout-tables'

const checksOf = (table: Table, changes: LayoutChanges = {}) => layoutChecks(table, layoutWith(changes))
const warningsOf = (table: Table, changes: LayoutChanges = {}): LayoutCheckCode[] =>
  checksOf(table, changes).flatMap(({ code, ok }) => (ok ? [] : [code]))
const codesOf = (table: Table, changes: LayoutChanges = {}) =>
  checksOf(table, changes).map(({ code }) => code)

describe('checks of a file', () => {
  it.each(['bond', 'angle', 'dihedral'] as const)('find nothing in the plain table of a %s', (kind) => {
    expect(warningsOf(analyticTable(kind))).toEqual([])
  })

  it('leave out what does not apply', () => {
    expect(codesOf(analyticTable('bond'), { columns: ['coordinate', 'energy'] })).toEqual([
      'ROWS_EVEN',
      'COORDINATES_DISTINCT',
      'DOMAIN_COVERED',
      'CELLS_FIT',
      'RESAMPLED',
    ])
    expect(codesOf(analyticTable('dihedral'))).toContain('PERIODIC_ENDS')
  })

  it('find coordinates that print the same, and steps that rounding makes uneven', () => {
    const short = { numbers: { coordinate: { style: 'fixed', digits: 2, width: 0 } } } as const
    expect(warningsOf(analyticTable('bond'), short)).toEqual(['ROWS_EVEN', 'COORDINATES_DISTINCT'])
  })

  it('find a domain that is not covered', () => {
    expect(warningsOf(analyticTable('angle'), { angle: { low: 20 } })).toContain('DOMAIN_COVERED')
    expect(warningsOf(analyticTable('bond'), { bond: { high: 0.4 } })).toContain('DOMAIN_COVERED')
    expect(warningsOf(analyticTable('dihedral'), { dihedral: { high: 90 } })).toContain('DOMAIN_COVERED')
    expect(warningsOf(analyticTable('dihedral'), { dihedral: { repeatEnd: false } })).toEqual([])
  })

  it('find a force that is not the derivative of the energy: of the wrong sign, size, or from rows too far apart', () => {
    const table = analyticTable('angle')
    const scaled = (factor: number): Table => ({
      ...table,
      forces: table.forces.map((force) => factor * force),
    })
    expect(warningsOf(scaled(-1))).toContain('FORCE_CONSISTENT')
    expect(warningsOf(scaled(Math.PI / 180))).toEqual(['FORCE_CONSISTENT', 'FORCE_SUM'])
    expect(warningsOf(analyticTable('dihedral', 13))).toContain('FORCE_CONSISTENT')
  })

  it('know the derivative from the force, and any unit of either', () => {
    const changes: LayoutChanges = {
      columns: ['coordinate', 'energy', 'derivative'],
      angle: { energyUnit: 'kcal/mol', force: { energyUnit: 'kT', per: 'radian' } },
    }
    expect(warningsOf(analyticTable('angle'), changes)).toEqual(['FORCE_UNIT_DIFFERS'])
  })

  it('find energies that lost their digits', () => {
    const energy = { style: 'fixed', digits: 0, width: 0 } as const
    expect(warningsOf(analyticTable('angle'), { numbers: { energy } })).toContain('FORCE_CONSISTENT')
  })

  it('find a force that does not sum to the difference of energy', () => {
    const table = analyticTable('bond')
    const shifted = { ...table, forces: table.forces.map((force) => force + 3) }
    expect(warningsOf(shifted)).toContain('FORCE_SUM')
  })

  it('find ends of a turn that differ', () => {
    const table = analyticTable('dihedral')
    const energies = table.energies.slice()
    energies[energies.length - 1] += 1
    expect(warningsOf({ ...table, energies })).toContain('PERIODIC_ENDS')
  })

  it('find numbers wider than their column', () => {
    const energy = { style: 'fixed', digits: 6, width: 8 } as const
    expect(warningsOf(analyticTable('bond'), { numbers: { energy } })).toContain('CELLS_FIT')
  })

  it('say when rows lie between those of the table, and when those are too far apart', () => {
    const between = { angle: { rows: 500 } } as const
    expect(warningsOf(analyticTable('angle', 361), between)).toEqual([])
    expect(warningsOf(analyticTable('angle', 9), between)).toContain('RESAMPLED')
    expect(warningsOf(analyticTable('angle', 9), { angle: { reading: 'supplement' } })).not.toContain(
      'RESAMPLED',
    )
  })

  it('look at rows of a template as at columns', () => {
    const writing = {
      writing: 'template',
      rowTemplate: '{{#last}}{{coordinate}}{{/last}} {{energy}}',
    } as const
    expect(codesOf(analyticTable('angle'), writing)).toEqual([
      'ROWS_EVEN',
      'COORDINATES_DISTINCT',
      'DOMAIN_COVERED',
      'RESAMPLED',
    ])
  })
})
