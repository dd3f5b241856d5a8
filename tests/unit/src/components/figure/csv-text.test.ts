import { describe, expect, it } from 'vitest'
import { csvCell, csvText } from '@/components/figure/csv-text'

describe('csvText', () => {
  it('writes notes, one row of headers, then rows; shorter columns end in empty cells', () => {
    const text = csvText(
      ['poly(ethylene)', 'a, b'],
      [
        { header: 'r (nm)', values: Float64Array.of(0.1, 0.2) },
        { header: 'range', values: ['data'] },
      ],
    )
    expect(text.split('\r\n')).toEqual([
      '# poly(ethylene)',
      '"# a, b"',
      'r (nm),range',
      '0.1,data',
      '0.2,',
      '',
    ])
  })
})

describe('csvCell', () => {
  it('gives numbers seven significant digits at most, with a point and a plain minus', () => {
    expect(csvCell(1 / 3)).toBe('0.3333333')
    expect(csvCell(-1234567.89)).toBe('-1234568')
    expect(csvCell(0)).toBe('0')
  })

  it('leaves a cell empty where there is no number', () => {
    expect([csvCell(NaN), csvCell(Infinity), csvCell(null)]).toEqual(['', '', ''])
  })

  it.each(['=1+1', '+1', '-1', '@sum(A1)', '\tx'])(
    'makes plain words of %j, which a spreadsheet would run',
    (words) => {
      expect(csvCell(words)).toBe(`'${words}`)
    },
  )

  it('quotes words with commas, quotes or line ends, also neutralised ones', () => {
    expect(csvCell('a,b')).toBe('"a,b"')
    expect(csvCell('he said "r"')).toBe('"he said ""r"""')
    expect(csvCell('=HYPERLINK("x","y")')).toBe('"\'=HYPERLINK(""x"",""y"")"')
    expect(csvCell('\r=1')).toBe('"\'\r=1"')
  })
})
