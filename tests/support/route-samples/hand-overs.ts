import { buildDraft, buildInReview, buildReleased, buildSignedOff } from '../hand-over-builder'
import type { RouteSamples, Sample, SampleWorld } from './sample'

type Build = typeof buildDraft | typeof buildReleased

/** A hand-over of the group, taken as far as the route asks, with what the request says of it. */
const made =
  (
    build: Build,
    sample: (handOver: { readonly revision: number }, world: SampleWorld) => Sample = () => ({}),
  ) =>
  async (world: SampleWorld): Promise<Sample> => {
    const { server, group, job } = world
    const { handOver } = await build(server.services, group, { job })
    return { ids: { handOverId: handOver.id }, ...sample(handOver, world) }
  }

/** Hand-overs: drafts, reviews, releases, and the answers to warnings before them. */
export const handOverSamples: RouteSamples = {
  'get /api/polymers/:polymerId/hand-overs': () => ({}),
  'post /api/polymers/:polymerId/hand-overs': ({ job: { mappingId, statePointId } }) => ({
    body: { mappingId, statePointId, title: 'Melt' },
  }),
  'get /api/hand-overs/:handOverId': made(buildDraft),
  'patch /api/hand-overs/:handOverId': made(buildDraft, ({ revision }) => ({
    body: { revision, notes: 'x' },
  })),
  'delete /api/hand-overs/:handOverId': made(buildDraft),
  'get /api/hand-overs/:handOverId/preview': made(buildDraft, () => ({
    query: `table=${encodeURIComponent('A–A')}`,
  })),
  'get /api/groups/:groupId/waiting': () => ({}),
  'post /api/hand-overs/:handOverId/review': made(buildDraft, ({ revision }, { group }) => ({
    body: { revision, reviewerId: group.reviewer.member.userId },
  })),
  'post /api/hand-overs/:handOverId/take-back': made(buildInReview, ({ revision }) => ({
    body: { revision },
  })),
  'post /api/hand-overs/:handOverId/decision': made(buildInReview, ({ revision }) => ({
    body: { revision, outcome: 'signed off' },
  })),
  'put /api/hand-overs/:handOverId/mark': async ({ server, group, job }) => {
    const { handOver } = await buildInReview(server.services, group, { job })
    return { ids: { handOverId: handOver.id }, body: { termId: job.bondId, mark: 'accepted' } }
  },
  'post /api/hand-overs/:handOverId/comments': made(buildDraft, () => ({
    body: { termId: null, text: 'Well done.' },
  })),
  'get /api/potentials/:potentialId/answers': () => ({}),
  'put /api/potentials/:potentialId/answers': () => ({
    body: { code: 'COUNTS_TAKEN_AS_INDEPENDENT', reason: 'They are far apart in time.' },
  }),
  'put /api/joint-distributions/:jointDistributionId/answers': () => ({
    body: { code: 'JOINT_SPARSE', reason: 'The corners do not matter.' },
  }),
  'post /api/hand-overs/:handOverId/release': made(buildSignedOff, ({ revision }) => ({
    body: { revision },
  })),
  'get /api/hand-overs/:handOverId/release': made(buildReleased),
  'post /api/hand-overs/:handOverId/withdrawal': made(buildReleased, ({ revision }) => ({
    body: { revision, reason: 'A wrong file was taken.' },
  })),
  'get /api/hand-overs/:handOverId/archive.zip': made(buildReleased),
  'get /api/hand-overs/:handOverId/files/:path': async (world) => {
    const sample = await made(buildReleased)(world)
    return { ids: { ...sample.ids, path: 'README.txt' } }
  },
}
