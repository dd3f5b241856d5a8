import { createHash } from 'node:crypto'

/** SHA-256 in hexadecimal. */
export function sha256(data: Uint8Array | string): string {
  return createHash('sha256').update(data).digest('hex')
}
