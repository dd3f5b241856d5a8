import type { HandOverDetail, HandOverRelease } from '@shared/contracts/hand-over-desk'
import type { Member, Services } from '../../server/services'
import { buildJob, type Job } from './job-builder'
import type { TestGroup } from './group-builder'

/** A hand-over with the job it was made from. */
export interface BuiltHandOver<Body = HandOverDetail> {
  readonly job: Job
  readonly handOver: Body
}

/** Keeps every warning that the checklist asks about, each with a reason. */
export async function answerWarnings(
  services: Services,
  member: Member,
  { terms, pairs }: HandOverDetail,
): Promise<void> {
  for (const { potentialId, leftOut, warnings } of terms) {
    if (potentialId === null || leftOut) continue
    for (const { code } of warnings) {
      await services.warningAnswers.keepForPotential(member, potentialId, { code, reason: 'Looked at.' })
    }
  }
  for (const { jointDistributionId, warnings } of pairs) {
    for (const { code } of warnings) {
      await services.warningAnswers.keepForPair(member, jointDistributionId, { code, reason: 'Looked at.' })
    }
  }
}

/** A draft of the modeller whose checklist is met: one bond is handed over, the other terms are left out. */
export async function buildDraft(
  services: Services,
  { modeller }: TestGroup,
  { job: given, title = 'Melt tables' }: { readonly job?: Job; readonly title?: string } = {},
): Promise<BuiltHandOver> {
  const job = given ?? (await buildJob(services, modeller.member, { joint: false }))
  const { polymerId, mappingId, statePointId } = job
  const what = { mappingId, statePointId, title, notes: '' }
  const { id, revision } = await services.handOvers.create(modeller.member, polymerId, what)
  const leftOut = job.terms
    .filter((term) => term.id !== job.bondId)
    .map((term) => ({ termId: term.id, reason: 'Not asked for.' }))
  const draft = await services.handOvers.update(modeller.member, id, {
    revision,
    selection: { version: 1, leftOut, apart: [] },
  })
  await answerWarnings(services, modeller.member, draft)
  return { job, handOver: await services.handOvers.get(modeller.member, id) }
}

/** The same, asked of the reviewer. */
export async function buildInReview(
  services: Services,
  group: TestGroup,
  options: Parameters<typeof buildDraft>[2] = {},
): Promise<BuiltHandOver> {
  const { job, handOver } = await buildDraft(services, group, options)
  const asked = await services.reviews.ask(group.modeller.member, handOver.id, {
    revision: handOver.revision,
    reviewerId: group.reviewer.member.userId,
    note: '',
  })
  return { job, handOver: asked }
}

/** The same, signed off by the reviewer. */
export async function buildSignedOff(
  services: Services,
  group: TestGroup,
  options: Parameters<typeof buildDraft>[2] = {},
): Promise<BuiltHandOver> {
  const { job, handOver } = await buildInReview(services, group, options)
  const { id, revision } = handOver
  const decision = { outcome: 'signed off', revision, note: '' } as const
  return { job, handOver: await services.reviews.decide(group.reviewer.member, id, decision) }
}

/** The same, released by the modeller. */
export async function buildReleased(
  services: Services,
  group: TestGroup,
  options: Parameters<typeof buildDraft>[2] = {},
): Promise<BuiltHandOver<HandOverRelease>> {
  const { job, handOver } = await buildSignedOff(services, group, options)
  const { id, revision } = handOver
  return { job, handOver: await services.releases.release(group.modeller.member, id, revision) }
}
