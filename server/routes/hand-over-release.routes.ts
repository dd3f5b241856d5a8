import { atRevisionSchema, withdrawalSchema } from '../../shared/contracts/hand-over'
import { handOverReleaseSchema } from '../../shared/contracts/hand-over-desk'
import { route } from './route'

const at = { at: 'handOver' } as const
const release = { status: 200, body: handOverReleaseSchema } as const

/** Hand-overs that are out. */
export const handOverReleaseRoutes = [
  route({
    method: 'post',
    path: '/api/hand-overs/:handOverId/release',
    summary: 'Give a signed-off hand-over its number and freeze its content',
    access: { may: 'write', ...at },
    body: atRevisionSchema,
    answer: release,
    errors: ['CONFLICT', 'CONTENT_CHANGED', 'CHECKLIST_OPEN'],
    readsContent: true,
    handle: ({ services, member, params, body }) =>
      services.releases.release(member, params.handOverId, body.revision),
  }),
  route({
    method: 'get',
    path: '/api/hand-overs/:handOverId/release',
    summary: 'A released hand-over: what is frozen, its tables and files with checksums',
    access: { may: 'read', ...at },
    answer: release,
    errors: ['FILE_DAMAGED'],
    handle: ({ services, member, params }) => services.releases.get(member, params.handOverId),
  }),
  route({
    method: 'post',
    path: '/api/hand-overs/:handOverId/withdrawal',
    summary: 'Withdraw a hand-over with a reason; its files stay and say so',
    access: { may: 'write', ...at },
    body: withdrawalSchema,
    answer: release,
    errors: ['CONFLICT'],
    handle: ({ services, member, params, body }) =>
      services.releases.withdraw(member, params.handOverId, body.revision, body.reason),
  }),
  route({
    method: 'get',
    path: '/api/hand-overs/:handOverId/archive.zip',
    summary: 'All files of a released hand-over with manifest and SHA256SUMS, checked before they go out',
    access: { may: 'read', ...at },
    answer: { status: 200, download: 'application/zip' },
    errors: ['FILE_DAMAGED'],
    handle: ({ services, member, params }) => services.releases.archive(member, params.handOverId),
  }),
  route({
    method: 'get',
    path: '/api/hand-overs/:handOverId/files/:path',
    summary: 'One file of a released hand-over, checked before it goes out',
    access: { may: 'read', ...at },
    answer: { status: 200, download: 'application/octet-stream' },
    errors: ['FILE_DAMAGED'],
    handle: ({ services, member, params }) => services.releases.file(member, params.handOverId, params.path),
  }),
]
