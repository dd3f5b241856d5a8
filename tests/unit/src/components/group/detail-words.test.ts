import { describe, expect, it } from 'vitest'
import { detailWords } from '@/components/group/detail-words'

describe('detailWords', () => {
  it.each([
    [{}, ''],
    [{ what: 'jointAbove', old: 0.1, new: 0.2 }, 'joint potential from: 0.1 → 0.2'],
    [{ old: 'reviewer', new: 'owner' }, 'reviewer → owner'],
    [{ role: 'modeller' }, 'role: modeller'],
    [{ temperature: '400 K', file: 'bond.txt' }, 'temperature: 400 K, file: bond.txt'],
    [{ what: 'independent samples', new: null }, 'independent samples'],
  ])('says %o as %j', (details, words) => {
    expect(detailWords(details)).toBe(words)
  })
})
