import type { Request } from 'express'
import type { StorageEngine } from 'multer'
import { MAX_UPLOAD_BYTES } from '../../shared/contracts/distribution'

/** The files of one upload are larger together than what is taken. */
export class UploadTooLarge extends Error {
  override readonly name = 'UploadTooLarge'
}

/** Keeps uploaded files in memory, and of one request no more than `MAX_UPLOAD_BYTES` of them. */
export class UploadMemory implements StorageEngine {
  private readonly taken = new WeakMap<Request, number>()

  _handleFile: StorageEngine['_handleFile'] = (request, { stream }, done) => {
    const chunks: Buffer[] = []
    stream.on('data', (chunk: Buffer) => {
      const total = (this.taken.get(request) ?? 0) + chunk.length
      this.taken.set(request, total)
      if (total <= MAX_UPLOAD_BYTES) chunks.push(chunk)
    })
    stream.on('error', done)
    stream.on('end', () => {
      if ((this.taken.get(request) ?? 0) > MAX_UPLOAD_BYTES) return done(new UploadTooLarge())
      const buffer = Buffer.concat(chunks)
      done(null, { buffer, size: buffer.length })
    })
  }

  _removeFile: StorageEngine['_removeFile'] = (_request, _file, done) => done(null)
}
