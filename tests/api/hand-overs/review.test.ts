import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { handOverDetailSchema, waitingSchema } from '@shared/contracts/hand-over-desk'
import { DEFAULT_INVERSION_SETTINGS } from '@shared/inversion'
import { type ApiServer, openApiServer } from '../../support/api-server'
import { buildGroup, type TestGroup } from '../../support/group-builder'
import { buildDraft, buildInReview, buildSignedOff } from '../../support/hand-over-builder'
import { buildJob, withTypes } from '../../support/job-builder'

let server: ApiServer
let group: TestGroup

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
})

afterAll(() => server.close())

const mailsTo = async (email: string): Promise<{ subject: string; text: string }[]> =>
  server.dataSource.query(`select "subject", "text" from "mail" where "to" = $1 order by "created_at"`, [
    email,
  ])

describe('asking for a review', () => {
  it('needs the checklist met, and says what is open and where', async () => {
    const job = await buildJob(server.services, group.modeller.member, { joint: false })
    const { mappingId, statePointId, polymerId } = job
    const created = await group.modeller.client.post(`/api/polymers/${polymerId}/hand-overs`, {
      mappingId,
      statePointId,
      title: 'Too early',
    })
    const draft = handOverDetailSchema.parse(created.body)
    const covered = draft.checklist.find(({ code }) => code === 'TERMS_COVERED')
    expect(covered?.met).toBe(false)
    expect(covered?.lines).toContainEqual({
      text: 'A–A–A: no data at this state point',
      open: true,
      place: { room: 'intake', termId: job.angleId },
    })
    const answer = await group.modeller.client.post(`/api/hand-overs/${draft.id}/review`, {
      revision: draft.revision,
      reviewerId: group.reviewer.member.userId,
    })
    expect(answer.body).toMatchObject({ code: 'CHECKLIST_OPEN' })
    expect((answer.body as { issues: object[] }).issues).toContainEqual({
      field: 'TERMS_COVERED',
      message: 'A–A–A: no data at this state point',
    })
  })

  it('tells the reviewer by e-mail, once, with the note and the address of the hand-over', async () => {
    const own = await buildGroup(server)
    const { handOver } = await buildDraft(server.services, own)
    await own.modeller.client.post(`/api/hand-overs/${handOver.id}/review`, {
      revision: handOver.revision,
      reviewerId: own.reviewer.member.userId,
      note: 'The bond is what matters.',
    })
    const [mail, ...more] = await mailsTo(own.reviewer.email)
    expect(more).toEqual([])
    expect(mail.subject).toContain(handOver.title)
    expect(mail.text).toContain('The bond is what matters.')
    expect(mail.text).toContain(`/hand-overs/${handOver.id}`)
  })

  it('is not possible of oneself, of the author, of a modeller or of someone outside', async () => {
    const { handOver } = await buildDraft(server.services, group)
    const strangers = await buildGroup(server)
    const ask = (client: typeof group.owner.client, reviewerId: string) =>
      client.post(`/api/hand-overs/${handOver.id}/review`, { revision: handOver.revision, reviewerId })
    const { client } = group.owner
    const refusals = [
      await ask(client, group.owner.member.userId),
      await ask(client, group.modeller.member.userId),
      await ask(client, group.collaborator.member.userId),
      await ask(client, strangers.reviewer.member.userId),
    ]
    expect(refusals.map(({ body }) => (body as { code: string }).code)).toEqual([
      'OWN_WORK',
      'OWN_WORK',
      'NOT_FOUND',
      'NOT_FOUND',
    ])
  })

  it('takes the hand-over out of its author’s hands until it comes back or is taken back', async () => {
    const { handOver } = await buildInReview(server.services, group)
    const { client } = group.modeller
    const path = `/api/hand-overs/${handOver.id}`
    const { revision } = handOver
    expect((await client.patch(path, { revision, notes: 'more' })).body).toMatchObject({ code: 'CONFLICT' })
    expect((await client.delete(path)).body).toMatchObject({ code: 'CONFLICT' })
    const back = await client.post(`${path}/take-back`, { revision })
    expect(back.body).toMatchObject({ standing: 'draft' })
    const changed = await client.patch(path, { revision: revision + 1, notes: 'more' })
    expect(changed.body).toMatchObject({ notes: 'more', reviews: [{ outcome: 'taken back' }] })
  })
})

describe('deciding', () => {
  it('is refused to the author and to whoever asked, whatever their role', async () => {
    const own = await buildGroup(server)
    const { handOver, job } = await buildDraft(server.services, own)
    const { id, revision } = handOver
    const asked = await own.owner.client.post(`/api/hand-overs/${id}/review`, {
      revision,
      reviewerId: own.reviewer.member.userId,
    })
    expect(asked.status).toBe(200)
    const decision = { revision: revision + 1, outcome: 'signed off' }
    const byAsker = await own.owner.client.post(`/api/hand-overs/${id}/decision`, decision)
    expect(byAsker.status).toBe(409)
    expect(byAsker.body).toMatchObject({ code: 'OWN_WORK' })
    const mark = { termId: job.bondId, mark: 'accepted' }
    expect((await own.owner.client.put(`/api/hand-overs/${id}/mark`, mark)).body).toMatchObject({
      code: 'OWN_WORK',
    })
    await server.dataSource.query(`update "membership" set "role" = 'owner' where "user_id" = $1`, [
      own.modeller.member.userId,
    ])
    const byAuthor = await own.modeller.client.post(`/api/hand-overs/${id}/decision`, decision)
    expect(byAuthor.body).toMatchObject({ code: 'OWN_WORK' })
  })

  it('of two reviewers at the same moment happens once; the other is told what came of it', async () => {
    const { handOver } = await buildInReview(server.services, group)
    const { id, revision } = handOver
    const [first, second] = await Promise.all([
      group.reviewer.client.post(`/api/hand-overs/${id}/decision`, { revision, outcome: 'signed off' }),
      group.owner.client.post(`/api/hand-overs/${id}/decision`, {
        revision,
        outcome: 'sent back',
        note: 'The tail is too soft.',
      }),
    ])
    expect([first.status, second.status].sort()).toEqual([200, 409])
    const [won, lost] = first.status === 200 ? [first, second] : [second, first]
    const { standing } = handOverDetailSchema.parse(won.body)
    expect(lost.body).toMatchObject({ code: 'CONFLICT', details: { id, standing } })
  })

  it('to send back needs a note, which reaches the author by e-mail', async () => {
    const own = await buildGroup(server)
    const { handOver } = await buildInReview(server.services, own)
    const { id, revision } = handOver
    const { client } = own.reviewer
    const silent = await client.post(`/api/hand-overs/${id}/decision`, {
      revision,
      outcome: 'sent back',
      note: '',
    })
    expect(silent.body).toMatchObject({ code: 'VALIDATION_FAILED', field: 'note' })
    const note = 'State the sample size of the bond.'
    const sent = await client.post(`/api/hand-overs/${id}/decision`, { revision, outcome: 'sent back', note })
    expect(sent.body).toMatchObject({ standing: 'sent back', reviews: [{ outcome: 'sent back', note }] })
    const [mail] = await mailsTo(own.modeller.email)
    expect(mail.text).toContain(note)
  })

  it('to sign off waits for a questioned term', async () => {
    const { handOver, job } = await buildInReview(server.services, group)
    const { id, revision } = handOver
    const { client } = group.reviewer
    const path = `/api/hand-overs/${id}`
    const marked = await client.put(`${path}/mark`, { termId: job.bondId, mark: 'questioned' })
    const bond = handOverDetailSchema.parse(marked.body).terms.find((term) => term.id === job.bondId)
    expect(bond?.mark).toMatchObject({ mark: 'questioned', by: { name: 'The reviewer' } })
    const decision = { revision, outcome: 'signed off' }
    expect((await client.post(`${path}/decision`, decision)).body).toMatchObject({ code: 'TERM_QUESTIONED' })
    await client.put(`${path}/mark`, { termId: job.bondId, mark: 'accepted' })
    expect((await client.post(`${path}/decision`, decision)).body).toMatchObject({
      standing: 'signed off',
      signedOffBy: { name: 'The reviewer' },
    })
  })

  it('signs nothing off that changed after review was asked for: it goes back by itself', async () => {
    const { handOver, job } = await buildInReview(server.services, group)
    const { id, revision } = handOver
    const settings = { ...DEFAULT_INVERSION_SETTINGS, tails: { stiffness: 4 } }
    const save = { statePointId: job.statePointId, revision: 1, settings }
    await server.services.potentials.save(group.modeller.member, job.bondId, save)
    expect(await server.services.handOvers.get(group.reviewer.member, id)).toMatchObject({ changed: true })
    const { client } = group.reviewer
    const answer = await client.post(`/api/hand-overs/${id}/decision`, { revision, outcome: 'signed off' })
    expect(answer.status).toBe(409)
    expect(answer.body).toMatchObject({ code: 'CONTENT_CHANGED' })
    expect(await server.services.handOvers.get(group.reviewer.member, id)).toMatchObject({
      standing: 'sent back',
      reviews: [{ outcome: 'lapsed' }],
    })
  })

  it('cannot be done on a draft or on what is signed off', async () => {
    const draft = await buildDraft(server.services, group)
    const signed = await buildSignedOff(server.services, group)
    for (const { handOver } of [draft, signed]) {
      const { id, revision } = handOver
      const answer = await group.reviewer.client.post(`/api/hand-overs/${id}/decision`, {
        revision,
        outcome: 'signed off',
      })
      expect(answer.body).toMatchObject({ code: 'CONFLICT' })
    }
  })
})

describe('a mark', () => {
  it('lapses when the potential of its term changes', async () => {
    const { handOver, job } = await buildInReview(server.services, group)
    const { client } = group.reviewer
    await client.put(`/api/hand-overs/${handOver.id}/mark`, { termId: job.bondId, mark: 'accepted' })
    const settings = { ...DEFAULT_INVERSION_SETTINGS, tails: { stiffness: 5 } }
    const save = { statePointId: job.statePointId, revision: 1, settings }
    await server.services.potentials.save(group.modeller.member, job.bondId, save)
    const { terms } = await server.services.handOvers.get(group.reviewer.member, handOver.id)
    expect(terms.find(({ id }) => id === job.bondId)?.mark).toBeNull()
  })

  it('is not given to a term that is left out', async () => {
    const { handOver, job } = await buildInReview(server.services, group)
    const body = { termId: job.angleId, mark: 'accepted' }
    const answer = await group.reviewer.client.put(`/api/hand-overs/${handOver.id}/mark`, body)
    expect(answer.body).toMatchObject({ code: 'NOT_FOUND', field: 'termId' })
  })
})

describe('comments', () => {
  it('stand with their term in the order they were written, with who wrote them', async () => {
    const { handOver, job } = await buildInReview(server.services, group)
    const path = `/api/hand-overs/${handOver.id}/comments`
    await group.reviewer.client.post(path, { termId: job.bondId, text: 'Why harmonic?' })
    const answer = await group.modeller.client.post(path, {
      termId: job.bondId,
      text: 'It fits within noise.',
    })
    expect(handOverDetailSchema.parse(answer.body).comments).toMatchObject([
      { termId: job.bondId, text: 'Why harmonic?', by: { name: 'The reviewer' } },
      { termId: job.bondId, text: 'It fits within noise.', by: { name: 'The modeller' } },
    ])
  })

  it('are about a term of the hand-over’s own mapping', async () => {
    const { handOver } = await buildInReview(server.services, group)
    const other = await buildJob(server.services, group.modeller.member, { joint: false })
    const body = { termId: other.bondId, text: 'Of another chain.' }
    const answer = await group.reviewer.client.post(`/api/hand-overs/${handOver.id}/comments`, body)
    expect(answer.body).toMatchObject({ code: 'NOT_FOUND', field: 'termId' })
  })
})

describe('the answer to a warning', () => {
  it('holds for data and settings as they are, and comes back with them', async () => {
    const job = await buildJob(server.services, group.modeller.member, { joint: false })
    const path = `/api/potentials/${job.potentialId}/answers`
    const { client } = group.modeller
    const kept = await client.put(path, { code: 'COUNTS_TAKEN_AS_INDEPENDENT', reason: 'Far apart in time.' })
    expect(kept.body).toMatchObject({
      answers: [{ reason: 'Far apart in time.', by: { name: 'The modeller' } }],
    })
    const save = (revision: number, stiffness: number) =>
      server.services.potentials.save(group.modeller.member, job.bondId, {
        statePointId: job.statePointId,
        revision,
        settings: { ...DEFAULT_INVERSION_SETTINGS, tails: { stiffness } },
      })
    await save(1, 3)
    expect((await client.get(path)).body).toEqual({ answers: [] })
    await save(2, DEFAULT_INVERSION_SETTINGS.tails.stiffness)
    expect((await client.get(path)).body).toMatchObject({ answers: [{ reason: 'Far apart in time.' }] })
  })

  it('is one per warning: a later reason takes the place of the one before', async () => {
    const job = await buildJob(server.services, group.modeller.member, { joint: false })
    const path = `/api/potentials/${job.potentialId}/answers`
    const { client } = group.modeller
    await client.put(path, { code: 'FEW_SAMPLES', reason: 'First.' })
    const answer = await client.put(path, { code: 'FEW_SAMPLES', reason: 'Second.' })
    expect(answer.body).toMatchObject({ answers: [{ code: 'FEW_SAMPLES', reason: 'Second.' }] })
  })
})

describe('a draft', () => {
  it('shows the file of a term as a release would write it', async () => {
    const { handOver, job } = await buildDraft(server.services, group)
    const query = `table=${encodeURIComponent('A–A')}`
    const preview = await group.reviewer.client.get(`/api/hand-overs/${handOver.id}/preview?${query}`)
    const table = await group.reviewer.client.get(
      `/api/terms/${job.bondId}/table?statePoint=${job.statePointId}`,
    )
    expect((preview.body as { text: string }).text).toBe(table.text)
    const none = await group.reviewer.client.get(`/api/hand-overs/${handOver.id}/preview?table=Z`)
    expect(none.body).toMatchObject({ code: 'NOT_FOUND', field: 'table' })
  })

  it('asks again whether data fit once the beads they were measured for have changed', async () => {
    const { handOver, job } = await buildDraft(server.services, group)
    const { document } = await server.services.mappings.get(group.modeller.member, job.mappingId)
    const [backbone, ring] = document.beads
    const moved = {
      ...document,
      beads: [
        { ...backbone, atoms: [...backbone.atoms, ring.atoms[0]] },
        { ...ring, atoms: ring.atoms.slice(1) },
      ],
    }
    const save = { revision: 1, name: 'Two beads', document: moved }
    const { version } = await server.services.mappings.update(group.modeller.member, job.mappingId, save)
    expect(version).toBe(2)
    const { checklist } = await server.services.handOvers.get(group.modeller.member, handOver.id)
    expect(checklist.find(({ code }) => code === 'DATA_FIT_MAPPING')).toMatchObject({
      met: false,
      lines: [{ open: true }],
    })
    const reason = 'One atom moved; the site did not.'
    const answer = { code: 'MAPPING_CHANGED', reason }
    await server.services.warningAnswers.keepForPotential(group.modeller.member, job.potentialId, answer)
    const after = await server.services.handOvers.get(group.modeller.member, handOver.id)
    expect(after.checklist.every(({ met }) => met)).toBe(true)
  })

  it('asks nothing of data whose beads stayed as they were', async () => {
    const { handOver, job } = await buildDraft(server.services, group)
    const { document } = await server.services.mappings.get(group.modeller.member, job.mappingId)
    const [backbone, ring] = document.beads
    const smaller = { ...document, beads: [backbone, { ...ring, atoms: ring.atoms.slice(1) }] }
    const save = { revision: 1, name: 'Two beads', document: smaller }
    const { version } = await server.services.mappings.update(group.modeller.member, job.mappingId, save)
    expect(version).toBe(2)
    const { checklist } = await server.services.handOvers.get(group.modeller.member, handOver.id)
    expect(checklist.find(({ code }) => code === 'DATA_FIT_MAPPING')).toMatchObject({ met: true })
  })

  it('is thrown away, and then nothing keeps its mapping', async () => {
    const { handOver, job } = await buildDraft(server.services, group)
    const { client } = group.modeller
    expect((await client.delete(`/api/mappings/${job.mappingId}`)).body).toMatchObject({ code: 'IN_USE' })
    expect((await client.delete(`/api/hand-overs/${handOver.id}`)).status).toBe(204)
    expect((await client.delete(`/api/mappings/${job.mappingId}`)).status).toBe(204)
  })

  it('is of a mapping and a state point of the polymer', async () => {
    const [job, other] = [
      await buildJob(server.services, group.modeller.member, { joint: false }),
      await buildJob(server.services, group.modeller.member, { joint: false }),
    ]
    const post = (body: object) =>
      group.modeller.client.post(`/api/polymers/${job.polymerId}/hand-overs`, body)
    const { mappingId, statePointId } = job
    const wrongMapping = await post({ mappingId: other.mappingId, statePointId, title: 'x' })
    expect(wrongMapping.body).toMatchObject({ code: 'NOT_FOUND', field: 'mappingId' })
    const wrongPoint = await post({ mappingId, statePointId: other.statePointId, title: 'x' })
    expect(wrongPoint.body).toMatchObject({ code: 'NOT_FOUND', field: 'statePointId' })
  })

  it('takes no change that rests on an older revision', async () => {
    const { handOver } = await buildDraft(server.services, group)
    const body = { revision: handOver.revision - 1, notes: 'late' }
    const answer = await group.owner.client.patch(`/api/hand-overs/${handOver.id}`, body)
    expect(answer.body).toMatchObject({ code: 'CONFLICT', details: { revision: handOver.revision } })
  })

  it('goes on when types are renamed: its terms keep their names’ data', async () => {
    const { handOver, job } = await buildDraft(server.services, group)
    const save = { revision: 1, name: 'Two beads', document: withTypes({ A: 'C' }) }
    await server.services.mappings.update(group.modeller.member, job.mappingId, save)
    const { terms, checklist } = await server.services.handOvers.get(group.modeller.member, handOver.id)
    expect(terms.find(({ id }) => id === job.bondId)).toMatchObject({ name: 'C–C', state: 'covered' })
    expect(checklist.every(({ met }) => met)).toBe(true)
  })
})

describe('what waits for me', () => {
  it('are reviews asked of me, mine that came back or wait for release, and terms without data', async () => {
    const own = await buildGroup(server)
    const waiting = async (who: 'owner' | 'modeller' | 'reviewer') =>
      waitingSchema.parse((await own[who].client.get(`/api/groups/${own.groupId}/waiting`)).body)
    const { handOver, job } = await buildInReview(server.services, own)
    expect((await waiting('reviewer')).reviews).toMatchObject([{ id: handOver.id }])
    expect((await waiting('owner')).reviews).toEqual([])
    const { gaps } = await waiting('modeller')
    expect(gaps).toMatchObject([
      { mappingId: job.mappingId, terms: job.terms.length, withoutData: job.terms.length - 1 },
    ])
    expect((await waiting('reviewer')).gaps).toEqual([])
    const decision = { revision: handOver.revision, outcome: 'sent back', note: 'Once more.' } as const
    await server.services.reviews.decide(own.reviewer.member, handOver.id, decision)
    expect((await waiting('reviewer')).reviews).toEqual([])
    expect((await waiting('modeller')).sentBack).toMatchObject([{ id: handOver.id }])
    const signed = await buildSignedOff(server.services, own, { job })
    expect((await waiting('modeller')).toRelease).toMatchObject([{ id: signed.handOver.id }])
  })
})
