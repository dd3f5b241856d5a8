import { enableAutoUnmount, mount } from '@vue/test-utils'
import { h } from 'vue'
import { VApp } from 'vuetify/components'
import { afterEach, describe, expect, it, vi } from 'vitest'
import type { Deliveries, Recipient } from '@shared/contracts/delivery'
import type { HandOverRelease } from '@shared/contracts/hand-over-desk'
import DeliveryGroup from '@/components/delivery/DeliveryGroup.vue'
import { createBeadwrightVuetify } from '@/plugins/vuetify'
import { click, control, fakeApi, freshStores, pageText, type } from '../../support/mount'

enableAutoUnmount(afterEach)
afterEach(() => vi.unstubAllGlobals())

const recipient: Recipient = {
  id: 'r',
  name: 'Rhea Recipient',
  email: 'rhea@example.org',
  hasAccount: false,
  state: 'opened',
  sent: 2,
  sentBy: { id: 'me', name: 'Milo' },
  sentAt: '2026-06-12T12:00:00Z',
  expiresAt: '2026-09-10T12:00:00Z',
  revokedAt: null,
  openedAt: '2026-06-13T12:00:00Z',
  acknowledgedAt: null,
  acknowledgedBy: null,
}
const deliveries = (changes: Partial<Deliveries> = {}): Deliveries => ({
  recipients: [recipient],
  downloads: [],
  questions: [],
  returned: [],
  earlier: [],
  ...changes,
})
const GET = 'GET /api/hand-overs/h/deliveries'
const SEND = 'POST /api/hand-overs/h/deliveries'
const open = (canWrite = true, changes: Partial<HandOverRelease> = {}) => {
  const release = { id: 'h', number: 2, withdrawn: null, ...changes } as HandOverRelease
  mount(
    { render: () => h(VApp, () => h(DeliveryGroup, { release, canWrite })) },
    { global: { plugins: [freshStores(), createBeadwrightVuetify()] }, attachTo: document.body },
  )
}
const here = (text: string | RegExp) => vi.waitFor(() => expect(pageText()).toMatch(text))

describe('DeliveryGroup', () => {
  it('says how far it is with each recipient, and ends a link when asked', async () => {
    const revoked = { ...recipient, state: 'revoked' as const, revokedAt: '2026-06-14T12:00:00Z' }
    const sent = fakeApi({
      [GET]: { body: deliveries() },
      'POST /api/recipients/r/revoke': { body: deliveries({ recipients: [revoked] }) },
    })
    open()
    await here('opened 13 June 2026')
    expect(pageText()).toContain('sent 2 times')
    await click('Revoke the link of rhea@example.org')
    await here('revoked 14 June 2026')
    expect(sent.at(-1)).toMatchObject({ method: 'POST', path: '/api/recipients/r/revoke' })
    expect(() => control('Revoke the link of rhea@example.org')).toThrow()
  })

  it('sends to a person by name, and to the recipients of the one before in the same step', async () => {
    const earlier = [{ name: 'Otto', email: 'otto@example.org' }]
    const sent = fakeApi({ [GET]: { body: deliveries({ earlier }) }, [SEND]: { body: deliveries() } })
    open()
    await here('Recipients')
    await click('Send')
    await here('Also to the recipients of the one before: Otto')
    await type('Name', 'Carla')
    await type('E-mail', 'carla at example.org')
    await click('Send')
    await here('This does not look like an e-mail address.')
    await type('E-mail', 'carla@example.org')
    await type('The link works for', '0')
    await click('Send')
    await here('A link works for a day at least.')
    await type('The link works for', '30')
    await click('Send')
    await vi.waitFor(() => expect(sent.at(-1)?.method).toBe('POST'))
    expect(sent.at(-1)?.body).toEqual({
      recipients: [{ name: 'Carla', email: 'carla@example.org' }],
      earlier: true,
      days: 30,
      message: '',
    })
  })

  it('answers a question once something is written', async () => {
    const question = {
      id: 'q',
      table: 'B–E',
      text: 'At 0?',
      askedAt: '2026-06-13T12:00:00Z',
      askedBy: 'Rhea Recipient',
      own: false,
      answer: null,
    }
    const answer = { text: 'At the first bin.', by: 'Milo', at: '2026-06-13T12:00:00Z' }
    const sent = fakeApi({
      [GET]: { body: deliveries({ questions: [question] }) },
      'POST /api/questions/q/answer': {
        status: 201,
        body: deliveries({ questions: [{ ...question, answer }] }),
      },
    })
    open()
    await here('At 0?')
    await click('Answer: At 0?')
    await click('Send answer')
    expect(sent).toHaveLength(1)
    await type('Answer, for every recipient to see', 'At the first bin.')
    await click('Send answer')
    await here('Milo, answered')
    expect(sent.at(-1)?.body).toEqual({ text: 'At the first bin.' })
  })

  it('marks a file that came back, and lets a reader look and change nothing', async () => {
    const file = {
      id: 'f',
      table: 'B–E',
      name: 'run.txt',
      size: 2000,
      sha256: 'd'.repeat(64),
      note: '',
      reading: 'bin centres in nm with count, 100 bins',
      sentBy: 'Rhea Recipient',
      at: '2026-06-13T12:00:00Z',
      standing: 'new' as const,
      settledBy: null,
      settledAt: null,
    }
    const sent = fakeApi({
      [GET]: { body: deliveries({ returned: [file] }) },
      'PUT /api/returned-files/f': { body: deliveries({ returned: [{ ...file, standing: 'taken' }] }) },
    })
    open()
    await here('not looked at yet')
    expect(control('run.txt').getAttribute('href')).toBe('/api/returned-files/f/file')
    await click('Mark run.txt as taken')
    await vi.waitFor(() => expect(sent.at(-1)?.body).toEqual({ standing: 'taken' }))
    document.body.innerHTML = ''
    open(false)
    await here('run.txt')
    for (const name of ['Send', 'Mark run.txt as taken', 'Revoke the link of rhea@example.org']) {
      expect(() => control(name)).toThrow()
    }
  })

  it('sends a withdrawn hand-over to nobody', async () => {
    fakeApi({ [GET]: { body: deliveries() } })
    open(true, { withdrawn: { by: null, at: '2026-07-01T12:00:00Z', reason: 'Wrong.' } })
    await here('Rhea Recipient')
    expect(() => control('Send')).toThrow()
    expect(() => control('Send a new link to rhea@example.org')).toThrow()
  })
})
