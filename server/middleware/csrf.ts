import { timingSafeEqual } from 'node:crypto'
import type { RequestHandler } from 'express'
import { HttpError } from '../errors/http-error'

/**
 * Lets a write through only when it comes from our own pages: the token of the session in the header X-CSRF-Token, and, where
 * the browser names an origin, that origin our own.
 */
export const requireCsrfToken: RequestHandler = (request, _response, next) => {
  const sent = request.get('x-csrf-token') ?? ''
  const expected = request.session.csrfToken
  if (
    !isOwnOrigin(request.get('origin'), request.host) ||
    expected === undefined ||
    !isEqual(sent, expected)
  ) {
    throw new HttpError(
      'CSRF_TOKEN_INVALID',
      'This page is out of date: it was opened before you signed in or out. Load it again and repeat what you did.',
    )
  }
  next()
}

function isOwnOrigin(origin: string | undefined, host: string): boolean {
  if (origin === undefined) return true
  return URL.canParse(origin) && new URL(origin).host === host
}

function isEqual(sent: string, expected: string): boolean {
  const [a, b] = [Buffer.from(sent), Buffer.from(expected)]
  return a.length === b.length && timingSafeEqual(a, b)
}
