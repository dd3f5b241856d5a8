import { randomUUID } from 'node:crypto'
import { DEFAULT_INVERSION_SETTINGS } from '@shared/inversion'
import { ANGLE_SETTINGS, angleFile, DOCUMENT, JOINT_SETTINGS, jointFile } from '../job-builder'
import type { RouteSamples } from './sample'

/** Polymers, mappings, data, potentials and tables. */
export const scienceSamples: RouteSamples = {
  'get /api/groups/:groupId/polymers': () => ({}),
  'post /api/groups/:groupId/polymers': () => ({ body: { name: randomUUID(), smiles: '*CC*' } }),
  'get /api/polymers/:polymerId': () => ({}),
  'patch /api/polymers/:polymerId': () => ({ body: { revision: 1, notes: 'changed' } }),
  'delete /api/polymers/:polymerId': () => ({}),
  'get /api/polymers/:polymerId/state-points': () => ({}),
  'post /api/polymers/:polymerId/state-points': () => ({ body: { temperature: 300 } }),
  'patch /api/state-points/:statePointId': () => ({ body: { revision: 1, notes: 'changed' } }),
  'delete /api/state-points/:statePointId': () => ({}),
  'get /api/polymers/:polymerId/mappings': () => ({}),
  'post /api/polymers/:polymerId/mappings': () => ({ body: { name: 'Another' } }),
  'get /api/polymers/:polymerId/comparison': ({ job: { mappingId, statePointId }, otherMappingId }) => ({
    query: `mappings=${mappingId},${otherMappingId}&statePoint=${statePointId}`,
  }),
  'get /api/mappings/:mappingId': () => ({}),
  'put /api/mappings/:mappingId': () => ({ body: { revision: 1, name: 'Saved', document: DOCUMENT } }),
  'get /api/mappings/:mappingId/coverage': () => ({}),
  'get /api/mappings/:mappingId/evidence': ({ job: { statePointId } }) => ({
    query: `statePoint=${statePointId}`,
  }),
  'get /api/mappings/:mappingId/versions': () => ({}),
  'post /api/mappings/:mappingId/fit': () => ({ body: { document: DOCUMENT } }),
  'delete /api/mappings/:mappingId': () => ({}),
  'get /api/mappings/:mappingId/terms': ({ job: { statePointId } }) => ({
    query: `statePoint=${statePointId}`,
  }),
  'get /api/mappings/:mappingId/pairs': ({ job: { statePointId } }) => ({
    query: `statePoint=${statePointId}`,
  }),
  'get /api/mappings/:mappingId/tables.zip': ({ job: { statePointId } }) => ({
    query: `statePoint=${statePointId}`,
  }),
  'post /api/mappings/:mappingId/joint-distributions': ({ job: { bondId, angleId, statePointId } }) => ({
    body: { firstTermId: bondId, secondTermId: angleId, statePointId, settings: JOINT_SETTINGS },
    file: jointFile(),
  }),
  'post /api/terms/:termId/distributions': ({ job: { statePointId } }) => ({
    body: { statePointId, settings: { ...ANGLE_SETTINGS, kind: 'angle' } },
    file: angleFile(),
  }),
  'get /api/terms/:termId/distribution': ({ job: { statePointId } }) => ({
    query: `statePoint=${statePointId}`,
  }),
  'get /api/terms/:termId/potential': ({ job: { statePointId } }) => ({
    query: `statePoint=${statePointId}`,
  }),
  'put /api/terms/:termId/potential': ({ job: { statePointId } }) => ({
    body: { statePointId, revision: 1, settings: DEFAULT_INVERSION_SETTINGS },
  }),
  'get /api/terms/:termId/table': ({ job: { statePointId } }) => ({ query: `statePoint=${statePointId}` }),
  'patch /api/distributions/:distributionId': () => ({ body: { independentSamples: 1000 } }),
  'delete /api/distributions/:distributionId': () => ({}),
  'get /api/distributions/:distributionId/file': () => ({}),
  'delete /api/potentials/:potentialId': () => ({}),
  'get /api/joint-distributions/:jointDistributionId': () => ({}),
  'delete /api/joint-distributions/:jointDistributionId': () => ({}),
  'get /api/joint-distributions/:jointDistributionId/file': () => ({}),
  'get /api/joint-distributions/:jointDistributionId/table': () => ({}),
  'put /api/joint-distributions/:jointDistributionId/decision': () => ({
    body: { choice: 'separate', reason: 'They move on their own.' },
  }),
}
