import { enableAutoUnmount } from '@vue/test-utils'
import { afterEach, beforeAll, describe, expect, it, vi } from 'vitest'
import type { DataSheet } from '@shared/contracts/data-sheet'
import { makeDataSheet } from '@shared/data-sheet'
import DataSheetView from '@/views/DataSheetView.vue'
import { buildSheetSource } from '../../support/data-sheet-builder'
import { DOCUMENT, SMILES } from '../../support/job-builder'
import { fakeApi, freshStores, mountAt, pageText } from '../../support/mount'

enableAutoUnmount(afterEach)
afterEach(() => vi.unstubAllGlobals())

const ARCHIVE = 'ab'.repeat(32)
let sheet: DataSheet

beforeAll(async () => {
  sheet = makeDataSheet(await buildSheetSource({ smiles: SMILES, document: DOCUMENT }))
})

const openAsMember = (withdrawn: { reason: string } | null = null) => {
  fakeApi({
    'GET /api/hand-overs/h/files/data-sheet.json': { body: sheet },
    'GET /api/hand-overs/h/release': { body: { withdrawn, archive: { sha256: ARCHIVE } } },
  })
  return mountAt('data-sheet', '/hand-overs/h/sheet', DataSheetView)
}
const printRules = (): string =>
  [...document.head.querySelectorAll('style')].map((style) => style.textContent).join('\n')

describe('the page of a data sheet', () => {
  it('says what the frozen sheet says, with the checksum of the archive', async () => {
    const { wrapper } = await openAsMember()
    const text = pageText()
    for (const line of [...sheet.beforeYouRun, ...sheet.carry]) expect(text).toContain(line.text)
    for (const { path, sha256 } of sheet.tables) {
      expect(text).toContain(path)
      expect(text).toContain(sha256.slice(0, 8))
    }
    expect(text).toContain(ARCHIVE)
    expect(wrapper.findAll('figure svg')).toHaveLength(sheet.tables.length)
  })

  it('is printed on A4 with its number, INVENTED and the checksum at the foot, as long as it is open', async () => {
    const { wrapper } = await openAsMember()
    expect(printRules()).toContain('size: A4')
    expect(printRules()).toContain(`Hand-over 2, INVENTED DATA, archive sha-256 ${ARCHIVE.slice(0, 16)}`)
    wrapper.unmount()
    expect(printRules()).not.toContain('archive sha-256')
  })

  it('says above the sheet and at the foot that the hand-over was withdrawn', async () => {
    await openAsMember({ reason: 'A wrong unit.' })
    expect(pageText()).toContain('A wrong unit.')
    expect(printRules()).toContain('WITHDRAWN')
  })

  it('opens by a link, with the PDF of the link', async () => {
    fakeApi({
      'GET /api/received/t/file?path=data-sheet.json': { body: sheet },
      'GET /api/received/t': { body: { withdrawn: null } },
    })
    const { wrapper } = await mountAt('received-sheet', '/received/t/sheet', DataSheetView, freshStores(null))
    expect(pageText()).toContain('Hand-over 2')
    expect(wrapper.get('a[download]').attributes('href')).toBe('/api/received/t/file?path=data-sheet.pdf')
  })

  it('says so where there is none', async () => {
    fakeApi({})
    await mountAt('data-sheet', '/hand-overs/h/sheet', DataSheetView)
    expect(pageText()).toContain('There is no data sheet here')
  })
})
