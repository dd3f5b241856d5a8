import { join } from 'node:path'
import express, { Router } from 'express'
import { HttpError } from '../errors/http-error'

/**
 * The built browser application. Assets carry a hash in their name and may be kept for ever; the page itself is asked for
 * anew each time, and is the answer for every address that is a screen.
 *
 * @param folder the build, with index.html and assets/
 */
export function serveClient(folder: string): Router {
  const router = Router()
  router.use(
    '/assets',
    express.static(join(folder, 'assets'), { immutable: true, maxAge: '1y', index: false }),
  )
  router.use('/assets', () => {
    throw new HttpError('NOT_FOUND', 'There is no such file.')
  })
  router.use(express.static(folder, { index: false, maxAge: '1h' }))
  router.get('/{*path}', (_request, response) => {
    response.set('Cache-Control', 'no-store')
    response.sendFile('index.html', { root: folder, cacheControl: false })
  })
  return router
}
