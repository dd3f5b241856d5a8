import express, { type RequestHandler } from 'express'
import { HttpError } from '../errors/http-error'

const parse = express.json({ limit: '2mb' })

/** Reads a JSON body; anything else is refused. */
export const readJson: RequestHandler = (request, response, next) => {
  if (!request.is('application/json')) {
    throw new HttpError('VALIDATION_FAILED', 'Send the data as JSON, with the content type application/json.')
  }
  parse(request, response, next)
}
