import { basename } from 'node:path'
import type { RequestHandler } from 'express'
import multer from 'multer'
import { MAX_FILE_BYTES } from '../../shared/contracts/distribution'
import { HttpError } from '../errors/http-error'
import type { UploadedFile } from '../services'

const MAX_SETTINGS_BYTES = 64 * 1024
const MAX_NAME_LENGTH = 200

const readMultipart = multer({
  storage: multer.memoryStorage(),
  limits: { fileSize: MAX_FILE_BYTES, files: 1, fields: 1, parts: 2, fieldSize: MAX_SETTINGS_BYTES },
  defParamCharset: 'utf8',
}).single('file')

/** Reads a multipart body: one file in the field `file`, and JSON in the field `settings`, which becomes the body. */
export const readUpload: RequestHandler = (request, response, next) => {
  if (!request.is('multipart/form-data')) {
    throw new HttpError('VALIDATION_FAILED', 'Send the file as multipart/form-data.', { field: 'file' })
  }
  readMultipart(request, response, (error: unknown) => {
    if (error) return next(uploadError(error))
    if (!request.file) {
      return next(new HttpError('VALIDATION_FAILED', 'The file is missing.', { field: 'file' }))
    }
    try {
      const { settings } = (request.body ?? {}) as { settings?: unknown }
      request.body = typeof settings === 'string' ? (JSON.parse(settings) as unknown) : undefined
    } catch {
      return next(
        new HttpError('VALIDATION_FAILED', 'The settings are not valid JSON.', { field: 'settings' }),
      )
    }
    next()
  })
}

/** The file of a request that has passed `readUpload`. */
export function uploadedFile({ originalname, buffer }: Express.Multer.File): UploadedFile {
  // Some browsers send a whole path; control characters would break lines of tables that name the file.
  const name = basename(originalname.replaceAll('\\', '/'))
    .replace(/\p{Cc}/gu, ' ')
    .trim()
  return { name: name.slice(0, MAX_NAME_LENGTH) || 'unnamed', bytes: buffer }
}

function uploadError(error: unknown): HttpError {
  if (error instanceof multer.MulterError && error.code === 'LIMIT_FILE_SIZE') {
    const limit = MAX_FILE_BYTES / 1024 / 1024
    return new HttpError(
      'PAYLOAD_TOO_LARGE',
      `The file is over ${limit} MB. Merge neighbouring bins, or leave out samples.`,
      { field: 'file' },
    )
  }
  return new HttpError(
    'VALIDATION_FAILED',
    'The upload must hold one file and its settings, and nothing else.',
    {
      field: 'file',
    },
  )
}
