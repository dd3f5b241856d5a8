import type { HandOverDetail } from '../../shared/contracts/hand-over-desk'
import type { Member, Services } from '../services'

/** Where the hand-overs of the demonstration stand, and who makes and reviews them. */
export interface DemoHandOvers {
  readonly polymerId: string
  readonly mappingId: string
  readonly statePointId: string
  readonly modeller: Member
  readonly reviewer: Member
}

const LEFT_OUT = 'Not in this set: its potential is still to be settled.'
/** The released set holds bonds and angles of the backbone and the ester; the one under review has the dihedral besides. */
const RELEASED = ['B–B', 'B–E', 'B–B–B', 'B–B–E']
const IN_REVIEW = [...RELEASED, 'B–B–B–B']

/** One hand-over that is out and one that waits for its reviewer, made through the services as people would. */
export async function writeHandOvers(services: Services, demo: DemoHandOvers): Promise<void> {
  const { modeller, reviewer } = demo
  const first = await ready(services, demo, 'Backbone and ester, melt', RELEASED)
  const asked = await ask(services, demo, first, 'First set for the colleagues who run the melt.')
  await services.reviews.comment(reviewer, asked.id, {
    termId: asked.terms.find(({ name }) => name === 'B–B–B')?.id ?? null,
    text: 'The second basin is real: it stands in every block.',
  })
  const signed = await services.reviews.decide(reviewer, asked.id, {
    outcome: 'signed off',
    revision: asked.revision,
    note: 'Good to go.',
  })
  await services.releases.release(modeller, signed.id, signed.revision)
  const second = await ready(services, demo, 'With the backbone dihedral', IN_REVIEW)
  await ask(services, demo, second, 'The dihedral is new; the rest is hand-over 1.')
}

/** A draft of the terms named, with a reason for every other and an answer to every warning. */
async function ready(
  services: Services,
  { polymerId, mappingId, statePointId, modeller }: DemoHandOvers,
  title: string,
  names: readonly string[],
): Promise<HandOverDetail> {
  const notes = 'Invented demonstration.'
  const draft = await services.handOvers.create(modeller, polymerId, {
    mappingId,
    statePointId,
    title,
    notes,
  })
  const leftOut = draft.terms
    .filter(({ name, leftOut: out }) => out === null && !names.includes(name))
    .map(({ id }) => ({ termId: id, reason: LEFT_OUT }))
  const chosen = await services.handOvers.update(modeller, draft.id, {
    revision: draft.revision,
    selection: { version: 1, leftOut, apart: [] },
  })
  for (const { potentialId, leftOut: out, warnings } of chosen.terms) {
    if (potentialId === null || out !== null) continue
    for (const { code, answer } of warnings) {
      if (answer !== null) continue
      const reason = 'Looked at: it changes nothing where chains go at this temperature.'
      await services.warningAnswers.keepForPotential(modeller, potentialId, { code, reason })
    }
  }
  return chosen
}

function ask(
  services: Services,
  { modeller, reviewer }: DemoHandOvers,
  { id, revision }: HandOverDetail,
  note: string,
): Promise<HandOverDetail> {
  return services.reviews.ask(modeller, id, { revision, reviewerId: reviewer.userId, note })
}
