import { describe, expect, it } from 'vitest'
import {
  costSentence,
  dissentSentence,
  natsText,
  natsWithDeviation,
  verdictTitle,
} from '@/components/correlation/verdict-words'
import { correlationOf, correlationWithoutSampleSize } from './correlations'

const names = ['E–H', 'B–E–H'] as const

describe('the words of a verdict', () => {
  it('give the number no more digits than its error earns', () => {
    expect(natsWithDeviation(0.30123, 0.0081)).toEqual({ value: '0.301', error: '0.016' })
    expect(natsWithDeviation(0.30123, 0.00021)).toEqual({ value: '0.3012', error: '0.0004' })
    expect(natsWithDeviation(0.30123, null)).toEqual({ value: '0.301', error: null })
  })

  it('write an estimate below 0 as it is, with a real minus, and what rounds to 0 as a bound', () => {
    expect(natsText(-0.0034)).toBe('−0.003')
    expect(natsText(-0.0001)).toBe('below 0.001')
    expect(natsText(0.0004)).toBe('below 0.001')
    expect(natsWithDeviation(-0.0001, 0.002).value).toBe('0.000')
  })

  it('say what treating the terms one by one costs', () => {
    const coupled = correlationOf(0.8)
    expect(coupled.verdict).toBe('joint')
    expect(costSentence(coupled, names)).toMatch(
      /^Treating E–H and B–E–H one by one costs 0\.\d+ kT on average, and misplaces \d+ % of the configurations\.$/,
    )
    const separable = correlationOf(0)
    expect(separable.verdict).toBe('separable')
    expect(costSentence(separable, names)).toContain('two tables, one by one, keep what the chain does')
  })

  it('tell a sample size that nobody stated from one that is too small', () => {
    const unknown = correlationWithoutSampleSize(0.8)
    expect(verdictTitle(unknown)).toBe('Sample size not stated')
    expect(costSentence(unknown, names)).toContain('is not stated')
    expect(verdictTitle({ ...correlationOf(0.8), verdict: 'undecided' })).toBe('Too few samples to say')
  })

  it('say what it means to decide against the verdict, and nothing where both agree', () => {
    expect(dissentSentence('joint', 'separate')).toContain('A joint potential is advised')
    expect(dissentSentence('separable', 'joint')).toContain('separable')
    expect(dissentSentence('joint', 'joint')).toBeNull()
    expect(dissentSentence('separable', 'separate')).toBeNull()
    expect(dissentSentence('borderline', 'separate')).toBeNull()
  })
})
