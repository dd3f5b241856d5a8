import { describe, expect, it } from 'vitest'
import { emptyRuns, populatedBins } from '@/components/bench/figure/empty-bins'
import { emptyBrackets } from '@/components/bench/figure/empty-brackets'
import { linearScale } from '@/components/figure/linear-scale'

describe('emptyRuns', () => {
  it('joins neighbouring empty bins', () => {
    expect(emptyRuns([0, 0, 3, 0, 1, 0])).toEqual([
      { first: 0, last: 1 },
      { first: 3, last: 3 },
      { first: 5, last: 5 },
    ])
  })

  it('finds none where every bin has counts', () => {
    expect(emptyRuns([1, 2, 3])).toEqual([])
  })
})

describe('populatedBins', () => {
  it('finds the outermost bins with counts', () => {
    expect(populatedBins([0, 0, 3, 0, 1, 0])).toEqual({ first: 2, last: 4 })
  })
})

describe('emptyBrackets', () => {
  const edges = Array.from({ length: 13 }, (_, edge) => 10 * edge)
  const wide = linearScale([0, 120], [0, 240])

  it('draws a bracket under every empty bin that is wide enough', () => {
    const { brackets } = emptyBrackets([{ first: 0, last: 3 }], edges, wide)
    expect(brackets).toHaveLength(4)
    expect(brackets[0].from).toBeCloseTo(1.2, 12)
    expect(brackets[0].to).toBeCloseTo(18.8, 12)
  })

  it('draws one bracket for a run of narrow bins', () => {
    const { brackets } = emptyBrackets([{ first: 0, last: 3 }], edges, linearScale([0, 120], [0, 48]))
    expect(brackets).toEqual([{ from: 1.2, to: 16 - 1.2 }])
  })

  it('leaves out what lies outside the shown axis and cuts what crosses its end', () => {
    const part = linearScale([25, 120], [0, 950])
    const { brackets } = emptyBrackets([{ first: 0, last: 2 }], edges, part)
    expect(brackets).toEqual([{ from: 1.2, to: 50 - 1.2 }])
  })

  it('says "no counts" over the widest run, and only where the words fit', () => {
    const runs = [
      { first: 0, last: 0 },
      { first: 2, last: 6 },
    ]
    expect(emptyBrackets(runs, edges, wide).labelAt).toBeCloseTo(90, 9)
    expect(emptyBrackets(runs, edges, linearScale([0, 120], [0, 120])).labelAt).toBeNull()
  })
})
