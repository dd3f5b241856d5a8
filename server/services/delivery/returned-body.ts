import type { ReturnedFile as ReturnedFileBody } from '../../../shared/contracts/delivery'
import type { ReturnedFile } from '../../entities/returned-file.entity'
import { personOf } from '../people'

/** A file that came back, read with the recipient who sent it. */
export function returnedBody(file: ReturnedFile): ReturnedFileBody {
  const { id, tableName, name, size, sha256, note, reading, recipient, returnedAt, standing } = file
  return {
    id,
    table: tableName,
    name,
    size,
    sha256,
    note,
    reading,
    sentBy: recipient?.name ?? '',
    at: returnedAt.toISOString(),
    standing,
    settledBy: personOf(file.settledBy),
    settledAt: file.settledAt?.toISOString() ?? null,
  }
}
