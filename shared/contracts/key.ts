import { z } from 'zod'
import { idSchema, nameSchema, timestampSchema } from './common'
import { membershipSchema } from './session'

/** Keys that work, of one person. */
export const MAX_KEYS = 20

/** Begins every key, so that one in the wrong place is recognised. */
export const KEY_MARK = 'bw_'

/**
 * What a script may do with a key: read what its person may read; write polymers, mappings, data and potentials; make and
 * change hand-overs. None holds another. A key never does more than its person.
 */
export const keyScopeSchema = z.enum(['read', 'write', 'hand-overs']).meta({ id: 'KeyScope' })
export type KeyScope = z.infer<typeof keyScopeSchema>

/** In the order of screens. */
export const KEY_SCOPES = keyScopeSchema.options

/** An API key, without its secret. */
export const apiKeySchema = z
  .object({
    id: idSchema,
    name: z.string(),
    scopes: z.array(keyScopeSchema),
    /** How the key begins: enough to tell keys apart, nothing to get in with. */
    prefix: z.string(),
    createdAt: timestampSchema,
    /** null: it works until it is revoked. */
    expiresAt: timestampSchema.nullable(),
    /** To the minute; null: never. */
    lastUsedAt: timestampSchema.nullable(),
    revokedAt: timestampSchema.nullable(),
  })
  .meta({ id: 'ApiKey' })
export type ApiKey = z.infer<typeof apiKeySchema>

/** POST /api/keys. */
export const apiKeyCreateSchema = z
  .object({
    /** What the key is for. */
    name: nameSchema,
    scopes: z
      .array(keyScopeSchema)
      .min(1, 'Choose at least one thing the key may do.')
      .refine((scopes) => new Set(scopes).size === scopes.length, 'Name each scope once.'),
    /** In the future; null: it works until it is revoked. */
    expiresAt: timestampSchema.nullable(),
  })
  .meta({ id: 'ApiKeyCreate' })
export type ApiKeyCreate = z.infer<typeof apiKeyCreateSchema>

/** The one time a key is shown: only its hash is kept. */
export const apiKeyMadeSchema = z.object({ key: z.string(), made: apiKeySchema }).meta({ id: 'ApiKeyMade' })
export type ApiKeyMade = z.infer<typeof apiKeyMadeSchema>

/** GET /api/key: for whom a script acts, and where. */
export const keyHolderSchema = z
  .object({
    key: apiKeySchema,
    person: z.object({ id: idSchema, name: z.string(), memberships: z.array(membershipSchema) }),
  })
  .meta({ id: 'KeyHolder' })
export type KeyHolder = z.infer<typeof keyHolderSchema>
