import { promisify } from 'node:util'
import { gunzip, gzip } from 'node:zlib'
import type { EntityManager } from 'typeorm'
import type { SourceFile as SourceFileBody } from '../../shared/contracts/distribution'
import { SourceFile } from '../entities/source-file.entity'
import type { User } from '../entities/user.entity'
import { sha256 } from './hashes'
import type { Download, UploadedFile } from './member'
import { personOf } from './people'

const compress = promisify(gzip)
const decompress = promisify(gunzip)

/** The distribution a file belongs to. */
export type FileOwner = { readonly distributionId: string } | { readonly jointDistributionId: string }

/** Text of a file; a byte order mark is dropped. */
export function textOf(bytes: Uint8Array): string {
  return new TextDecoder().decode(bytes)
}

/** What is kept of a file: worked out before the transaction, which then only writes. */
export async function packFile({ name, bytes }: UploadedFile) {
  return { name, size: bytes.length, sha256: sha256(bytes), gzip: await compress(bytes) }
}

/** The file of a distribution, as it came. */
export async function unpackFile(
  manager: EntityManager,
  groupId: string,
  owner: FileOwner,
): Promise<Download> {
  const file = await manager.findOneOrFail(SourceFile, {
    where: { groupId, ...owner },
    select: { id: true, name: true, gzip: true },
  })
  return { fileName: file.name, bytes: await decompress(file.gzip) }
}

/** How a file is shown, with who brought it in and when. */
export async function fileBody(
  manager: EntityManager,
  groupId: string,
  owner: FileOwner,
  upload: { readonly uploadedBy?: User | null; readonly uploadedAt: Date },
): Promise<SourceFileBody> {
  const { name, size, sha256 } = await manager.findOneByOrFail(SourceFile, { groupId, ...owner })
  return {
    name,
    size,
    sha256,
    uploadedBy: personOf(upload.uploadedBy),
    uploadedAt: upload.uploadedAt.toISOString(),
  }
}
