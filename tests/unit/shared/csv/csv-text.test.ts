import { describe, expect, it } from 'vitest'
import { csvText } from '@shared/csv'

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

  it('runs nothing that stands in a note, a header or a row', () => {
    const text = csvText(['x\n=1+1'], [{ header: '=A', values: ['@sum(A1)', -1] }])
    expect(text).toBe("\"# x\n'=1+1\"\r\n'=A\r\n'@sum(A1)\r\n-1\r\n")
  })
})
