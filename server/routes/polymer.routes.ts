import { z } from 'zod'
import {
  polymerCreateSchema,
  polymerSchema,
  polymerUpdateSchema,
  statePointCreateSchema,
  statePointSchema,
  statePointUpdateSchema,
} from '../../shared/contracts/polymer'
import { route } from './route'

export const polymerRoutes = [
  route({
    method: 'get',
    path: '/api/groups/:groupId/polymers',
    summary: 'The polymers of a group, the newest first',
    access: { may: 'read', at: 'group' },
    answer: { status: 200, body: z.object({ polymers: z.array(polymerSchema) }) },
    handle: async ({ services, member }) => ({ polymers: await services.polymers.list(member) }),
  }),
  route({
    method: 'post',
    path: '/api/groups/:groupId/polymers',
    summary: 'Add a polymer by the SMILES of its repeat unit',
    access: { may: 'write', at: 'group' },
    body: polymerCreateSchema,
    answer: { status: 201, body: polymerSchema },
    errors: ['NAME_TAKEN'],
    readsContent: true,
    handle: ({ services, member, body }) => services.polymers.create(member, body),
  }),
  route({
    method: 'get',
    path: '/api/polymers/:polymerId',
    summary: 'A polymer',
    access: { may: 'read', at: 'polymer' },
    answer: { status: 200, body: polymerSchema },
    handle: ({ services, member, params }) => services.polymers.get(member, params.polymerId),
  }),
  route({
    method: 'patch',
    path: '/api/polymers/:polymerId',
    summary: 'Change a polymer; its SMILES only before a mapping stands on it',
    access: { may: 'write', at: 'polymer' },
    body: polymerUpdateSchema,
    answer: { status: 200, body: polymerSchema },
    errors: ['CONFLICT', 'NAME_TAKEN', 'IN_USE'],
    readsContent: true,
    handle: ({ services, member, params, body }) => services.polymers.update(member, params.polymerId, body),
  }),
  route({
    method: 'delete',
    path: '/api/polymers/:polymerId',
    summary: 'Delete a polymer with everything that stands on it',
    access: { may: 'write', at: 'polymer' },
    answer: { status: 204 },
    handle: ({ services, member, params }) => services.polymers.remove(member, params.polymerId),
  }),
  route({
    method: 'get',
    path: '/api/polymers/:polymerId/state-points',
    summary: 'The state points of a polymer, the coldest first',
    access: { may: 'read', at: 'polymer' },
    answer: { status: 200, body: z.object({ statePoints: z.array(statePointSchema) }) },
    handle: async ({ services, member, params }) => ({
      statePoints: await services.statePoints.list(member, params.polymerId),
    }),
  }),
  route({
    method: 'post',
    path: '/api/polymers/:polymerId/state-points',
    summary: 'Add a state point',
    access: { may: 'write', at: 'polymer' },
    body: statePointCreateSchema,
    answer: { status: 201, body: statePointSchema },
    handle: ({ services, member, params, body }) =>
      services.statePoints.create(member, params.polymerId, body),
  }),
  route({
    method: 'patch',
    path: '/api/state-points/:statePointId',
    summary: 'Change a state point; its temperature only before data stand on it',
    access: { may: 'write', at: 'statePoint' },
    body: statePointUpdateSchema,
    answer: { status: 200, body: statePointSchema },
    errors: ['CONFLICT', 'IN_USE'],
    handle: ({ services, member, params, body }) =>
      services.statePoints.update(member, params.statePointId, body),
  }),
  route({
    method: 'delete',
    path: '/api/state-points/:statePointId',
    summary: 'Delete a state point on which no data stand',
    access: { may: 'write', at: 'statePoint' },
    answer: { status: 204 },
    errors: ['IN_USE'],
    handle: ({ services, member, params }) => services.statePoints.remove(member, params.statePointId),
  }),
]
