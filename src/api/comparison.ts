import type { Comparison } from '@shared/contracts/comparison'
import { http } from './http'

/** Two to six mappings of a polymer side by side at one state point. */
export const compareMappings = (
  polymerId: string,
  mappingIds: readonly string[],
  statePointId: string,
): Promise<Comparison> =>
  http.get(`/polymers/${polymerId}/comparison`, {
    query: { mappings: mappingIds.join(','), statePoint: statePointId },
  })
