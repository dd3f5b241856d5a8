import type { Distribution } from '@shared/contracts/distribution'
import type { StoredPotential } from '@shared/contracts/potential'
import type { Histogram } from '@shared/histogram'
import { DEFAULT_INVERSION_SETTINGS } from '@shared/inversion'

const uuid = (number: number): string => `00000000-0000-4000-8000-${String(number).padStart(12, '0')}`
const when = '2026-06-12T09:30:00.000Z'

/** A histogram as the server stores it. */
export const storedDistribution = (
  histogram: Histogram,
  change: Partial<Distribution> = {},
): Distribution => ({
  id: uuid(4),
  termId: uuid(5),
  statePointId: uuid(6),
  kind: histogram.kind,
  edges: [...histogram.edges],
  weights: [...histogram.weights],
  content: histogram.content,
  independentSamples: histogram.independentSamples,
  blocks: histogram.blocks ?? null,
  sampleInefficiency: null,
  settings: {
    version: 1,
    kind: histogram.kind,
    unit: histogram.kind === 'bond' ? 'nm' : 'degree',
    layout: 'centre',
    value: histogram.content,
    columns: { low: 0, high: 0, value: 1 },
    alreadyDivided: false,
    independentSamples: histogram.independentSamples,
  },
  notes: [],
  file: { name: 'BEH_400K.hist', size: 2000, sha256: 'a'.repeat(64), uploadedBy: null, uploadedAt: when },
  demo: false,
  ...change,
})

/** A saved inversion with the default settings. */
export const storedPotential = (change: Partial<StoredPotential> = {}): StoredPotential => ({
  id: uuid(7),
  termId: uuid(5),
  statePointId: uuid(6),
  distributionId: uuid(4),
  settings: DEFAULT_INVERSION_SETTINGS,
  inputSha256: 'b'.repeat(64),
  stale: false,
  revision: 3,
  savedBy: { id: uuid(8), name: 'Ana Rivera' },
  savedAt: when,
  ...change,
})
