import { describe, expect, it } from 'vitest'
import { checkLayout, type LayoutFields, NO_FIELDS, TEMPLATE_FIELDS, writeLayout } from '@shared/layouts'
import { errorOf } from '../../../support/error-of'
import { layoutWith } from '../../../support/layout-builder'
import { analyticTable } from '../../../support/layout-tables'

const FIELDS: LayoutFields = {
  ...NO_FIELDS,
  polymer: 'poly(A & <B>)',
  term: 'A–B–B',
  types: ['A', 'B', 'B'],
  handOver: '3',
  comments: ['first', 'second'],
  warnings: [{ code: 'FEW_COUNTS', message: 'few' }],
}
const header = (template: string, fields = FIELDS): string =>
  writeLayout(analyticTable('angle', 3), layoutWith({ header: template }), fields).split('\n')[0]

describe('templates of a layout', () => {
  it('fill their fields and escape nothing: these are text files', () => {
    expect(
      header(
        '{{polymer}} | {{term}} | {{type1}}{{type2}}{{type3}}{{type4}} | {{rows}} rows, {{low}} to {{high}} {{coordinateUnit}}',
      ),
    ).toBe('poly(A & <B>) | A–B–B | ABB | 3 rows, 0 to 180 deg')
  })

  it('open sections by kind, by what is there, and for each item of a list', () => {
    expect(
      header(
        '{{#angle}}bend{{/angle}}{{#bond}}stretch{{/bond}}{{^mapping}} no mapping{{/mapping}}{{#handOver}} no. {{.}}{{/handOver}}',
      ),
    ).toBe('bend no mapping no. 3')
    expect(header('{{#types}}[{{.}}]{{/types}}{{#warnings}} {{code}}={{message}}{{/warnings}}')).toBe(
      '[A][B][B] FEW_COUNTS=few',
    )
  })

  it('keep a line break in a name from beginning a row', () => {
    expect(header('{{comment}} {{polymer}}', { ...FIELDS, polymer: 'one\n1 2 3\ttwo' })).toBe(
      '# one 1 2 3 two',
    )
  })

  it('leave comment lines out where the layout has no comment sign', () => {
    const layout = layoutWith({ comment: '', header: '{{#comments}}\n{{comment}} {{.}}\n{{/comments}}\n' })
    expect(writeLayout(analyticTable('angle', 3), layout, FIELDS)).not.toContain('first')
  })

  it.each(TEMPLATE_FIELDS.flatMap((field) => field.places.map((place) => [field, place] as const)))(
    'know the documented field $0.name in the $1',
    (field, place) => {
      const { name, type, items } = field
      const inner = type === 'list' ? (items ?? ['.']).map((item) => `{{${item}}}`).join('') : ''
      const template = type === 'value' ? `{{${name}}}` : `{{#${name}}}${inner}{{/${name}}}`
      const part = place.endsWith('row') ? 'rowTemplate' : 'header'
      const changes = place.startsWith('joint') ? { joint: { [part]: template } } : { [part]: template }
      expect(() => checkLayout(layoutWith(changes))).not.toThrow()
    },
  )

  it.each([
    ['header', { header: 'a\n{{comment}}\n{{temprature}}' }, 3],
    ['footer', { footer: '{{#warnings}}\n{{cod}}\n{{/warnings}}' }, 2],
    ['rowTemplate', { rowTemplate: '{{energy}} {{x}}' }, 1],
    ['joint.header', { joint: { header: '\n{{coordinateUnit}}' } }, 2],
    ['header', { header: '{{energy}}' }, 1],
    ['header', { header: '{{code}}' }, 1],
    ['header', { header: '{{constructor}}' }, 1],
    ['header', { header: '{{polymer.length}}' }, 1],
  ] as const)('refuse a field that is not there in the %s, with its line', (field, changes, line) => {
    expect(errorOf(() => checkLayout(layoutWith(changes)))).toMatchObject({
      code: 'TEMPLATE_FIELD_UNKNOWN',
      place: { field, line },
    })
  })

  it.each([
    ['a tag left open', 'a\nb {{term', 2],
    ['a section left open', 'a\n{{#bond}}\n', 2],
    ['a section closed by another name', '{{#bond}}\n{{/angle}}', 2],
    ['a partial', '\n{{> other}}', 2],
    ['other delimiters', '{{=<% %>=}}', 1],
    ['a list as a value', '{{comments}}', 1],
    ['a switch as a value', '{{bond}}', 1],
  ])('refuse %s, with its line', (_, template, line) => {
    expect(errorOf(() => checkLayout(layoutWith({ header: template })))).toMatchObject({
      code: 'TEMPLATE_INVALID',
      place: { field: 'header', line },
    })
  })

  it('refuse rows by a template that is empty, no columns, and a column twice', () => {
    const fieldOf = (changes: object) =>
      (errorOf(() => checkLayout(layoutWith(changes))) as { place: { field: string } }).place.field
    expect(fieldOf({ writing: 'template' })).toBe('rowTemplate')
    expect(fieldOf({ columns: [] })).toBe('columns')
    expect(fieldOf({ columns: ['energy', 'energy'] })).toBe('columns')
    expect(fieldOf({ joint: { columns: [] } })).toBe('joint.columns')
    expect(fieldOf({ bond: { low: 0.5, high: 0.4 } })).toBe('bond.high')
  })
})
