import { describe, expect, it } from 'vitest'
import { bandText, decimalsFor, fixedText, rangeText, significantText } from '@/components/figure/number-text'

describe('fixedText', () => {
  it('parts thousands by a no-break space and writes a real minus', () => {
    expect(fixedText(120005)).toBe('120\u00a0005')
    expect(fixedText(-12.5, 1)).toBe('−12.5')
  })

  it('writes no minus before a zero', () => {
    expect(fixedText(-0.2)).toBe('0')
    expect(fixedText(-0.001, 2)).toBe('0.00')
  })
})

describe('significantText', () => {
  it('keeps the digits asked for and no powers of ten', () => {
    expect(significantText(0.000123456, 3)).toBe('0.000123')
    expect(significantText(12345.6, 3)).toBe('12\u00a0346')
  })

  it('stops at the decimals allowed', () => {
    expect(significantText(0.00229, 3, 2)).toBe('0.00')
  })
})

describe('bandText', () => {
  it('gives value and half width the two digits the half width earns', () => {
    expect(bandText(3.8012, 0.4093)).toBe('3.80 ± 0.41')
    expect(bandText(17.04, 2.36)).toBe('17.0 ± 2.4')
    expect(bandText(120.4, 14.2)).toBe('120 ± 14')
  })

  it('gives no ± where the error is unknown or nothing', () => {
    expect(bandText(3.8012, null)).toBe('3.80')
    expect(bandText(0.00095, 3e-8)).toBe('0.00')
  })
})

describe('rangeText', () => {
  it('joins edges by a dash, and by a word where a minus would run into it', () => {
    expect(rangeText(130, 132, 0)).toBe('130–132')
    expect(rangeText(-48, -44, 0)).toBe('−48 to −44')
  })
})

describe('decimalsFor', () => {
  it('is never negative and never above ten', () => {
    expect([decimalsFor(12345, 2), decimalsFor(0, 3), decimalsFor(1e-30, 2)]).toEqual([0, 0, 10])
  })
})
