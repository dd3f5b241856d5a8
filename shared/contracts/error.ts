import { z } from 'zod'
import type { InvalidInputCode } from '../errors'

/** Codes the API adds to those of the core. */
export type ApiCode =
  | 'VALIDATION_FAILED'
  | 'NOT_SIGNED_IN'
  | 'KEY_INVALID'
  | 'KEY_EXPIRED'
  | 'KEY_REVOKED'
  | 'KEY_SCOPE_MISSING'
  | 'KEY_NOT_ALLOWED'
  | 'TOO_MANY_KEYS'
  | 'SIGN_IN_FAILED'
  | 'TOO_MANY_ATTEMPTS'
  | 'CSRF_TOKEN_INVALID'
  | 'FORBIDDEN'
  | 'NOT_FOUND'
  | 'CONFLICT'
  | 'NAME_TAKEN'
  | 'IN_USE'
  | 'TERM_GONE'
  | 'SET_UP_LINK_INVALID'
  | 'LINK_INVALID'
  | 'LAST_OWNER'
  | 'OWN_WORK'
  | 'CONTENT_CHANGED'
  | 'CHECKLIST_OPEN'
  | 'TERM_QUESTIONED'
  | 'FILE_DAMAGED'
  | 'HAND_OVER_WITHDRAWN'
  | 'TOO_MANY_OPEN'
  | 'ALREADY_MEMBER'
  | 'MAIL_ADDRESS_INVALID'
  | 'MAIL_SUBJECT_INVALID'
  | 'PAYLOAD_TOO_LARGE'
  | 'INTERNAL'
  | 'UNAVAILABLE'

export type ErrorCode = ApiCode | InvalidInputCode

/** The one error shape of the API. `details` holds the current record of a conflict. */
export const errorSchema = z
  .object({
    code: z.string(),
    message: z.string(),
    field: z.string().optional(),
    line: z.number().int().optional(),
    column: z.number().int().optional(),
    position: z.number().int().optional(),
    requestId: z.string().optional(),
    issues: z.array(z.object({ field: z.string(), message: z.string() })).optional(),
    details: z.unknown().optional(),
  })
  .meta({ id: 'Error' })
export type ErrorBody = z.infer<typeof errorSchema>
