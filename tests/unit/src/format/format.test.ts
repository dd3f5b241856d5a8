import { describe, expect, it } from 'vitest'
import { keySigns } from '@/format/keys'
import { countOf, formatBytes, formatCount, formatFixed, formatShort } from '@/format/numbers'
import { statePointDescription, statePointName } from '@/format/state-point'

const spaced = (text: string): string => text.replaceAll('\u00a0', ' ')

describe('numbers', () => {
  it('parts thousands by a no-break space and writes a real minus', () => {
    expect(formatCount(1234567)).toBe('1\u00a0234\u00a0567')
    expect(formatCount(999)).toBe('999')
    expect(formatCount(-1200)).toBe('\u22121\u00a0200')
  })

  it('never shows a negative zero', () => {
    expect(formatFixed(-0.0004, 2)).toBe('0.00')
    expect(formatFixed(-1.005, 1)).toBe('\u22121.0')
  })

  it('keeps a short number short', () => {
    expect(formatShort(400)).toBe('400')
    expect(formatShort(-0.1, 3)).toBe('\u22120.1')
  })

  it.each([
    [999, '999 bytes'],
    [17_400, '17 kB'],
    [2_350_000, '2.4 MB'],
  ])('writes the size of %d bytes', (bytes, text) => {
    expect(spaced(formatBytes(bytes))).toBe(text)
  })

  it('agrees in number with what it counts', () => {
    expect(countOf(1, 'table')).toBe('1 table')
    expect(countOf(0, 'table')).toBe('0 tables')
    expect(countOf(2, 'axis', 'axes')).toBe('2 axes')
  })
})

describe('state points', () => {
  const melt = { temperature: 400, pressure: 1, phase: 'melt', composition: '20 % water' }

  it('are named by temperature and phase, and described by all there is', () => {
    expect(statePointName(melt)).toBe('400 K, melt')
    expect(statePointDescription(melt)).toBe('400 K, 1 bar, melt, 20 % water')
  })

  it('leave out what nobody stated', () => {
    const bare = { temperature: 450.5, pressure: null, phase: '', composition: '' }
    expect(statePointName(bare)).toBe('450.5 K')
    expect(statePointDescription(bare)).toBe('450.5 K')
  })
})

describe('keySigns', () => {
  const run = () => undefined

  it('prints one sign per key cap, with the keys held before it', () => {
    expect(keySigns({ keys: ['j', 'k'], label: 'term', run })).toEqual(['J', 'K'])
    expect(keySigns({ keys: ['ArrowLeft'], label: 'reading', run })).toEqual(['←'])
    expect(keySigns({ keys: ['z'], label: 'redo', withControl: true, withShift: true, run })).toEqual([
      'Ctrl',
      'Shift',
      'Z',
    ])
  })

  it('prints given signs as they are', () => {
    expect(keySigns({ keys: ['1', '2', '3'], signs: ['1–3'], label: 'bead', run })).toEqual(['1–3'])
  })
})
