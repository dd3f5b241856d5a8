import { ZodError } from 'zod'
import type { ErrorBody } from '../../shared/contracts/error'
import { InvalidInputError } from '../../shared/errors'
import { HttpError, statusOf } from './http-error'
import { translatePostgresError } from './postgres-errors'

export interface ErrorAnswer {
  readonly status: number
  readonly body: ErrorBody
  /** The error is a fault of ours and belongs in the log, whole. */
  readonly unexpected: boolean
}

const INTERNAL =
  'Something went wrong on our side. Nothing was changed. If it happens again, tell whoever runs this server the request id.'

/** The one shape in which every error leaves the server. */
export function answerFor(error: unknown, requestId: string): ErrorAnswer {
  const known = knownError(error)
  if (known instanceof InvalidInputError) {
    const { line, column, field, position } = known.place
    const body = { code: known.code, message: known.message, field, line, column, position, requestId }
    return { status: 422, body, unexpected: false }
  }
  if (known) {
    const { field, issues, details } = known.detail
    const body = {
      code: known.code,
      message: known.message,
      field,
      issues: issues && [...issues],
      details,
      requestId,
    }
    return { status: known.status, body, unexpected: known.status >= 500 }
  }
  return {
    status: statusOf('INTERNAL'),
    body: { code: 'INTERNAL', message: INTERNAL, requestId },
    unexpected: true,
  }
}

function knownError(error: unknown): HttpError | InvalidInputError | null {
  if (error instanceof HttpError || error instanceof InvalidInputError) return error
  if (error instanceof ZodError) return validationFailed(error)
  return translatePostgresError(error) ?? translateParserError(error)
}

/** The first issue speaks; all of them stand in `issues`. */
function validationFailed(error: ZodError): HttpError {
  const issues = error.issues.map((issue) => ({ field: issue.path.join('.'), message: issue.message }))
  const field = issues[0]?.field || undefined
  return new HttpError(
    'VALIDATION_FAILED',
    issues[0]?.message ?? 'The data do not have the form asked for.',
    {
      field,
      issues,
    },
  )
}

/** What Express and its parsers throw about a request: malformed JSON, a body too large, a path that is no UTF-8. */
function translateParserError(error: unknown): HttpError | null {
  if (!(error instanceof Error)) return null
  const { status, type } = error as Error & { status?: unknown; type?: unknown }
  if (typeof status !== 'number' || status < 400 || status > 499) return null
  if (status === 413) return new HttpError('PAYLOAD_TOO_LARGE', 'That is more than one request may hold.')
  if (status === 404) return new HttpError('NOT_FOUND', 'There is nothing at this address.')
  if (type === 'entity.parse.failed')
    return new HttpError('VALIDATION_FAILED', 'The request is not valid JSON.')
  return new HttpError('VALIDATION_FAILED', 'The request is malformed.')
}
