import { basename } from 'node:path'
import type { Request, RequestHandler } from 'express'
import multer from 'multer'
import { MAX_BLOCKS, MAX_FILE_BYTES, MAX_UPLOAD_BYTES } from '../../shared/contracts/distribution'
import { HttpError } from '../errors/http-error'
import type { UploadedBlocks, UploadedFile } from '../services'
import { UploadMemory, UploadTooLarge } from './upload-memory'

const MAX_SETTINGS_BYTES = 64 * 1024
const MAX_NAME_LENGTH = 200

/** Fields of files with the most of each; block files only where a route takes them. */
const FILE_FIELDS = {
  single: [['file', 1]],
  parted: [
    ['file', 1],
    ['blocks', MAX_BLOCKS],
    ['chains', MAX_BLOCKS],
  ],
} as const

const readMultipart = (fields: readonly (readonly [name: string, most: number])[]): RequestHandler => {
  const files = fields.reduce((sum, [, most]) => sum + most, 0)
  return multer({
    storage: new UploadMemory(),
    limits: { fileSize: MAX_FILE_BYTES, files, fields: 1, parts: files + 1, fieldSize: MAX_SETTINGS_BYTES },
    defParamCharset: 'utf8',
  }).fields(fields.map(([name, maxCount]) => ({ name, maxCount })))
}

/**
 * Reads a multipart body: one file in the field `file`, where a route takes them any number in the fields `blocks` and
 * `chains`, and JSON in the field `settings`, which becomes the body.
 */
export function readUpload(fields: keyof typeof FILE_FIELDS): RequestHandler {
  const read = readMultipart(FILE_FIELDS[fields])
  return (request, response, next) => {
    if (!request.is('multipart/form-data')) {
      throw new HttpError('VALIDATION_FAILED', 'Send the file as multipart/form-data.', { field: 'file' })
    }
    read(request, response, (error: unknown) => {
      if (error) return next(uploadError(error))
      if (filesOf(request, 'file').length === 0) {
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
}

/** The files of a request that has passed `readUpload`; undefined of any other. */
export function uploadedFiles(
  request: Request,
): { file: UploadedFile; blockFiles: UploadedBlocks } | undefined {
  const [file] = filesOf(request, 'file').map(uploadedFile)
  if (file === undefined) return undefined
  const [time, chain] = [filesOf(request, 'blocks'), filesOf(request, 'chains')]
  return { file, blockFiles: { time: time.map(uploadedFile), chain: chain.map(uploadedFile) } }
}

function filesOf({ files }: Request, field: string): Express.Multer.File[] {
  return files === undefined || Array.isArray(files) ? [] : (files[field] ?? [])
}

function uploadedFile({ originalname, buffer }: Express.Multer.File): UploadedFile {
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
  if (error instanceof UploadTooLarge) {
    const limit = MAX_UPLOAD_BYTES / 1024 / 1024
    return new HttpError(
      'PAYLOAD_TOO_LARGE',
      `The files are over ${limit} MB together. Merge neighbouring bins, or bring fewer blocks.`,
      { field: 'blocks' },
    )
  }
  return new HttpError(
    'VALIDATION_FAILED',
    'The upload must hold one file and its settings, and nothing else but the files of blocks that it may have.',
    {
      field: 'file',
    },
  )
}
