import { type Zippable, zipSync } from 'fflate'
import type { EntityManager } from 'typeorm'
import type { FrozenHandOver } from '../../../shared/contracts/hand-over'
import { formatNumber } from '../../../shared/tables'
import { HandOverFile } from '../../entities/hand-over-file.entity'
import { HandOverTable } from '../../entities/hand-over-table.entity'
import type { HandOver } from '../../entities/hand-over.entity'
import { HttpError } from '../../errors/http-error'
import { sha256 } from '../hashes'
import type { Download } from '../member'
import { fileNamePart } from '../table-names'
import { textFile } from './freeze'
import {
  type ListedFile,
  MANIFEST_PATH,
  SUMS_PATH,
  type Withdrawal,
  WITHDRAWN_PATH,
  writeManifest,
  writeSums,
} from './manifest'

/** A released hand-over: everything frozen is there. */
export type ReleasedHandOver = HandOver & { readonly frozen: FrozenHandOver; readonly releasedAt: Date }

/**
 * The files of a released hand-over, each checked against its checksum and against SHA256SUMS. Of a withdrawn one, a file and the
 * manifest say so; all others are as they were released.
 *
 * @throws {HttpError} FILE_DAMAGED when a stored file is not the one that was released
 */
export async function releasedFiles(
  manager: EntityManager,
  handOver: ReleasedHandOver,
): Promise<ListedFile[]> {
  const stored = await manager.find(HandOverFile, {
    where: { handOverId: handOver.id },
    order: { position: 'ASC' },
    select: { id: true, path: true, mediaType: true, size: true, sha256: true, bytes: true },
  })
  const sums = stored.find(({ path }) => path === SUMS_PATH)
  const listed = new Map(
    (sums?.bytes.toString() ?? '').split('\n').flatMap((line) => {
      const [sum, path] = line.split('  ')
      return path === undefined ? [] : [[path, sum] as const]
    }),
  )
  for (const file of stored) {
    const sum = sha256(file.bytes)
    if (sum !== file.sha256 || (file !== sums && listed.get(file.path) !== sum))
      throw damaged(handOver, file.path)
  }
  const missing = [...listed.keys()].find((path) => !stored.some((file) => file.path === path))
  if (!sums || missing !== undefined) throw damaged(handOver, missing ?? SUMS_PATH)
  return withdrawnFiles(manager, handOver, stored)
}

/** The archive of checked files: the same files give the same bytes. */
export function packFiles({ frozen, releasedAt }: ReleasedHandOver, files: readonly ListedFile[]): Download {
  const { polymer, mapping, statePoint, number } = frozen
  // Archives hold local time without a zone: this one reads as UTC wherever the server runs.
  const mtime = new Date(releasedAt.getTime() + releasedAt.getTimezoneOffset() * 60_000)
  const archive: Zippable = {}
  for (const { path, bytes } of files) archive[path] = [bytes, { mtime }]
  const parts = [
    fileNamePart(polymer.name),
    fileNamePart(mapping.name),
    `${formatNumber(statePoint.temperature)}K`,
  ]
  return { fileName: `${parts.join('_')}_hand-over-${number}.zip`, bytes: zipSync(archive) }
}

/** The withdrawal of a hand-over as its files tell of it; null while it stands. */
export function withdrawalOf(handOver: ReleasedHandOver): Withdrawal | null {
  const { withdrawnAt, withdrawnReason, withdrawnBy } = handOver
  if (withdrawnAt === null) return null
  return { at: withdrawnAt.toISOString(), by: withdrawnBy?.name ?? null, reason: withdrawnReason ?? '' }
}

async function withdrawnFiles(
  manager: EntityManager,
  handOver: ReleasedHandOver,
  stored: readonly ListedFile[],
): Promise<ListedFile[]> {
  const { id, frozen } = handOver
  const withdrawal = withdrawalOf(handOver)
  if (withdrawal === null) return [...stored]
  const tables = await manager.find(HandOverTable, {
    where: { handOverId: id },
    order: { position: 'ASC' },
    select: { id: true, name: true, path: true, kinds: true, meta: true },
  })
  const notice = textFile(WITHDRAWN_PATH, 'text/plain; charset=utf-8', noticeText(frozen.number, withdrawal))
  const kept = stored.filter(({ path }) => path !== MANIFEST_PATH && path !== SUMS_PATH)
  const files = [notice, ...kept]
  const manifest = textFile(
    MANIFEST_PATH,
    'application/json',
    writeManifest(frozen, tables, files, withdrawal),
  )
  const sums = textFile(SUMS_PATH, 'text/plain; charset=utf-8', writeSums([...files, manifest]))
  return [...files, manifest, sums]
}

function noticeText(number: number, { at, by, reason }: Withdrawal): string {
  return [
    `Hand-over ${number} was withdrawn on ${at.slice(0, 10)}${by === null ? '' : ` by ${by}`}.`,
    '',
    reason,
    '',
    'Its files stay for the record. Do not start new simulations from them.',
    '',
  ].join('\n')
}

function damaged({ frozen }: ReleasedHandOver, path: string): HttpError {
  return new HttpError(
    'FILE_DAMAGED',
    `The stored file ${path} of hand-over ${frozen.number} is not the one that was released: its checksum differs. Nothing is handed out; restore it from a backup.`,
  )
}
