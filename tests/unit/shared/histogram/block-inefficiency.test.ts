import { describe, expect, it } from 'vitest'
import { InvalidInputError } from '@shared/errors'
import { blockInefficiency, rulingInefficiency, sampleInefficiency } from '@shared/histogram'
import { createRandom } from '@shared/numeric'

const SHARES = Array.from({ length: 30 }, (_, bin) => Math.exp(-0.5 * ((bin - 14) / 5) ** 2))
const TOTAL = SHARES.reduce((sum, share) => sum + share, 0)

/** Poisson blocks of one distribution; each count stands for `repeats` equal ones. */
function blocks(count: number, samples: number, repeats = 1, seed = 1): Float64Array[] {
  const random = createRandom(seed)
  return Array.from({ length: count }, () =>
    Float64Array.from(SHARES, (share) => repeats * random.poisson((samples * share) / TOTAL)),
  )
}

const codeOf = (work: () => unknown): string => {
  try {
    work()
    return 'accepted'
  } catch (error) {
    return error instanceof InvalidInputError ? error.code : String(error)
  }
}

describe('the inefficiency of blocks', () => {
  it('is 1 for independent samples, within three of its deviations', () => {
    const { inefficiency, deviation } = blockInefficiency({ kind: 'chain', counts: blocks(100, 2000) })
    expect(inefficiency - 1).toBeLessThan(3 * deviation)
    expect(deviation).toBeLessThan(0.05)
  })

  it('is never below 1', () => {
    const counts = Array.from({ length: 10 }, () => Float64Array.from(SHARES, (share) => 1000 * share))
    expect(blockInefficiency({ kind: 'time', counts }).inefficiency).toBe(1)
  })

  it('is the number of times each sample was counted', () => {
    // Multiplying all counts multiplies their variance by its square and the multinomial variance once: analytic.
    const [single, repeated] = [2, 14].map(
      (repeats) => blockInefficiency({ kind: 'chain', counts: blocks(40, 500, repeats, 3) }).inefficiency,
    )
    expect(repeated / single).toBeCloseTo(7, 9)
  })

  it('does not depend on how the blocks are sized', () => {
    const random = createRandom(5)
    const counts = Array.from({ length: 200 }, (_, block) =>
      Float64Array.from(SHARES, (share) => 5 * random.poisson(((200 + 10 * block) * share) / TOTAL)),
    )
    const { inefficiency, deviation } = blockInefficiency({ kind: 'chain', counts })
    expect(Math.abs(inefficiency - 5)).toBeLessThan(3 * deviation)
    expect(deviation).toBeLessThan(0.3)
  })

  it('states a deviation that is the scatter of g over repetitions', () => {
    const found = Array.from({ length: 200 }, (_, seed) =>
      blockInefficiency({ kind: 'chain', counts: blocks(20, 400, 3, seed + 10) }),
    )
    const mean = found.reduce((sum, { inefficiency }) => sum + inefficiency, 0) / found.length
    const scatter = Math.sqrt(
      found.reduce((sum, { inefficiency }) => sum + (inefficiency - mean) ** 2, 0) / found.length,
    )
    const stated = found.reduce((sum, { deviation }) => sum + deviation, 0) / found.length
    // A deviation from 200 repetitions is itself uncertain by 1/√400 = 5 %; 20 blocks each are by 16 % / √200.
    expect(Math.abs(stated / scatter - 1)).toBeLessThan(0.2)
  })

  it('grows with the differences between chains', () => {
    const random = createRandom(7)
    const counts = Array.from({ length: 50 }, () => {
      const shift = 2 * random.normal()
      return Float64Array.from(SHARES, (_, bin) =>
        random.poisson(100 * Math.exp(-0.5 * ((bin - 14 - shift) / 5) ** 2)),
      )
    })
    expect(blockInefficiency({ kind: 'chain', counts }).inefficiency).toBeGreaterThan(4)
  })

  it('merges time blocks that are shorter than the memory, and never chains', () => {
    // Each sixteen neighbours repeat one draw: blocks of one give g = 1 × 1, merged ones 16 times as much.
    const counts = blocks(30, 400, 1, 8).flatMap((block) => Array.from({ length: 16 }, () => block))
    const time = blockInefficiency({ kind: 'time', counts })
    const { inefficiency } = blockInefficiency({ kind: 'chain', counts })
    expect(inefficiency).toBeLessThan(1.2)
    expect(Math.abs(time.inefficiency - 16)).toBeLessThan(3 * time.deviation)
    expect(time.count).toBe(480)
  })

  it('refuses fewer than 10 blocks, unequal ones, empty ones and a single filled bin', () => {
    const ten = blocks(10, 300)
    expect(codeOf(() => blockInefficiency({ kind: 'time', counts: ten.slice(1) }))).toBe('TOO_FEW_BLOCKS')
    expect(codeOf(() => blockInefficiency({ kind: 'time', counts: [...ten, ten[0].slice(1)] }))).toBe(
      'LENGTH_MISMATCH',
    )
    expect(codeOf(() => blockInefficiency({ kind: 'time', counts: [...ten, new Float64Array(30)] }))).toBe(
      'TOO_FEW_SAMPLES',
    )
    const single = Array.from({ length: 10 }, () => Float64Array.of(0, 5, 0))
    expect(codeOf(() => blockInefficiency({ kind: 'time', counts: single }))).toBe('TOO_FEW_BINS')
  })

  it('leaves the rule to the larger of several', () => {
    const time = { kind: 'time', count: 20, inefficiency: 3, deviation: 1 } as const
    const chain = { kind: 'chain', count: 12, inefficiency: 8, deviation: 3 } as const
    expect(rulingInefficiency([time, chain])).toBe(chain)
    expect(rulingInefficiency([chain, time])).toBe(chain)
    expect(rulingInefficiency([])).toBeNull()
  })
})

describe('the inefficiency of samples', () => {
  it('is that of a dihedral although it jumps by a full turn', () => {
    // A dihedral that drifts slowly about ±180°: as plain numbers it would jump between −π and π all the time.
    const random = createRandom(9)
    let bend = 0
    const samples = Float64Array.from({ length: 20_000 }, () => {
      bend = 0.95 * bend + 0.05 * random.normal()
      return bend < 0 ? bend + Math.PI : bend - Math.PI
    })
    const found = sampleInefficiency('dihedral', samples)!
    // (1 + a)/(1 − a) = 39 for a small angle, where sin φ is the angle itself: analytic.
    expect(Math.abs(found.autocorrelation.inefficiency - 39)).toBeLessThan(
      4 * found.autocorrelation.deviation,
    )
  })

  it('is no number for a constant', () => {
    expect(sampleInefficiency('bond', new Float64Array(50).fill(0.3))).toBeNull()
  })

  it('is seen beyond the longest lag by averaging pairs', () => {
    const random = createRandom(11)
    let value = 0
    const samples = Float64Array.from({ length: 400_000 }, () => (value = 0.998 * value + random.normal()))
    const found = sampleInefficiency('bond', samples)!
    expect(found.autocorrelation.window).toBeGreaterThan(256)
    // (1 + a)/(1 − a) = 999: analytic.
    expect(Math.abs(found.autocorrelation.inefficiency - 999)).toBeLessThan(
      4 * found.autocorrelation.deviation,
    )
    expect(found.autocorrelation.deviation).toBeLessThan(300)
  })
})
