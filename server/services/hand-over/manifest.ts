import type { FrozenHandOver, FrozenTableMeta } from '../../../shared/contracts/hand-over'
import type { CoordinateKind } from '../../../shared/units'
import { sha256 } from '../hashes'

/** Format name and version of the manifest, so that programs know what they read. */
export const MANIFEST_FORMAT = 'beadwright hand-over manifest'
export const MANIFEST_VERSION = 1
export const MANIFEST_PATH = 'manifest.json'
export const SUMS_PATH = 'SHA256SUMS'
export const WITHDRAWN_PATH = 'WITHDRAWN.txt'

/** A file with what is needed to list it. */
export interface ListedFile {
  readonly path: string
  readonly mediaType: string
  readonly bytes: Uint8Array
}

/** A withdrawal as the manifest tells it. */
export interface Withdrawal {
  readonly at: string
  readonly by: string | null
  readonly reason: string
}

/** What a manifest says of a table beside its file. */
export interface ManifestTable {
  readonly name: string
  readonly path: string
  readonly kinds: readonly CoordinateKind[]
  readonly meta: FrozenTableMeta
}

/**
 * The manifest as JSON text: what the hand-over is, and each file with size and SHA-256. It lists every file but itself and
 * SHA256SUMS, which covers all others, the manifest too.
 */
export function writeManifest(
  frozen: FrozenHandOver,
  tables: readonly ManifestTable[],
  files: readonly ListedFile[],
  withdrawn: Withdrawal | null,
): string {
  const { number, title, group, invented, polymer, mapping, statePoint, layout, replaces } = frozen
  const manifest = {
    format: MANIFEST_FORMAT,
    version: MANIFEST_VERSION,
    handOver: number,
    title,
    standing: withdrawn === null ? 'released' : 'withdrawn',
    ...(withdrawn === null ? {} : { withdrawn }),
    ...(invented ? { invented: true } : {}),
    group,
    released: frozen.releasedAt,
    signedOff: frozen.signedOffAt,
    signedOffBy: frozen.signedOffBy,
    madeBy: frozen.madeBy,
    replaces,
    polymer,
    mapping: { name: mapping.name, revision: mapping.revision },
    statePoint,
    layout: { name: layout.name, length: layout.length, angle: layout.angle, energy: layout.energy },
    tables: tables.map(({ name, path, kinds, meta }) => ({
      name,
      file: path,
      kinds,
      types: meta.types,
      input: meta.input,
      warnings: meta.warnings.map(({ code, answer }) => ({ code, answer })),
    })),
    leftOut: frozen.leftOut,
    files: files.map(({ path, mediaType, bytes }) => ({
      path,
      mediaType,
      size: bytes.length,
      sha256: sha256(bytes),
    })),
  }
  return `${JSON.stringify(manifest, null, 2)}\n`
}

/** Checksums in the form that `sha256sum -c` reads. */
export function writeSums(files: readonly Pick<ListedFile, 'path' | 'bytes'>[]): string {
  return files.map(({ path, bytes }) => `${sha256(bytes)}  ${path}\n`).join('')
}
