import type { ApiKey, KeyScope } from '@shared/contracts/key'
import { formatDay, formatMinute } from '@/format/dates'

/** A scope as people read it, and what it opens. */
export const SCOPE_WORDS: Readonly<Record<KeyScope, { readonly title: string; readonly opens: string }>> = {
  read: { title: 'Read', opens: 'Polymers, mappings, data, tables and hand-overs' },
  write: { title: 'Write data', opens: 'Add and change polymers, mappings, data and potentials' },
  'hand-overs': { title: 'Hand-overs', opens: 'Make and change hand-overs; never sign off' },
}

/** How long a key may live, in days; 0: until it is revoked. */
export const LIFETIMES: readonly { readonly value: number; readonly title: string }[] = [
  { value: 7, title: '7 days' },
  { value: 90, title: '90 days' },
  { value: 365, title: 'a year' },
  { value: 0, title: 'until revoked' },
]

/** "Read, write data". */
export const scopesPhrase = (scopes: readonly KeyScope[]): string => {
  const words = scopes.map((scope) => SCOPE_WORDS[scope].title.toLowerCase()).join(', ')
  return words.charAt(0).toUpperCase() + words.slice(1)
}

/** When a key ends, or ended, and how. */
export const endPhrase = ({ revokedAt, expiresAt }: ApiKey): string => {
  if (revokedAt !== null) return `revoked ${formatDay(revokedAt)}`
  return expiresAt === null ? 'when revoked' : formatDay(expiresAt)
}

/** When a key was used last. */
export const lastUsePhrase = ({ lastUsedAt }: ApiKey): string =>
  lastUsedAt === null ? 'never' : formatMinute(lastUsedAt)
