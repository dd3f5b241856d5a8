import type { EntityManager } from 'typeorm'
import type { BlockCounts, BlockKind } from '../../shared/histogram'
import type { BlockFiles } from '../../shared/intake'
import { DistributionBlock } from '../entities/distribution-block.entity'
import type { UploadedFile } from './member'
import { packFile, textOf } from './source-files'

/** The block files of an upload, by what one of them is. */
export type UploadedBlocks = Readonly<Record<BlockKind, readonly UploadedFile[]>>

export const NO_UPLOADED_BLOCKS: UploadedBlocks = { time: [], chain: [] }

/** Uploaded block files as the reader takes them. */
export function blockFilesOf({ time, chain }: UploadedBlocks, firstOf: BlockKind | null): BlockFiles {
  const named = ({ name, bytes }: UploadedFile) => ({ name, text: textOf(bytes) })
  return { time: time.map(named), chain: chain.map(named), firstOf }
}

/** Blocks as they are stored, worked out before the transaction: counts, and the file of each that came in one. */
export type PackedBlock = Pick<DistributionBlock, 'kind' | 'position' | 'counts' | 'name' | 'sha256' | 'gzip'>

/**
 * @param blocks as the reader gives them: in each kind the files come last, after columns and the main file
 */
export async function packBlocks(
  blocks: readonly BlockCounts[],
  files: UploadedBlocks,
): Promise<PackedBlock[]> {
  const packed: PackedBlock[] = []
  for (const kind of ['time', 'chain'] as const) {
    const counts = blocks.filter((set) => set.kind === kind).flatMap((set) => set.counts)
    const without = counts.length - files[kind].length
    for (const [position, block] of counts.entries()) {
      const file = position < without ? null : await packFile(files[kind][position - without])
      const { name, sha256, gzip } = file ?? { name: null, sha256: null, gzip: null }
      packed.push({ kind, position, counts: [...block], name, sha256, gzip })
    }
  }
  return packed
}

/** Stores the blocks of a distribution. */
export async function storeBlocks(
  manager: EntityManager,
  groupId: string,
  distributionId: string,
  packed: readonly PackedBlock[],
): Promise<void> {
  for (const block of packed) await manager.insert(DistributionBlock, { groupId, distributionId, ...block })
}
