import { z } from 'zod'
import { idSchema } from '../../shared/contracts/common'
import {
  apiKeyCreateSchema,
  apiKeyMadeSchema,
  apiKeySchema,
  keyHolderSchema,
} from '../../shared/contracts/key'
import { notFound } from '../errors/http-error'
import { route } from './route'

export const keyRoutes = [
  route({
    method: 'get',
    path: '/api/key',
    summary: 'For a script: the key it came with, for whom it acts, and in which groups',
    access: 'key',
    answer: { status: 200, body: keyHolderSchema },
    handle: ({ services, key }) => services.keys.holder(key),
  }),
  route({
    method: 'get',
    path: '/api/keys',
    summary: 'Your API keys, the newest first, revoked ones too',
    access: 'person',
    answer: { status: 200, body: z.object({ keys: z.array(apiKeySchema) }) },
    handle: async ({ services, userId }) => ({ keys: await services.keys.list(userId) }),
  }),
  route({
    method: 'post',
    path: '/api/keys',
    summary: 'Make an API key; the answer is the only one that ever shows it',
    access: 'person',
    body: apiKeyCreateSchema,
    answer: { status: 201, body: apiKeyMadeSchema },
    errors: ['TOO_MANY_KEYS'],
    handle: ({ services, userId, body }) => services.keys.make(userId, body),
  }),
  route({
    method: 'delete',
    path: '/api/keys/:keyId',
    summary: 'Revoke one of your API keys, at once and for good',
    access: 'person',
    answer: { status: 204 },
    errors: ['NOT_FOUND'],
    handle: ({ services, userId, params }) => {
      const id = idSchema.safeParse(params.keyId)
      if (!id.success) throw notFound('key')
      return services.keys.revoke(userId, id.data)
    },
  }),
]
