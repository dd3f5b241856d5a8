import { z } from 'zod'
import { openApiDocument } from '../openapi'
import { comparisonRoutes } from './comparison.routes'
import { deliveryRoutes } from './delivery.routes'
import { distributionRoutes } from './distribution.routes'
import { accountRoutes } from './account.routes'
import { groupRoutes } from './group.routes'
import { handOverReleaseRoutes } from './hand-over-release.routes'
import { handOverReviewRoutes } from './hand-over-review.routes'
import { handOverRoutes } from './hand-over.routes'
import { healthRoutes } from './health.routes'
import { jointDistributionRoutes } from './joint-distribution.routes'
import { keyRoutes } from './key.routes'
import { historyRoutes } from './history.routes'
import { joinRoutes } from './join.routes'
import { layoutRoutes } from './layout.routes'
import { mappingRoutes } from './mapping.routes'
import { polymerRoutes } from './polymer.routes'
import { potentialRoutes } from './potential.routes'
import { receivedRoutes } from './received.routes'
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
  ...accountRoutes,
  ...joinRoutes,
  ...groupRoutes,
  ...historyRoutes,
  ...polymerRoutes,
  ...mappingRoutes,
  ...comparisonRoutes,
  ...distributionRoutes,
  ...jointDistributionRoutes,
  ...potentialRoutes,
  ...layoutRoutes,
  ...handOverRoutes,
  ...handOverReviewRoutes,
  ...handOverReleaseRoutes,
  ...deliveryRoutes,
  ...receivedRoutes,
  ...trayRoutes,
]
