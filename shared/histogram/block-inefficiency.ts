import { InvalidInputError } from '../errors'

/** What one block is: a stretch of time of all chains, or one chain for the whole time. */
export type BlockKind = 'time' | 'chain'

/** Fewer blocks than this give no statistical inefficiency that could be relied on. */
export const LEAST_BLOCKS = 10

/** Neighbouring time blocks are merged where that raises g by more than this many of its deviations. */
const RISE_DEVIATIONS = 2

/** Counts of one histogram, block by block. */
export interface BlockCounts {
  readonly kind: BlockKind
  /** One array per block, each over the same bins, in the order of time for time blocks. */
  readonly counts: readonly Float64Array[]
}

/** Statistical inefficiency g of the counts of a histogram, and what it rests on. */
export interface BlockInefficiency {
  readonly kind: BlockKind
  /** Number of blocks or chains that were given. */
  readonly count: number
  /** g, at least 1. */
  readonly inefficiency: number
  /** Standard deviation of g, from the scatter of the blocks' own contributions to it. */
  readonly deviation: number
}

/**
 * Statistical inefficiency of the counts of a histogram: variance between blocks over the multinomial variance that
 * independent samples would give,
 *
 *   g = Σ_b Σ_i (n_bi − N_b p_i)² / N_b  /  [(B − 1) Σ_i p_i (1 − p_i)],   p_i = Σ_b n_bi / Σ_b N_b,
 *
 * so that each bin weighs with its own variance p (1 − p), which is its count where no bin dominates; blocks may differ in
 * size. Independent samples give 1 on average, and a smaller value is noise: g is never below 1. The blocks must be much
 * longer than what is remembered; time blocks that are not are found by merging neighbours two by two, as long as 10 remain:
 * a merged g that is higher by more than two of its deviations takes over (Flyvbjerg & Petersen, J. Chem. Phys. 91 (1989)
 * 461, for the mean of a series). Chains have no order and are not merged.
 *
 * @throws {InvalidInputError} TOO_FEW_BLOCKS with fewer than 10 blocks; LENGTH_MISMATCH with the index of a block that has
 *   another number of bins than the first; TOO_FEW_SAMPLES with the index of an empty block; TOO_FEW_BINS when all counts
 *   lie in one bin
 */
export function blockInefficiency({ kind, counts }: BlockCounts): BlockInefficiency {
  checkBlocks(kind, counts)
  let best = betweenBlocks(counts)
  if (kind === 'time') {
    for (let merged = mergePairs(counts); merged.length >= LEAST_BLOCKS; merged = mergePairs(merged)) {
      const level = betweenBlocks(merged)
      if (level.inefficiency - best.inefficiency > RISE_DEVIATIONS * level.deviation) best = level
    }
  }
  return { kind, count: counts.length, ...best, inefficiency: Math.max(1, best.inefficiency) }
}

/** The larger g rules, since each kind of block sees correlation that the other averages away; null of none. */
export function rulingInefficiency(found: readonly BlockInefficiency[]): BlockInefficiency | null {
  return found.reduce<BlockInefficiency | null>(
    (ruling, each) => (ruling === null || each.inefficiency > ruling.inefficiency ? each : ruling),
    null,
  )
}

function checkBlocks(kind: BlockKind, counts: readonly Float64Array[]): void {
  if (counts.length < LEAST_BLOCKS) {
    const found = `${counts.length} ${kind === 'time' ? 'block' : 'chain'}${counts.length === 1 ? '' : 's'}`
    throw new InvalidInputError(
      'TOO_FEW_BLOCKS',
      `There ${counts.length === 1 ? 'is' : 'are'} ${found}; at least ${LEAST_BLOCKS} are needed to judge how correlated the samples are.`,
    )
  }
  counts.forEach((block, index) => {
    if (block.length !== counts[0].length) {
      throw new InvalidInputError(
        'LENGTH_MISMATCH',
        `Block ${index + 1} has ${block.length} bins, the first one ${counts[0].length}.`,
        { index },
      )
    }
    if (!(sum(block) > 0)) {
      throw new InvalidInputError('TOO_FEW_SAMPLES', `Block ${index + 1} holds no counts.`, { index })
    }
  })
}

function betweenBlocks(counts: readonly Float64Array[]): { inefficiency: number; deviation: number } {
  const totals = counts.map(sum)
  const total = totals.reduce((all, each) => all + each, 0)
  const shares = counts[0].map((_, bin) => counts.reduce((all, block) => all + block[bin], 0) / total)
  const multinomial = shares.reduce((all, share) => all + share * (1 - share), 0)
  if (!(multinomial > 0)) {
    throw new InvalidInputError('TOO_FEW_BINS', 'All counts of the blocks lie in one bin.')
  }
  const scatters = counts.map((block, index) =>
    block.reduce((all, count, bin) => all + (count - totals[index] * shares[bin]) ** 2 / totals[index], 0),
  )
  const blocks = counts.length
  const mean = scatters.reduce((all, each) => all + each, 0) / blocks
  const variance = scatters.reduce((all, each) => all + (each - mean) ** 2, 0) / (blocks - 1)
  const scale = blocks / ((blocks - 1) * multinomial)
  return { inefficiency: scale * mean, deviation: scale * Math.sqrt(variance / blocks) }
}

/** Neighbours added two by two; an odd last one is left out. */
function mergePairs(counts: readonly Float64Array[]): Float64Array[] {
  return Array.from({ length: Math.floor(counts.length / 2) }, (_, pair) =>
    counts[2 * pair].map((count, bin) => count + counts[2 * pair + 1][bin]),
  )
}

function sum(values: Float64Array): number {
  return values.reduce((total, value) => total + value, 0)
}
