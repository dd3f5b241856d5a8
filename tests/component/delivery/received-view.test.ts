import { enableAutoUnmount } from '@vue/test-utils'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { Received } from '@shared/contracts/delivery'
import ReceivedView from '@/views/ReceivedView.vue'
import { mappingDocument } from '../../unit/src/components/bench/bench-terms'
import { click, control, fakeApi, freshStores, mountAt, pageText, submit, type } from '../../support/mount'

enableAutoUnmount(afterEach)
beforeEach(() => {
  const note = document.createElement('p')
  note.id = 'app-header-note'
  document.body.append(note)
})
afterEach(() => {
  document.getElementById('app-header-note')?.remove()
  vi.unstubAllGlobals()
})

const table = {
  id: 't',
  name: 'B–E',
  path: 'bond_B-E_400K.txt',
  kinds: ['bond' as const],
  types: [['B', 'E']],
  domain: [[0.12, 0.48] as [number, number]],
  rows: [361],
  lowestAt: [0.25],
  silhouette: [1, 0, 1],
  firstLines: ['# as released', '0.12 3'],
}
const page = (changes: Partial<Received> = {}): Received => ({
  handOverId: 'h',
  via: 'link',
  recipient: { name: 'Rhea Recipient', email: 'rhea@example.org' },
  expiresAt: '2026-11-30T12:00:00Z',
  acknowledged: null,
  withdrawn: null,
  replacedBy: null,
  layouts: [],
  questions: [],
  returned: [],
  picture: '<svg/>',
  archive: { fileName: 'all.zip', size: 244_000, sha256: 'a'.repeat(64) },
  files: [{ path: table.path, mediaType: 'text/plain', size: 17_000, sha256: 'b'.repeat(64) }],
  tables: [table],
  frozen: {
    version: 1,
    number: 2,
    title: 'Melt tables',
    notes: '',
    group: 'Adhesives group',
    invented: true,
    polymer: { name: 'polyethylene', smiles: '*CC(*)C(=O)OCCCCCC', formula: 'C9H16O2', mass: 156.225 },
    mapping: { name: '3-to-1', revision: 1, document: mappingDocument },
    statePoint: { temperature: 400, pressure: 1, phase: 'melt', composition: '' },
    layout: {
      layoutId: null,
      length: 'nm',
      angle: 'degree',
      energy: 'kJ/mol',
      name: 'Three columns',
      document: null,
    },
    madeBy: 'Milo',
    signedOffBy: 'Renate',
    signedOffAt: '2026-06-12T12:00:00Z',
    releasedAt: '2026-06-12T12:00:00Z',
    replaces: 1,
    leftOut: [],
    points: [],
    differences: [{ about: 'B–E', change: 'changed', text: 'Largest change 0.2 kT.', largest: null }],
    contentSha256: 'c',
  },
  ...changes,
})
const GET = 'GET /api/received/secret'
const open = () => mountAt('received', '/received/secret', ReceivedView, freshStores(null))
const here = (text: string | RegExp) => vi.waitFor(() => expect(pageText()).toMatch(text))

describe('ReceivedView', () => {
  it('says how it was opened and until when, and gives the released files by links', async () => {
    fakeApi({ [GET]: { body: page() } })
    await open()
    await here('Opened by link, no account needed. The link works until')
    expect(pageText()).toContain('30 November 2026.')
    expect(pageText()).toContain('Changed since hand-over 1')
    expect(control('Download all').getAttribute('href')).toBe('/api/received/secret/archive.zip')
    expect(control(/^Download bond/).getAttribute('href')).toBe(
      '/api/received/secret/file?path=bond_B-E_400K.txt',
    )
  })

  it.each([
    ['expired', 'This link is out of date'],
    ['revoked', 'This link was taken back'],
    ['unknown', 'There is no such link'],
  ])('says what to do with a link that is %s', async (reason, words) => {
    const body = { code: 'LINK_INVALID', message: 'no', details: { reason } }
    fakeApi({ [GET]: { status: 404, body } })
    await open()
    await here(words)
  })

  it('puts the withdrawal in place of the download button, and leaves the archive for the record', async () => {
    const withdrawn = { at: '2026-07-01T12:00:00Z', reason: 'Measured at 300 K.' }
    fakeApi({ [GET]: { body: page({ withdrawn }) } })
    await open()
    await here('Measured at 300 K.')
    expect(() => control('Download all')).toThrow()
    expect(() => control(/^Download bond/)).toThrow()
    expect(control('Files, for the record').getAttribute('href')).toContain('/archive.zip')
  })

  it('acknowledges receipt under the name of the recipient', async () => {
    const acknowledged = { at: '2026-07-01T12:00:00Z', by: 'Rhea R.' }
    const sent = fakeApi({
      [GET]: { body: page() },
      'POST /api/received/secret/acknowledgement': { body: page({ acknowledged }) },
    })
    await open()
    await here('Acknowledge receipt')
    await type('Your name', 'Rhea R.')
    document.body.querySelectorAll('form')[0].dispatchEvent(new Event('submit', { cancelable: true }))
    await here('by Rhea R.')
    expect(sent.at(-1)?.body).toEqual({ name: 'Rhea R.' })
  })

  it('asks about the whole unless a table is chosen, and shows question and answer', async () => {
    const question = {
      id: 'q',
      table: 'B–E',
      text: 'Does it start at 0?',
      askedAt: '2026-06-16T12:00:00Z',
      askedBy: null,
      own: false,
      answer: { text: 'At the first bin.', by: 'Milo', at: '2026-06-16T12:00:00Z' },
    }
    const sent = fakeApi({
      [GET]: { body: page({ questions: [question] }) },
      'POST /api/received/secret/questions': { status: 201, body: page({ questions: [question, question] }) },
    })
    await open()
    await here('At the first bin.')
    expect(pageText()).toContain('1 question')
    await submit()
    await here('Write the question.')
    expect(sent).toHaveLength(1)
    await type('Question', 'And at 450 K?')
    await submit()
    await here('2 questions')
    expect(sent.at(-1)?.body).toEqual({ table: null, text: 'And at 450 K?' })
  })

  it('says when a later hand-over took its place', async () => {
    fakeApi({ [GET]: { body: page({ replacedBy: { number: 3, sent: true, id: null } }) } })
    await open()
    await here(/replaced by ?hand-over 3/)
  })

  it('keeps the reason and the line when a file that was sent back cannot be read', async () => {
    const refused = { code: 'TEXT_NOT_A_NUMBER', message: '“six” is no number.', line: 3 }
    fakeApi({
      [GET]: { body: page() },
      'POST /api/received/secret/returned-files': { status: 422, body: refused },
    })
    await open()
    await here('Send back what you measured')
    const input = document.getElementById('delivery-return-file') as HTMLInputElement
    Object.defineProperty(input, 'files', { value: [new File(['0.1 six'], 'run.txt')] })
    input.dispatchEvent(new Event('change'))
    await here('run.txt was not taken')
    expect(pageText()).toContain('“six” is no number. Line 3.')
  })

  it('tries again when asked after a failure', async () => {
    const failed = { status: 503, body: { code: 'UNAVAILABLE', message: 'The database rests.' } }
    fakeApi({ [GET]: [failed, { body: page() }] })
    await open()
    await here('The database rests.')
    await click('Try again')
    await here('Take the tables')
  })
})
