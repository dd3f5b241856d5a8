import { describe, expect, it } from 'vitest'
import { csvCell, plainWords } from '@shared/csv'

describe('csvCell', () => {
  it('gives numbers seven significant digits at most, with a point and a plain minus', () => {
    expect(csvCell(1 / 3)).toBe('0.3333333')
    expect(csvCell(-1234567.89)).toBe('-1234568')
    expect(csvCell(0)).toBe('0')
  })

  it('leaves a cell empty where there is no number', () => {
    expect([csvCell(NaN), csvCell(Infinity), csvCell(null)]).toEqual(['', '', ''])
  })

  it.each(['=1+1', '+1', '-1', '@sum(A1)', ' =1+1', '\u00a0=1', '＝1+1', '＠x', '\u0000=1', '\u007fx'])(
    'makes plain words of %j, which a spreadsheet would run',
    (words) => {
      expect(csvCell(words)).toBe(`'${words}`)
    },
  )

  it('makes plain words of what begins with a tab or a line end, and of each line on its own', () => {
    expect(csvCell('\tx')).toBe('"\'\tx"')
    expect(csvCell('\r=1')).toBe('"\'\r\'=1"')
    expect(csvCell('x\n=1')).toBe('"x\n\'=1"')
  })

  it('leaves words alone that only hold such signs further on', () => {
    expect(['A–B', 'a-b', 'x = 1', 'r@x', '5-to-1'].map(csvCell)).toEqual([
      'A–B',
      'a-b',
      'x = 1',
      'r@x',
      '5-to-1',
    ])
  })

  it('runs nothing either where semicolons or tabs part the cells', () => {
    expect(csvCell('Foo;=1+1')).toBe('"Foo;\'=1+1"')
    expect(csvCell('Foo; \t-1')).toBe('"Foo; \t\'-1"')
    expect(csvCell('Foo;"=1+1"')).toBe('"Foo;""\'=1+1"""')
    expect(csvCell('a; b')).toBe('"a; b"')
  })

  it('quotes words with commas, quotes or line ends, also neutralised ones', () => {
    expect(csvCell('a,b')).toBe('"a,b"')
    expect(csvCell('he said "r"')).toBe('"he said ""r"""')
    expect(csvCell('=HYPERLINK("x","y")')).toBe('"\'=HYPERLINK(""x"",""y"")"')
  })
})

describe('plainWords', () => {
  it('runs nothing at the start or behind what may part cells, and quotes nothing', () => {
    expect(plainWords('=1+1')).toBe("'=1+1")
    expect(plainWords('bulk, =1+1; @x,-2')).toBe("bulk, '=1+1; '@x,'-2")
    expect(plainWords('U = 0, poly(A)')).toBe('U = 0, poly(A)')
  })
})
