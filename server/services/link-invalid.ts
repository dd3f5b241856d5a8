import type { LinkFault } from '../../shared/contracts/people'
import { HttpError } from '../errors/http-error'

const SENTENCES: Readonly<Record<LinkFault, string>> = {
  unknown: 'This link does not work. Look whether all of it was copied.',
  used: 'This link has been used: it works once.',
  revoked: 'This link was taken back, or a newer one was sent.',
  expired: 'This link is out of date. Ask for another one.',
}

/** The answer for a link that does not work, with the reason for whoever holds it. */
export function linkInvalid(reason: LinkFault): HttpError {
  return new HttpError('LINK_INVALID', SENTENCES[reason], { details: { reason } })
}
