import { z } from 'zod'
import { openApiDocument } from '../openapi'
import { comparisonRoutes } from './comparison.routes'
import { distributionRoutes } from './distribution.routes'
import { healthRoutes } from './health.routes'
import { jointDistributionRoutes } from './joint-distribution.routes'
import { keyRoutes } from './key.routes'
import { mappingRoutes } from './mapping.routes'
import { polymerRoutes } from './polymer.routes'
import { potentialRoutes } from './potential.routes'
import { type AnyRoute, route } from './route'
import { sessionRoutes } from './session.routes'
import { trayRoutes } from './tray.routes'

let document: ReturnType<typeof openApiDocument> | null = null

const documentRoute = route({
  method: 'get',
  path: '/api/openapi.json',
  summary: 'This document',
  access: 'anyone',
  answer: { status: 200, body: z.looseObject({ openapi: z.string() }) },
  handle: () => ({ ...(document ??= openApiDocument(routes)) }),
})

/** Every route of the API. */
export const routes: readonly AnyRoute[] = [
  ...healthRoutes,
  documentRoute,
  ...sessionRoutes,
  ...keyRoutes,
  ...polymerRoutes,
  ...mappingRoutes,
  ...comparisonRoutes,
  ...distributionRoutes,
  ...jointDistributionRoutes,
  ...potentialRoutes,
  ...trayRoutes,
]
