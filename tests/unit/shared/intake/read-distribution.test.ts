import { describe, expect, it } from 'vitest'
import { InvalidInputError } from '@shared/errors'
import { blockInefficiency } from '@shared/histogram'
import { type IntakeSettings, type NamedText, NO_BLOCK_FILES, readDistribution } from '@shared/intake'
import { createRandom } from '@shared/numeric'

const SETTINGS: IntakeSettings = {
  version: 1,
  kind: 'angle',
  unit: 'degree',
  layout: 'edges',
  value: 'count',
  columns: { low: 0, high: 1, value: 2 },
  alreadyDivided: false,
  independentSamples: null,
}
const BINS = 18

/** Counts of twelve blocks over 18 bins of 5° from 80°, each count standing for four equal ones. */
const COUNTS = (() => {
  const random = createRandom(21)
  return Array.from({ length: 12 }, () =>
    Array.from({ length: BINS }, (_, bin) => 4 * random.poisson(60 * Math.exp(-(((bin - 8) / 4) ** 2)))),
  )
})()
const whole = COUNTS[0].map((_, bin) => COUNTS.reduce((sum, block) => sum + block[bin], 0))
const file = (counts: readonly number[], name = 'all.txt', start = 80): NamedText => ({
  name,
  text: counts.map((count, bin) => `${start + 5 * bin} ${start + 5 * (bin + 1)} ${count}\n`).join(''),
})
const blockFiles = COUNTS.map((counts, block) => file(counts, `block${block + 1}.txt`))
const expected = blockInefficiency({
  kind: 'chain',
  counts: COUNTS.map((counts) => Float64Array.from(counts)),
})

const errorOf = (work: () => unknown): InvalidInputError => {
  try {
    work()
  } catch (error) {
    if (error instanceof InvalidInputError) return error
  }
  throw new Error('accepted')
}

describe('a distribution with files of its chains', () => {
  it('has the inefficiency of their counts', () => {
    const { histogram, blocks } = readDistribution(
      file(whole),
      { ...NO_BLOCK_FILES, chain: blockFiles },
      SETTINGS,
    )
    expect(histogram.blocks).toEqual(expected)
    expect(expected.inefficiency).toBeGreaterThan(2)
    expect(blocks.map(({ kind, counts }) => [kind, counts.length])).toEqual([['chain', 12]])
    expect([...histogram.weights]).toEqual(whole)
  })

  it('is their sum where the file is the first of them', () => {
    const { histogram } = readDistribution(
      blockFiles[0],
      { time: [], chain: blockFiles.slice(1), firstOf: 'chain' },
      SETTINGS,
    )
    expect([...histogram.weights]).toEqual(whole)
    expect(histogram.blocks).toEqual(expected)
  })

  it('is the sum of block columns, with the same inefficiency', () => {
    const text = whole
      .map((_, bin) => [80 + 5 * bin, 85 + 5 * bin, ...COUNTS.map((counts) => counts[bin])].join(' '))
      .join('\n')
    const columns = COUNTS.map((_, block) => block + 2)
    const { histogram } = readDistribution({ name: 'columns.txt', text }, NO_BLOCK_FILES, {
      ...SETTINGS,
      blocks: { kind: 'chain', columns },
    })
    expect([...histogram.weights]).toEqual(whole)
    expect(histogram.blocks).toEqual(expected)
  })

  it('lets the larger of time blocks and chains rule', () => {
    const even = COUNTS.map((_, block) =>
      file(
        whole.map((count) => count / 12),
        `t${block}.txt`,
      ),
    )
    const { histogram } = readDistribution(
      file(whole),
      { time: even, chain: blockFiles, firstOf: null },
      SETTINGS,
    )
    expect(histogram.blocks).toEqual(expected)
  })

  it('names a file on another grid, one with a bad line, and one that is empty', () => {
    const read = (bad: NamedText) => () =>
      readDistribution(file(whole), { ...NO_BLOCK_FILES, time: [...blockFiles, bad] }, SETTINGS)
    const shifted = errorOf(read(file(COUNTS[0], 'shifted.txt', 81)))
    expect(shifted.code).toBe('BLOCKS_DIFFER')
    expect(shifted.message).toContain('shifted.txt')
    const garbled = errorOf(
      read({ name: 'garbled.txt', text: blockFiles[0].text.replace('95 100', '95 abc') }),
    )
    expect(garbled.code).toBe('TEXT_NOT_A_NUMBER')
    expect(garbled.message).toMatch(/^garbled\.txt: Line 4, column 2/)
    expect(garbled.place.line).toBeUndefined()
    expect(
      errorOf(
        read(
          file(
            COUNTS[0].map(() => 0),
            'empty.txt',
          ),
        ),
      ).message,
    ).toContain('empty.txt')
  })

  it('refuses fewer than ten blocks, and blocks of a density', () => {
    const few = { ...NO_BLOCK_FILES, time: blockFiles.slice(3) }
    expect(errorOf(() => readDistribution(file(whole), few, SETTINGS)).code).toBe('TOO_FEW_BLOCKS')
    const density = { ...SETTINGS, value: 'density' } as const
    const blocks = { ...NO_BLOCK_FILES, time: blockFiles }
    expect(errorOf(() => readDistribution(file(whole), blocks, density)).place.field).toBe('value')
  })

  it('refuses more independent samples than all files count, not than the first', () => {
    const total = whole.reduce((sum, count) => sum + count, 0)
    const read = (independentSamples: number) => () =>
      readDistribution(
        blockFiles[0],
        { time: [], chain: blockFiles.slice(1), firstOf: 'chain' },
        { ...SETTINGS, independentSamples },
      )
    expect(read(total / 2)().histogram.independentSamples).toBe(total / 2)
    expect(errorOf(read(total + 1)).place.field).toBe('independentSamples')
  })
})

describe('a distribution of raw samples', () => {
  const settings: IntakeSettings = { ...SETTINGS, layout: 'samples', columns: { low: 0, high: 0, value: 0 } }
  const random = createRandom(22)
  /** Twelve chains about angles of their own. */
  const chains = Array.from({ length: 12 }, (_, chain) => {
    const own = 120 + 3 * random.normal()
    const lines = Array.from({ length: 300 }, () => (own + 4 * random.normal()).toFixed(4))
    return { name: `chain${chain}.txt`, text: lines.join('\n') }
  })

  it('pools the files of its chains and takes their scatter', () => {
    const { histogram } = readDistribution(
      chains[0],
      { time: [], chain: chains.slice(1), firstOf: 'chain' },
      settings,
    )
    expect(histogram.weights.reduce((sum, count) => sum + count, 0)).toBe(3600)
    expect(histogram.blocks).toMatchObject({ kind: 'chain', count: 12 })
    // A third of the variance lies between chains of 300 samples each: far above what independent samples give.
    expect(histogram.blocks!.inefficiency).toBeGreaterThan(5)
  })

  it('has the autocorrelation of the samples as evidence, and bins have none', () => {
    const { sampleInefficiency } = readDistribution(chains[0], NO_BLOCK_FILES, settings)
    expect(sampleInefficiency?.samples).toBe(300)
    // Drawn independently: g is 1 but for noise of its own deviation.
    const { inefficiency, deviation } = sampleInefficiency!.autocorrelation
    expect(inefficiency).toBeLessThan(1 + 3 * deviation)
    expect(readDistribution(file(whole), NO_BLOCK_FILES, SETTINGS).sampleInefficiency).toBeNull()
  })
})
