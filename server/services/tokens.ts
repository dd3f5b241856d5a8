import { randomBytes } from 'node:crypto'
import { sha256 } from './hashes'

/** A secret that stands in a link, and what is kept of it: whoever reads the database cannot use the link. */
export interface LinkToken {
  readonly token: string
  readonly tokenSha256: string
}

/** A new secret of 256 random bits. */
export function makeToken(): LinkToken {
  const token = randomBytes(32).toString('base64url')
  return { token, tokenSha256: sha256(token) }
}
