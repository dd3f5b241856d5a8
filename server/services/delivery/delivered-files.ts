import type { EntityManager } from 'typeorm'
import { HandOverTable } from '../../entities/hand-over-table.entity'
import { packFiles, type ReleasedHandOver, releasedFiles, withdrawalOf } from '../hand-over/archive'
import { textFile } from '../hand-over/freeze'
import { type ListedFile, MANIFEST_PATH, SUMS_PATH, writeManifest, writeSums } from '../hand-over/manifest'
import { writeReleaseReadme } from '../hand-over/release-readme'
import type { Download } from '../member'
import { fileNamePart } from '../table-names'
import { type DeliveryLayout, frozenInLayout, nameWritten } from './delivery-layout'
import { writeFrozenTable } from './frozen-tables'

/** The files of a release as somebody takes them. */
export interface DeliveredFiles {
  readonly files: readonly ListedFile[]
  readonly tables: readonly HandOverTable[]
  /** Name of the layout. */
  readonly layout: string
  /** What the file of a table is called in it. */
  readonly nameOf: (path: string) => string
  readonly pack: () => Download
}

/**
 * All files of a release, each checked against its checksum first. In another layout the tables are written anew from the frozen
 * numbers, with a README, a manifest and checksums of their own; mapping file and picture are those of the release.
 *
 * @param layout null for the files as they were released
 * @throws {HttpError} FILE_DAMAGED
 * @throws {InvalidInputError} where the layout does not fit a table
 */
export async function deliveredFiles(
  manager: EntityManager,
  handOver: ReleasedHandOver,
  layout: DeliveryLayout | null,
): Promise<DeliveredFiles> {
  const released = await releasedFiles(manager, handOver)
  const tables = await manager.find(HandOverTable, {
    where: { handOverId: handOver.id },
    order: { position: 'ASC' },
  })
  if (layout === null) {
    const { name } = handOver.frozen.layout
    return {
      files: released,
      tables,
      layout: name,
      nameOf: (path) => path,
      pack: () => packFiles(handOver, released),
    }
  }
  const files = filesInLayout(handOver, layout, tables, released)
  return {
    files,
    tables,
    layout: layout.name,
    nameOf: (path) => nameWritten(path, layout),
    pack: () => {
      const { fileName, bytes } = packFiles(handOver, files)
      return { fileName: fileName.replace(/\.zip$/, `_${fileNamePart(layout.name)}.zip`), bytes }
    },
  }
}

function filesInLayout(
  handOver: ReleasedHandOver,
  layout: DeliveryLayout,
  tables: readonly HandOverTable[],
  released: readonly ListedFile[],
): ListedFile[] {
  const renamed = tables.map(({ name, path, kinds, meta }) => ({
    name,
    path: nameWritten(path, layout),
    kinds,
    meta,
  }))
  const frozen = frozenInLayout(handOver.frozen, layout, renamed)
  const mediaType = layout.document.writing === 'json' ? 'application/json' : 'text/plain; charset=utf-8'
  const files = released
    .filter(({ path }) => path !== MANIFEST_PATH && path !== SUMS_PATH)
    .map((file) => {
      const table = tables.find(({ path }) => path === file.path)
      if (table) {
        const text = writeFrozenTable(handOver.frozen, table, layout.document)
        return textFile(nameWritten(file.path, layout), mediaType, text)
      }
      return file.path === README_PATH
        ? textFile(README_PATH, file.mediaType, writeReleaseReadme(frozen, renamed))
        : file
    })
  const manifest = textFile(
    MANIFEST_PATH,
    'application/json',
    writeManifest(frozen, renamed, files, withdrawalOf(handOver)),
  )
  const sums = textFile(SUMS_PATH, 'text/plain; charset=utf-8', writeSums([...files, manifest]))
  return [...files, manifest, sums]
}

const README_PATH = 'README.txt'
