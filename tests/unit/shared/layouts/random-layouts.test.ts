import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { layoutDocumentSchema } from '@shared/contracts/layout'
import { checkLayout, type Layout, layoutChecks, NO_FIELDS, writeLayout } from '@shared/layouts'
import type { CoordinateKind } from '@shared/units'
import { layoutWith } from '../../../support/layout-builder'
import { analyticTable, CURVES, TEMPERATURE } from '../../../support/layout-tables'
import { readLayoutFile } from '../../../support/read-layout-file'

const energyUnit = fc.constantFrom('kJ/mol', 'kcal/mol', 'kT')
const length = fc.constantFrom('nm', 'angstrom')
const angle = fc.constantFrom('degree', 'radian')
/** Formats of at least nine digits, so that rounding stays below the tolerance whatever the units. */
const format = fc.record({
  style: fc.constantFrom('shortest', 'scientific', 'fixed'),
  digits: fc.integer({ min: 9, max: 15 }),
  width: fc.integer({ min: 0, max: 30 }),
})
const kind = <Unit>(unit: fc.Arbitrary<Unit>) => ({
  coordinateUnit: unit,
  energyUnit,
  force: fc.record({ energyUnit, per: unit }),
  rows: fc.option(fc.integer({ min: 2, max: 900 }), { nil: null }),
  low: fc.constant(null),
  high: fc.constant(null),
})
const columns = fc
  .shuffledSubarray(['row', 'coordinate', 'energy', 'force', 'derivative'] as const, { minLength: 3 })
  .filter((chosen) => chosen.includes('coordinate') && chosen.includes('energy'))

const layouts: fc.Arbitrary<Layout> = fc
  .record({
    writing: fc.constantFrom('columns', 'json'),
    columns,
    firstRow: fc.constantFrom(0, 1),
    bond: fc.record(kind(length)),
    angle: fc.record({ ...kind(angle), reading: fc.constantFrom('internal', 'supplement') }),
    dihedral: fc.record({
      ...kind(angle),
      zero: fc.constantFrom('cis', 'trans'),
      range: fc.constantFrom('-180..180', '0..360'),
      repeatEnd: fc.boolean(),
    }),
    numbers: fc.record({
      row: fc.record({ width: fc.integer({ min: 0, max: 12 }) }),
      coordinate: format,
      energy: format,
      force: format,
    }),
    separator: fc.constantFrom('spaces', 'tab', 'comma', 'semicolon'),
    comment: fc.constantFrom('#', '%%', '', '"'),
    lineEnd: fc.constantFrom('lf', 'crlf'),
  })
  .map((changes) => layoutWith(changes as Partial<Layout>))

const KINDS = fc.constantFrom<CoordinateKind>('bond', 'angle', 'dihedral')
const FIELDS = { ...NO_FIELDS, comments: ['term: A–B', 'a line with 1 2 3 4 5'] }

describe('any layout', () => {
  it('fits its contract', () => {
    fc.assert(
      fc.property(layouts, (layout) => {
        checkLayout(layout)
        expect(layoutDocumentSchema.parse(layout)).toEqual(layout)
      }),
      { numRuns: 200 },
    )
  })

  it('is read back to the energies and forces of the potential', () => {
    fc.assert(
      fc.property(layouts, KINDS, (layout, of) => {
        const text = writeLayout(analyticTable(of), layout, FIELDS)
        const rows = readLayoutFile(text, layout, of, TEMPERATURE)
        expect(rows.length).toBeGreaterThan(1)
        const { energy, force } = CURVES[of]
        // 361 rows: the curve between them is off by h⁴/384 · 81·6 ≈ 1e-7 kJ/mol at most, its force by 1e-5 per radian.
        const off = rows.map((row) => ({
          energy: Math.abs(row.energy! - energy(row.coordinate!)),
          force: row.force === null ? 0 : Math.abs(row.force - force(row.coordinate!)),
        }))
        expect(off.filter(({ energy: each }) => !(each < 5e-6))).toEqual([])
        expect(off.filter(({ force: each }) => !(each < 5e-5))).toEqual([])
      }),
      { numRuns: 60 },
    )
  })

  it('has rows that ascend in even steps, and force and energy that belong together', () => {
    fc.assert(
      fc.property(layouts, KINDS, (layout, of) => {
        const checks = layoutChecks(analyticTable(of), layout)
        const codes = ['ROWS_EVEN', 'COORDINATES_DISTINCT', 'DOMAIN_COVERED', 'PERIODIC_ENDS', 'RESAMPLED']
        // Few rows may well be too far apart for the sum of forces; that is not at stake here.
        const wide = layout[of].rows === null || layout[of].rows > 200
        const judged = checks.filter(
          ({ code }) => codes.includes(code) || (wide && code.startsWith('FORCE_C')),
        )
        expect(judged.filter(({ ok }) => !ok)).toEqual([])
      }),
      { numRuns: 60 },
    )
  })

  it('gives the same text for the same arguments', () => {
    fc.assert(
      fc.property(layouts, KINDS, (layout, of) => {
        expect(writeLayout(analyticTable(of), layout, FIELDS)).toBe(
          writeLayout(analyticTable(of), layout, FIELDS),
        )
      }),
      { numRuns: 20 },
    )
  })
})
