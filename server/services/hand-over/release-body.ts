import type { FrozenHandOver } from '../../../shared/contracts/hand-over'
import type {
  HandOver as HandOverBody,
  HandOverRelease,
  ReleasedTable,
} from '../../../shared/contracts/hand-over-desk'
import type { HandOverTable } from '../../entities/hand-over-table.entity'
import { sha256 } from '../hashes'
import type { Download } from '../member'
import { PICTURE_PATH } from './freeze'
import type { ListedFile } from './manifest'

/** Rows of a file that its first lines show. */
const SHOWN_ROWS = 3

/** A released hand-over as its page shows it. */
export function releaseBody(
  head: HandOverBody,
  frozen: FrozenHandOver,
  tables: readonly HandOverTable[],
  files: readonly ListedFile[],
  archive: Download,
): HandOverRelease {
  const textOf = (path: string): string =>
    Buffer.from(files.find((file) => file.path === path)?.bytes ?? []).toString()
  return {
    ...head,
    frozen,
    tables: tables.map((table) => tableBody(table, textOf(table.path))),
    files: files.map(({ path, mediaType, bytes }) => ({
      path,
      mediaType,
      size: bytes.length,
      sha256: sha256(bytes),
    })),
    picture: textOf(PICTURE_PATH),
    archive: { fileName: archive.fileName, size: archive.bytes.length, sha256: sha256(archive.bytes) },
  }
}

function tableBody(table: HandOverTable, text: string): ReleasedTable {
  const { id, name, path, kinds, coordinates, secondCoordinates, meta, silhouette } = table
  const axes = secondCoordinates === null ? [coordinates] : [coordinates, secondCoordinates]
  return {
    id,
    name,
    path,
    kinds,
    types: meta.types,
    domain: axes.map((axis): [number, number] => [axis[0], axis[axis.length - 1]]),
    rows: axes.map((axis) => axis.length),
    lowestAt: meta.lowestAt,
    silhouette,
    firstLines: firstLines(text),
  }
}

/** What a file looks like: its first lines of text, the line above the rows, the first rows and the last; … for what lies between. */
export function firstLines(text: string): string[] {
  const lines = text.split('\n').filter((line) => line.trim() !== '')
  const first = lines.findIndex((line) => /^\s*[-+.\d]/.test(line))
  if (first < 0) return lines.slice(0, 2 * SHOWN_ROWS)
  const above = lines.slice(0, first)
  const rows = lines.slice(first)
  return [
    ...(above.length > 4 ? [...above.slice(0, 2), '# …', above[above.length - 1]] : above),
    ...rows.slice(0, SHOWN_ROWS),
    ...(rows.length > SHOWN_ROWS + 1 ? ['…'] : []),
    ...rows.slice(Math.max(SHOWN_ROWS, rows.length - 1)),
  ]
}
