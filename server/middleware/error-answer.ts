import type { ErrorRequestHandler, RequestHandler } from 'express'
import type { Logger } from 'pino'
import { answerFor } from '../errors/answer-for'
import { HttpError } from '../errors/http-error'
import { requestIdOf } from './request-log'

/** What no route answers. */
export const nothingHere: RequestHandler = () => {
  throw new HttpError('NOT_FOUND', 'There is nothing at this address.')
}

/** The one place where errors become answers; faults of ours are logged whole. */
export function createErrorAnswer(logger: Logger): ErrorRequestHandler {
  return (error: unknown, request, response, next) => {
    const requestId = requestIdOf(request)
    const { status, body, unexpected } = answerFor(error, requestId)
    if (unexpected) logger.error({ requestId, err: error }, 'request failed')
    // Half of the answer is out already: all that is left is to cut it off.
    if (response.headersSent) return next(error)
    response.set('Cache-Control', 'no-store').status(status).json(body)
  }
}
