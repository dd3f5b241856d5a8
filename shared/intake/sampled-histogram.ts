import { InvalidInputError } from '../errors'
import {
  accumulate,
  type BlockCounts,
  type BlockKind,
  createHistogram,
  sampleEdges,
  sampleInefficiency,
} from '../histogram'
import { type BlockFiles, type DistributionReading, inFile } from './block-files'
import type { IntakeSettings } from './intake-settings'
import type { NumericTable } from './numeric-table'
import { readColumns } from './read-columns'
import { readSamples } from './read-samples'

interface SampledPart {
  readonly name: string
  readonly samples: Float64Array
}

/**
 * The histogram of raw samples, with the counts of block files on the bins chosen for the whole.
 *
 * @throws {InvalidInputError} as `readSamples`, a block file by its name; EDGE_OUT_OF_RANGE where a block holds a sample
 *   outside the range of a main file that holds the whole; SETTING_INVALID for samples "already divided"
 */
export function sampledHistogram(
  table: NumericTable,
  files: BlockFiles,
  settings: IntakeSettings,
): DistributionReading {
  const { kind, unit, columns, independentSamples, alreadyDivided } = settings
  if (alreadyDivided) {
    throw new InvalidInputError(
      'SETTING_INVALID',
      'Raw samples cannot have been divided by their Jacobian.',
      { field: 'alreadyDivided' },
    )
  }
  const main = readSamples(table, columns.low, kind, unit)
  const parts = { time: readParts(files, 'time', settings), chain: readParts(files, 'chain', settings) }
  const { firstOf } = files
  const samples = firstOf === null ? main : joined([main, ...parts[firstOf].map((part) => part.samples)])
  const edges = sampleEdges(kind, samples)
  const weights = accumulate(samples, edges)
  const blocks = (['time', 'chain'] as const).flatMap((block): BlockCounts[] => {
    const counts = parts[block].map((part) => inFile(part.name, () => accumulate(part.samples, edges)))
    if (firstOf === block) counts.unshift(accumulate(main, edges))
    return counts.length === 0 ? [] : [{ kind: block, counts }]
  })
  return {
    histogram: createHistogram({ kind, edges, weights, content: 'count', independentSamples }),
    notes: [`${samples.length} samples were put into ${edges.length - 1} bins.`],
    blocks,
    sampleInefficiency: sampleInefficiency(kind, main),
  }
}

function readParts(
  files: BlockFiles,
  block: BlockKind,
  { columns, kind, unit }: IntakeSettings,
): SampledPart[] {
  return files[block].map(({ name, text }) => ({
    name,
    samples: inFile(name, () => readSamples(readColumns(text), columns.low, kind, unit)),
  }))
}

function joined(parts: readonly Float64Array[]): Float64Array {
  const all = new Float64Array(parts.reduce((length, part) => length + part.length, 0))
  let start = 0
  for (const part of parts) {
    all.set(part, start)
    start += part.length
  }
  return all
}
