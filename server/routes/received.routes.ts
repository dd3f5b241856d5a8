import {
  acknowledgeSchema,
  questionAskSchema,
  receivedListSchema,
  receivedSchema,
  returnSendSchema,
} from '../../shared/contracts/delivery'
import {
  fileQuerySchema,
  ownFileSchema,
  ownLayoutSchema,
  writingQuerySchema,
  writtenSchema,
} from '../../shared/contracts/delivery-writing'
import type { ApiCode } from '../../shared/contracts/error'
import { type AnyRoute, route } from './route'

const page = { status: 200, body: receivedSchema } as const
const added = { status: 201, body: receivedSchema } as const
const written = { status: 200, body: writtenSchema } as const
const zip = { status: 200, download: 'application/zip' } as const
const anyFile = { status: 200, download: 'application/octet-stream' } as const

/** What a recipient may do, once by the link of the e-mail and once with an account. */
const receiving = (base: string, access: 'link' | 'recipient'): AnyRoute[] => {
  const who = access === 'link' ? 'by link' : 'with an account'
  const common = { access, limited: access === 'link' ? ('link' as const) : undefined }
  const errors: ApiCode[] = ['FILE_DAMAGED']
  return [
    route({
      ...common,
      method: 'get',
      path: base,
      summary: `A hand-over as its recipient sees it, ${who}`,
      answer: page,
      errors,
      handle: ({ services, recipient }) => services.received.page(recipient),
    }),
    route({
      ...common,
      method: 'get',
      path: `${base}/archive.zip`,
      summary: `All files with manifest and SHA256SUMS, as released or in a layout, ${who}`,
      query: writingQuerySchema,
      answer: zip,
      errors,
      readsContent: true,
      handle: ({ services, recipient, query }) => services.received.archive(recipient, query),
    }),
    route({
      ...common,
      method: 'get',
      path: `${base}/file`,
      summary: `One file, as released or in a layout, ${who}`,
      query: fileQuerySchema,
      answer: anyFile,
      errors: [...errors, 'HAND_OVER_WITHDRAWN'],
      readsContent: true,
      handle: ({ services, recipient, query: { path, ...query } }) =>
        services.received.file(recipient, path, query),
    }),
    route({
      ...common,
      method: 'get',
      path: `${base}/written`,
      summary: `What a layout makes of the tables: names, checksums, first lines, ${who}`,
      query: writingQuerySchema,
      answer: written,
      errors,
      readsContent: true,
      handle: ({ services, recipient, query }) => services.received.written(recipient, query),
    }),
    route({
      ...common,
      method: 'post',
      path: `${base}/written`,
      summary: `What a layout of one's own makes of the tables, ${who}`,
      body: ownLayoutSchema,
      answer: written,
      errors,
      readsContent: true,
      handle: ({ services, recipient, body }) => services.received.ownWritten(recipient, body),
    }),
    route({
      ...common,
      method: 'post',
      path: `${base}/archive.zip`,
      summary: `All files in a layout of one's own, ${who}`,
      body: ownLayoutSchema,
      answer: zip,
      errors,
      readsContent: true,
      handle: ({ services, recipient, body }) => services.received.ownArchive(recipient, body),
    }),
    route({
      ...common,
      method: 'post',
      path: `${base}/file`,
      summary: `One file in a layout of one's own, ${who}`,
      body: ownFileSchema,
      answer: anyFile,
      errors: [...errors, 'HAND_OVER_WITHDRAWN'],
      readsContent: true,
      handle: ({ services, recipient, body: { path, ...own } }) =>
        services.received.ownFile(recipient, path, own),
    }),
    route({
      ...common,
      method: 'post',
      path: `${base}/acknowledgement`,
      summary: `Acknowledge receipt, ${who}`,
      body: acknowledgeSchema,
      answer: page,
      errors: [...errors, 'CONFLICT'],
      handle: ({ services, recipient, body }) => services.received.acknowledge(recipient, body.name),
    }),
    route({
      ...common,
      method: 'post',
      path: `${base}/questions`,
      summary: `Ask about a table or the whole, ${who}`,
      body: questionAskSchema,
      answer: added,
      errors: [...errors, 'TOO_MANY_OPEN'],
      handle: ({ services, recipient, body }) => services.questions.ask(recipient, body),
    }),
    route({
      ...common,
      method: 'post',
      path: `${base}/returned-files`,
      summary: `Send back a distribution measured with a table, ${who}`,
      body: returnSendSchema,
      upload: 'single',
      answer: added,
      errors: [...errors, 'TOO_MANY_OPEN'],
      readsContent: true,
      handle: ({ services, recipient, body, file }) => services.returnedFiles.send(recipient, body, file),
    }),
  ]
}

/** Hand-overs as recipients see them. */
export const receivedRoutes: readonly AnyRoute[] = [
  route({
    method: 'get',
    path: '/api/received',
    summary: 'The hand-overs that were sent to whoever is signed in',
    access: 'person',
    answer: { status: 200, body: receivedListSchema },
    handle: async ({ services, userId }) => ({ handOvers: await services.received.list(userId) }),
  }),
  ...receiving('/api/received/:token', 'link'),
  ...receiving('/api/hand-overs/:handOverId/received', 'recipient'),
]
