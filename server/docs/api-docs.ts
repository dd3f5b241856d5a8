import { createRequire } from 'node:module'
import { dirname } from 'node:path'
import express, { Router, type RequestHandler } from 'express'
import { serve } from 'swagger-ui-express'
import { DOCS_PAGE } from './docs-page'
import { DOCS_SCRIPT } from './docs-script'
import { DOCS_STYLE } from './docs-style'

/**
 * The API document to browse: a page, a script and a style sheet of ours around the files of Swagger UI, all from this server.
 * The page holds no script of its own, so that the content policy stays as strict as everywhere.
 */
export function serveApiDocs(): Router {
  const router = Router()
  const send = (type: string, text: string): RequestHandler => {
    return (_request, response) => void response.type(type).set('Cache-Control', 'no-cache').send(text)
  }
  router.get('/', (request, response, next) => {
    // Without the slash at the end the page would look for its files one folder up.
    if (!request.originalUrl.split('?')[0].endsWith('/')) response.redirect(301, `${request.baseUrl}/`)
    else next()
  })
  router.get('/', send('html', DOCS_PAGE))
  router.get('/beadwright.js', send('js', DOCS_SCRIPT))
  router.get('/beadwright.css', send('css', DOCS_STYLE))
  router.use('/fonts', express.static(fontFolder(), { index: false, maxAge: '1d' }))
  router.use(...serve)
  return router
}

function fontFolder(): string {
  const { resolve } = createRequire(import.meta.url)
  return dirname(resolve('@fontsource/fira-sans/files/fira-sans-latin-400-normal.woff2'))
}
