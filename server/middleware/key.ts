import type { RequestHandler, Response } from 'express'
import type { KeyScope } from '../../shared/contracts/key'
import { HttpError } from '../errors/http-error'
import type { Services } from '../services'
import type { ActingKey } from '../services/key.service'

/** The key of a request, once `readKey` has found one. */
export function keyOf(response: Response): ActingKey | undefined {
  return response.locals.key as ActingKey | undefined
}

/**
 * Reads the key of `Authorization: Bearer …`. With a key the cookie counts for nothing: neither its session nor its token are
 * looked at. Other schemes are none of ours; a proxy in front may ask for them.
 */
export function readKey({ keys }: Services): RequestHandler {
  return async (request, response, next) => {
    const [scheme, secret = ''] = (request.get('authorization') ?? '').split(/ +/)
    if (scheme.toLowerCase() !== 'bearer') return next()
    response.set('WWW-Authenticate', 'Bearer error="invalid_token"')
    response.locals.key = await keys.authenticate(secret)
    response.removeHeader('WWW-Authenticate')
    next()
  }
}

/** Refuses a key that does not reach so far; lets everyone without a key pass. */
export function requireScope(scope: KeyScope | null): RequestHandler {
  return (_request, response, next) => {
    const key = keyOf(response)
    if (key && scope === null) {
      throw new HttpError('KEY_NOT_ALLOWED', 'No key does this: sign in and do it yourself.')
    }
    if (key && scope !== null && !key.scopes.includes(scope)) {
      response.set('WWW-Authenticate', `Bearer error="insufficient_scope", scope="${scope}"`)
      throw new HttpError('KEY_SCOPE_MISSING', `This key may not do this: it lacks the scope "${scope}".`)
    }
    next()
  }
}

/** A step for browsers alone: whoever comes with a key passes by. */
export function unlessKey(step: RequestHandler): RequestHandler {
  return (request, response, next) => {
    if (keyOf(response)) next()
    else void step(request, response, next)
  }
}
