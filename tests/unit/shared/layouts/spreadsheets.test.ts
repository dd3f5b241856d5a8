import { describe, expect, it } from 'vitest'
import { builtInLayout, NO_FIELDS, writeLayout } from '@shared/layouts'
import { analyticTable } from '../../../support/layout-tables'

const UNITS = { length: 'nm', angle: 'degree', energy: 'kJ/mol' } as const
const FIELDS = { ...NO_FIELDS, polymer: '=1+1', comments: ['poly(A),=HYPERLINK("x")'] }
const written = (key: 'three-columns' | 'three-columns-comma', header: string): string[] =>
  writeLayout(analyticTable('angle', 3), { ...builtInLayout(key, UNITS), header }, FIELDS).split('\n')

describe('names in a file with commas', () => {
  it('do not become formulas when a spreadsheet opens it', () => {
    const [first, second] = written('three-columns-comma', '{{polymer}}\n{{#comments}}# {{.}}{{/comments}}\n')
    expect(first).toBe("'=1+1")
    expect(second).toBe('# poly(A),\'=HYPERLINK("x")')
  })

  it('stay as they are in a file parted by blanks', () => {
    expect(written('three-columns', '# {{polymer}}\n')[0]).toBe('# =1+1')
  })
})
