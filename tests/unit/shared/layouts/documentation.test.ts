import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { layoutDocumentSchema } from '@shared/contracts/layout'
import { checkLayout, type Layout, NO_FIELDS, TEMPLATE_FIELDS, writeLayout } from '@shared/layouts'
import { type LayoutChanges, layoutWith } from '../../../support/layout-builder'
import { analyticTable, CURVES, TEMPERATURE } from '../../../support/layout-tables'
import { readLayoutFile } from '../../../support/read-layout-file'

const page = readFileSync(new URL('../../../../docs/layouts.md', import.meta.url), 'utf8')

/** The layout of an example of the page: its changes laid over the three columns of the house. */
function example(name: string): Layout {
  const [, text] = new RegExp(`\`\`\`json example:${name}\\n([\\s\\S]*?)\`\`\``).exec(page) ?? []
  const layout = layoutWith(JSON.parse(text ?? 'null') as LayoutChanges)
  checkLayout(layout)
  return layoutDocumentSchema.parse(layout)
}

describe('the page on layouts', () => {
  it('names every template field with what it says', () => {
    for (const { name, type, about } of TEMPLATE_FIELDS) {
      expect(page).toContain(`| \`${type === 'value' ? name : `#${name}`}\` |`)
      expect(page).toContain(about)
    }
  })

  it('names every field of a layout', () => {
    for (const name of Object.keys(layoutDocumentSchema.shape)) expect(page).toContain(`\`${name}`)
  })

  it('builds bare columns that read back', () => {
    const layout = example('bare')
    const text = writeLayout(analyticTable('angle'), layout, { ...NO_FIELDS, comments: ['none of this'] })
    expect(text.split('\n')[0]).toMatch(/^0 0\.0{10} \d+\.\d{10} -?\d+\.\d{10}$/)
    const rows = readLayoutFile(text, layout, 'angle', TEMPERATURE)
    expect(rows).toHaveLength(501)
    expect(
      rows.filter((row) => !(Math.abs(row.energy! - CURVES.angle.energy(row.coordinate!)) < 1e-6)),
    ).toEqual([])
    expect(
      rows.filter((row) => !(Math.abs(row.force! - CURVES.angle.force(row.coordinate!)) < 1e-4)),
    ).toEqual([])
  })

  it('builds blocks of records that read back', () => {
    const layout = example('blocks')
    const fields = { ...NO_FIELDS, types: ['A', 'B', 'C', 'D'], comments: ['made up'] }
    const lines = writeLayout(analyticTable('dihedral'), layout, fields).split('\n')
    expect(lines.slice(0, 2)).toEqual(['-- made up', 'begin torsion A B C D points 360 first 0 step 1'])
    expect(lines.slice(-2)).toEqual(['end', ''])
    const pattern = /^\{ +(?<coordinate>\S+), +(?<energy>\S+), +(?<force>\S+) \};$/
    const rows = readLayoutFile(lines.join('\n'), layout, 'dihedral', TEMPERATURE, pattern)
    expect(rows).toHaveLength(360)
    expect(
      rows.filter((row) => !(Math.abs(row.energy! - CURVES.dihedral.energy(row.coordinate!)) < 1e-5)),
    ).toEqual([])
    expect(
      rows.filter((row) => !(Math.abs(row.force! - CURVES.dihedral.force(row.coordinate!)) < 1e-4)),
    ).toEqual([])
  })
})
