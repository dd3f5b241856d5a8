import { DEFAULT_INVERSION_SETTINGS } from '../shared/inversion/inversion-settings'

const STATE_POINT = '6f1c2a52-3f0e-4d6b-9a53-0c5c1f1c7e11'

/** Bodies of the main job, from a polymer to its tables, by method and path; of an upload the JSON in `settings`. */
export const BODY_EXAMPLES: Readonly<Record<string, object>> = {
  'post /api/groups/:groupId/polymers': { name: 'poly(vinyl acetate)', smiles: '*CC(*)OC(C)=O' },
  'post /api/polymers/:polymerId/state-points': { temperature: 400, pressure: 1, phase: 'melt' },
  'post /api/polymers/:polymerId/mappings': {
    name: '2-to-1',
    document: {
      version: 1,
      beads: [
        {
          id: 'backbone',
          name: 'B',
          type: 'B',
          label: 'backbone',
          colour: 0,
          site: { rule: 'mass' },
          atoms: [
            { atom: 0, weight: 1, unit: 0 },
            { atom: 1, weight: 1, unit: 0 },
          ],
        },
        {
          id: 'acetate',
          name: 'A',
          type: 'A',
          label: 'acetate',
          colour: 1,
          site: { rule: 'mass' },
          atoms: [2, 3, 4, 5].map((atom) => ({ atom, weight: 1, unit: 0 })),
        },
      ],
    },
  },
  'post /api/terms/:termId/distributions': {
    statePointId: STATE_POINT,
    settings: {
      version: 1,
      kind: 'bond',
      unit: 'nm',
      layout: 'centre',
      value: 'count',
      columns: { low: 0, high: 0, value: 1 },
      alreadyDivided: false,
      independentSamples: 20000,
    },
  },
  'put /api/terms/:termId/potential': {
    statePointId: STATE_POINT,
    revision: null,
    settings: DEFAULT_INVERSION_SETTINGS,
  },
}
