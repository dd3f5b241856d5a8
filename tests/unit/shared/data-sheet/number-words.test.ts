import { describe, expect, it } from 'vitest'
import { countWords, dayWords, numberWords, sizeWords } from '@shared/data-sheet'
import { errorWords, fixedWords } from '@shared/data-sheet/number-words'

describe('numbers of a data sheet', () => {
  it('show a value to the last digit that its error has earned', () => {
    expect(errorWords(39312.7, 1404)).toBe('39\u00a0300 ± 1400')
    expect(errorWords(0.300124, 0.00021)).toBe('0.30012 ± 0.00021')
    expect(errorWords(-12.34, 3)).toBe('−12.3 ± 3.0')
  })

  it('claim no error where none is known', () => {
    expect(errorWords(12.3456, null)).toBe('12.35')
    expect(errorWords(12.3456, NaN)).toBe('12.35')
  })

  it('have a real minus, but none before a zero', () => {
    expect(fixedWords(-0.5, 1)).toBe('−0.5')
    expect(fixedWords(-0.004, 2)).toBe('0.00')
  })

  it('are written as powers of ten where they are very small or large', () => {
    expect(numberWords(1.234e-5, 3)).toBe('1.23 × 10⁻⁵')
    expect(numberWords(0.0042, 3)).toBe('0.0042')
  })

  it('group whole numbers of five digits and more', () => {
    expect(countWords(6754)).toBe('6754')
    expect(countWords(150_330)).toBe('150\u00a0330')
  })

  it('tell sizes and days in words', () => {
    expect(sizeWords(17_400)).toBe('17\u00a0kB')
    expect(dayWords('2026-06-12T23:59:00.000Z')).toBe('12 June 2026')
  })
})
