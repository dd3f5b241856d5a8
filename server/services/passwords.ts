import { randomBytes } from 'node:crypto'
import { hash, verify } from '@node-rs/argon2'

/** argon2id (the library's default variant), 19 MiB and two passes: the OWASP recommendation of 2023. */
const COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1 }

let decoy: Promise<string> | null = null

/** The argon2id hash of a password, with its salt and cost. */
export function hashPassword(password: string): Promise<string> {
  return hash(password, COST)
}

/**
 * Whether the password is the one behind the hash. Without a hash it takes as long and is never true, so that the time of
 * an answer does not tell whether an account exists.
 */
export async function verifyPassword(password: string, storedHash: string | null): Promise<boolean> {
  if (storedHash !== null) return verify(storedHash, password)
  decoy ??= hashPassword(randomBytes(32).toString('base64'))
  await verify(await decoy, password)
  return false
}
