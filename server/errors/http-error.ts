import type { ApiCode } from '../../shared/contracts/error'

/** What else an error tells its caller. */
export interface HttpErrorDetail {
  readonly field?: string
  readonly issues?: readonly { readonly field: string; readonly message: string }[]
  /** The current record, where a conflict is to be settled. */
  readonly details?: unknown
}

const STATUS: Readonly<Record<ApiCode, number>> = {
  VALIDATION_FAILED: 400,
  MAIL_ADDRESS_INVALID: 400,
  MAIL_SUBJECT_INVALID: 400,
  NOT_SIGNED_IN: 401,
  SIGN_IN_FAILED: 401,
  KEY_INVALID: 401,
  KEY_EXPIRED: 401,
  KEY_REVOKED: 401,
  KEY_SCOPE_MISSING: 403,
  KEY_NOT_ALLOWED: 403,
  CSRF_TOKEN_INVALID: 403,
  FORBIDDEN: 403,
  NOT_FOUND: 404,
  SET_UP_LINK_INVALID: 404,
  LINK_INVALID: 404,
  CONFLICT: 409,
  IN_USE: 409,
  LAST_OWNER: 409,
  OWN_WORK: 409,
  CONTENT_CHANGED: 409,
  CHECKLIST_OPEN: 409,
  TERM_QUESTIONED: 409,
  HAND_OVER_WITHDRAWN: 409,
  TOO_MANY_OPEN: 409,
  TOO_MANY_KEYS: 409,
  ALREADY_MEMBER: 409,
  NAME_TAKEN: 409,
  TERM_GONE: 409,
  PAYLOAD_TOO_LARGE: 413,
  TOO_MANY_ATTEMPTS: 429,
  INTERNAL: 500,
  FILE_DAMAGED: 500,
  UNAVAILABLE: 503,
}

/** A request the server refuses: a stable code, which fixes the status, and a sentence for a person. */
export class HttpError extends Error {
  override readonly name = 'HttpError'
  readonly status: number

  constructor(
    readonly code: ApiCode,
    message: string,
    readonly detail: HttpErrorDetail = {},
  ) {
    super(message)
    this.status = STATUS[code]
  }
}

/** The status that goes with a code of the API. */
export function statusOf(code: ApiCode): number {
  return STATUS[code]
}

/** The answer for a record that is not there, or not for this person: the two look alike. */
export function notFound(what: string, field?: string): HttpError {
  return new HttpError('NOT_FOUND', `There is no such ${what}.`, { field })
}
