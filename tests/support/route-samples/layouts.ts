import { randomUUID } from 'node:crypto'
import { builtInLayout } from '@shared/layouts'
import { PLAIN_UNITS } from '../layout-builder'
import type { RouteSamples, SampleWorld } from './sample'

const document = builtInLayout('four-columns', PLAIN_UNITS)

async function layoutId({ server, group }: SampleWorld): Promise<{ layoutId: string }> {
  const body = { name: `Layout ${randomUUID()}`, document: structuredClone(document) as never }
  return { layoutId: (await server.services.layouts.create(group.modeller.member, body)).id }
}

/** Layouts of the group. */
export const layoutSamples: RouteSamples = {
  'get /api/groups/:groupId/layouts': () => ({}),
  'post /api/groups/:groupId/layouts': () => ({ body: { name: `Layout ${randomUUID()}`, document } }),
  'get /api/groups/:groupId/layout-examples': () => ({}),
  'put /api/groups/:groupId/default-layout': () => ({ body: { layout: 'three-columns' } }),
  'get /api/layouts/:layoutId': async (world) => ({ ids: await layoutId(world) }),
  'get /api/layouts/:layoutId/versions': async (world) => ({ ids: await layoutId(world) }),
  'get /api/layouts/:layoutId/file': async (world) => ({ ids: await layoutId(world) }),
  'put /api/layouts/:layoutId': async (world) => ({
    ids: await layoutId(world),
    body: { version: 1, name: `Layout ${randomUUID()}`, document },
  }),
  'post /api/layouts/:layoutId/copy': async (world) => ({
    ids: await layoutId(world),
    body: { name: `Layout ${randomUUID()}` },
  }),
  'post /api/layouts/:layoutId/archive': async (world) => ({ ids: await layoutId(world) }),
  'post /api/layouts/:layoutId/restore': async (world) => ({ ids: await layoutId(world) }),
  'post /api/terms/:termId/layout-preview': ({ job: { statePointId } }) => ({
    body: { statePointId, document },
  }),
}
