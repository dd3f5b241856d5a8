import { enableAutoUnmount } from '@vue/test-utils'
import { afterEach, describe, expect, it, vi } from 'vitest'
import type { Role } from '@shared/contracts/common'
import {
  type LayoutCreate,
  layoutDocumentSchema,
  type LayoutList,
  type LayoutPreviewAsk,
  type LayoutSave,
  type StoredLayout,
} from '@shared/contracts/layout'
import GroupLayoutsView from '@/views/GroupLayoutsView.vue'
import { layoutWith } from '../../support/layout-builder'
import {
  click,
  control,
  fakeApi,
  field,
  freshStores,
  mountAt,
  pageText,
  submit,
  type,
} from '../../support/mount'

enableAutoUnmount(afterEach)
afterEach(() => vi.unstubAllGlobals())

const ID = '6f8ad5ac-31a4-4a80-90dc-0a3c0d6a8f10'
const TERM = '0a0b9f1e-5a0f-4fd4-b4c8-53c5a2b3a001'
const POINT = '0a0b9f1e-5a0f-4fd4-b4c8-53c5a2b3a002'
const document_ = layoutDocumentSchema.parse(layoutWith({ separator: 'tab' }))
const stored: StoredLayout = {
  id: ID,
  name: 'For the cluster',
  version: 3,
  newestVersion: 3,
  archived: false,
  savedAt: '2026-05-01T10:00:00.000Z',
  savedBy: { id: TERM, name: 'Mo Modeller' },
  document: document_,
}
const list: LayoutList = {
  builtIns: [{ key: 'three-columns', name: 'Three columns', about: 'coordinate, energy, force' }],
  layouts: [stored],
  default: ID,
}
const example = {
  termId: TERM,
  statePointId: POINT,
  kind: 'bond',
  term: 'B–E',
  mapping: '3-to-1',
  polymer: 'Poly',
  temperature: 400,
}
const preview = {
  fileName: 'bond_B-E_400K.txt',
  kind: 'bond',
  lines: 1010,
  head: ['# first', '0.2 3 4'],
  tail: ['0.5 1 2'],
  checks: [
    { code: 'ROWS_EVEN', ok: true, message: '1000 rows.' },
    { code: 'CELLS_FIT', ok: false, message: 'Some numbers are too wide.' },
  ],
}
const PREVIEW = `POST /api/terms/${TERM}/layout-preview`
const answers = {
  'GET /api/groups/group/layouts': { body: list },
  'GET /api/groups/group/layout-examples': { body: { examples: [example] } },
  [`GET /api/layouts/${ID}`]: { body: stored },
  [PREVIEW]: { body: preview },
}
const open = async (path = '', role: Role = 'modeller', more: Parameters<typeof fakeApi>[0] = {}) => {
  const sent = fakeApi({ ...answers, ...more })
  const stage = await mountAt(
    'group-layouts',
    `/groups/group/layouts${path}`,
    GroupLayoutsView,
    freshStores(role),
  )
  return { sent, ...stage }
}
const here = (wanted: string | RegExp) => vi.waitFor(() => expect(pageText()).toMatch(wanted))
const bodiesOf = <Body>(sent: Awaited<ReturnType<typeof open>>['sent'], request: string): Body[] =>
  sent.filter(({ method, path }) => `${method} ${path}` === request).map(({ body }) => body as Body)

describe('the layouts of a group', () => {
  it('stand with those of the house, and say which one is the default', async () => {
    await open()
    await here('For the cluster, default')
    expect(pageText()).toContain('Three columns')
    expect(control('Save For the cluster as a file').getAttribute('href')).toBe(`/api/layouts/${ID}/file`)
  })

  it('are only read by a reviewer', async () => {
    await open('', 'reviewer')
    await here('For the cluster')
    expect(pageText()).not.toContain('New layout')
    expect(() => control('Archive For the cluster')).toThrow()
  })

  it('can be made the default by an owner only', async () => {
    await open('', 'modeller')
    await here('For the cluster')
    expect(() => control('Make Three columns the default')).toThrow()
  })

  it('name everything that is wrong with a file, and store nothing', async () => {
    const { sent } = await open()
    await here('For the cluster')
    const picker = document.querySelector<HTMLInputElement>('input[type=file]')!
    const file = new File(['{"format":"beadwright layout","version":1,"name":"x"}'], 'x.json')
    Object.defineProperty(picker, 'files', { value: [file] })
    picker.dispatchEvent(new Event('change'))
    await here('“layout” is missing')
    expect(sent.filter(({ method }) => method === 'POST')).toEqual([])
  })
})

describe('a layout on the desk', () => {
  it('is shown on a real table, with what was found in its file', async () => {
    await open(`/${ID}`)
    await here('Preview of bond_B-E_400K.txt')
    expect(document.querySelector('pre')?.textContent).toContain('0.2 3 4')
    expect(pageText()).toContain('Warning: Some numbers are too wide.')
    expect(pageText()).toMatch(/1.007 lines/)
  })

  it('is written anew when it changes', async () => {
    const { sent } = await open(`/${ID}`)
    await here('Preview of')
    await type('Before the rows', 'hello')
    await vi.waitFor(() => {
      const asked = bodiesOf<LayoutPreviewAsk>(sent, PREVIEW)
      expect(asked.at(-1)?.document.header).toBe('hello')
    })
  })

  it('says at the field what a template gets wrong', async () => {
    const message = 'Line 1 of the header: there is no field “temprature” here.'
    const fault = { code: 'TEMPLATE_FIELD_UNKNOWN', message, field: 'header', line: 1 }
    await open(`/${ID}`, 'modeller', { [PREVIEW]: [{ body: preview }, { status: 422, body: fault }] })
    await here('Preview of')
    await type('Before the rows', '{{temprature}}')
    await here('The file cannot be written')
    const box = field('Before the rows')
    expect(box.getAttribute('aria-invalid')).toBe('true')
    expect(document.getElementById(box.getAttribute('aria-describedby')!)?.textContent).toContain(message)
  })

  it('takes columns out, adds and moves them', async () => {
    const { sent } = await open(`/${ID}`, 'modeller', { [`PUT /api/layouts/${ID}`]: { body: stored } })
    await here('Preview of')
    await click('Take energy out')
    await click('Add derivative, dU/dq')
    await click('Move derivative, dU/dq one place left')
    await submit()
    const [saved] = bodiesOf<LayoutSave>(sent, `PUT /api/layouts/${ID}`)
    expect(saved.document.columns).toEqual(['coordinate', 'derivative', 'force'])
    expect(saved.version).toBe(3)
  })

  it('is saved anew under its own address', async () => {
    const { sent, router } = await open('/new?from=three-columns', 'modeller', {
      'POST /api/groups/group/layouts': { status: 201, body: { ...stored, version: 1, newestVersion: 1 } },
    })
    await here('Preview of')
    await type('Name of the layout', 'For the cluster')
    await submit()
    await vi.waitFor(() => expect(router.currentRoute.value.params['layoutId']).toBe(ID))
    const [made] = bodiesOf<LayoutCreate>(sent, 'POST /api/groups/group/layouts')
    expect(made.name).toBe('For the cluster')
    expect(made.document.separator).toBe('spaces')
  })

  it('is not saved over what someone saved in between until one says so', async () => {
    const theirs = { ...stored, version: 4, newestVersion: 4 }
    const conflict = { code: 'CONFLICT', message: 'Ann saved version 4.', details: theirs }
    const { sent } = await open(`/${ID}`, 'modeller', {
      [`PUT /api/layouts/${ID}`]: [
        { status: 409, body: conflict },
        { body: { ...theirs, version: 5, newestVersion: 5 } },
      ],
    })
    await here('Preview of')
    await type('After the rows', 'mine')
    await submit()
    await here('Ann saved version 4.')
    await click('Keep mine')
    await submit()
    const saves = bodiesOf<LayoutSave>(sent, `PUT /api/layouts/${ID}`)
    expect(saves.map(({ version }) => version)).toEqual([3, 4])
    expect(saves[1]?.document.footer).toBe('mine')
  })

  it('asks before it is left unsaved', async () => {
    const { router } = await open(`/${ID}`)
    await here('Preview of')
    await type('After the rows', 'mine')
    const left = router.push('/groups/group/layouts')
    await here('Leave without saving?')
    await click('Stay')
    await left
    expect(router.currentRoute.value.params['layoutId']).toBe(ID)
    expect(field('After the rows').value).toBe('mine')
  })
})
