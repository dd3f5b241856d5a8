import { buildDelivery } from '../delivery-builder'
import { bondFile, type Job, uploaded } from '../job-builder'
import { newAddress } from '../mail-texts'
import type { RouteSamples, SampleWorld } from './sample'

/** What a sample stands on, made once for each job: a job is made anew where a request changes something. */
function oncePerJob<Made>(make: (world: SampleWorld) => Promise<Made>) {
  const made = new WeakMap<Job, Promise<Made>>()
  return (world: SampleWorld): Promise<Made> => {
    const before = made.get(world.job) ?? make(world)
    made.set(world.job, before)
    return before
  }
}

const delivered = oncePerJob(async ({ server, group, job }) => {
  const { handOver, recipientId, token } = await buildDelivery(server, group, { job })
  return { ids: { handOverId: handOver.id, recipientId }, token }
})

const withQuestion = oncePerJob(async (world) => {
  const { ids, token } = await delivered(world)
  const { questions, received } = world.server.services
  const party = await received.byToken(token)
  const page = await questions.ask(party, { table: null, text: 'Where does it start?' })
  return { ids: { ...ids, questionId: page.questions[0].id } }
})

const withReturnedFile = oncePerJob(async (world) => {
  const { ids, token } = await delivered(world)
  const { returnedFiles, received } = world.server.services
  const party = await received.byToken(token)
  const page = await returnedFiles.send(party, { table: 'A–A', note: '' }, uploaded(bondFile()))
  return { ids: { ...ids, returnedFileId: page.returned[0].id } }
})

/** Hand-overs on their way to recipients, as the group handles them. */
export const deliverySamples: RouteSamples = {
  'get /api/hand-overs/:handOverId/deliveries': delivered,
  'post /api/hand-overs/:handOverId/deliveries': async (world) => ({
    ...(await delivered(world)),
    body: { recipients: [{ name: 'Rhea Recipient', email: newAddress() }] },
  }),
  'post /api/recipients/:recipientId/send': async (world) => ({ ...(await delivered(world)), body: {} }),
  'patch /api/recipients/:recipientId': async (world) => ({
    ...(await delivered(world)),
    body: { days: 10 },
  }),
  'post /api/recipients/:recipientId/revoke': delivered,
  'post /api/hand-overs/:handOverId/questions': async (world) => ({
    ...(await delivered(world)),
    body: { table: 'A–A', text: 'Is the first bin at 0.2 nm?' },
  }),
  'post /api/questions/:questionId/answer': async (world) => ({
    ...(await withQuestion(world)),
    body: { text: 'At 0.2 nm.' },
  }),
  'get /api/returned-files/:returnedFileId/file': withReturnedFile,
  'put /api/returned-files/:returnedFileId': async (world) => ({
    ...(await withReturnedFile(world)),
    body: { standing: 'taken' },
  }),
}
