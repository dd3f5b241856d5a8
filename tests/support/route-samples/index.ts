import { deliverySamples } from './deliveries'
import { handOverSamples } from './hand-overs'
import { layoutSamples } from './layouts'
import { peopleSamples } from './people'
import type { RouteSamples } from './sample'
import { scienceSamples } from './science'

export type { Sample, SampleWorld } from './sample'

/** One valid request for every route that asks for membership; the access test fails for a route without one. */
export const ROUTE_SAMPLES: RouteSamples = {
  ...deliverySamples,
  ...handOverSamples,
  ...layoutSamples,
  ...peopleSamples,
  ...scienceSamples,
}
