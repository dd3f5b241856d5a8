import { readFileSync } from 'node:fs'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Mapping } from '@shared/contracts/mapping'
import type { Polymer, StatePoint } from '@shared/contracts/polymer'
import type { Session } from '@shared/contracts/session'
import { type OpenedPage, launchBrowser, openPage } from '../support/browser'

const NAME = 'Records in radians'

let browser: Browser
let opened: OpenedPage
let page: Page

beforeAll(async () => {
  browser = await launchBrowser()
  opened = await openPage(browser)
  ;({ page } = opened)
  await page.goto('/sign-in')
  await page.getByRole('button', { name: /modeller/ }).click()
  await page.getByRole('heading', { name: /^Adhesives/ }).waitFor()
})

afterAll(() => browser.close())

const choose = async (box: string, option: string): Promise<void> => {
  await page.getByRole('combobox', { name: box, exact: true }).press('Enter')
  await page.getByRole('option').filter({ hasText: option }).first().click()
}

describe('a layout made in the browser', () => {
  it('is tried on a real table, saved, and writes the table that is downloaded', async () => {
    const groupId = await demoGroup(page)
    await page.goto(`/groups/${groupId}/layouts`)
    await page.getByRole('button', { name: 'Begin a layout with Three columns', exact: true }).click()
    await page.getByText('Preview of').waitFor()
    await page.getByLabel('Name of the layout').fill(NAME)
    await page.getByLabel('Before the rows').fill('table {{term}} of {{rows}} rows, {{kind}}')
    await page.getByLabel('After the rows').fill('end')
    await choose('Angles counted as', 'supplement, straight at 0')
    await choose('Angles: coordinate in', 'radian')
    await choose('Columns parted by', 'semicolons')
    await choose('Table the layout is tried on', 'angle B–B–B')
    const preview = page.getByRole('region', { name: 'Preview of the file' })
    await preview.getByText('table B–B–B of 1000 rows, angle').waitFor()
    await page.getByText('The force is in kJ/mol/deg').waitFor()
    const shown = (await preview.innerText()).split('\n')
    await page.getByRole('button', { name: 'Save layout' }).click()
    await page.getByRole('button', { name: 'Save as version 2' }).waitFor()

    await page.goto(await tablesAddress(page, groupId))
    await page.getByText('First lines of').waitFor()
    await choose('Layout of the files', NAME)
    await page.getByText('The layout has units of its own.').waitFor()
    const link = page.getByRole('link', { name: /^Download angle_B-B-B_/ })
    await page.getByRole('button', { name: /^First lines of angle_B-B-B_/ }).click()
    await page.getByText('table B–B–B of 1000 rows, angle').waitFor()
    const [download] = await Promise.all([page.waitForEvent('download'), link.click()])
    const lines = readFileSync(await download.path(), 'utf8').split('\n')
    expect(lines.slice(0, 60)).toEqual(shown.slice(0, 60))
    expect(lines.slice(-2)).toEqual(['end', ''])
    expect(lines[1]?.split(';').map(Number)[0]).toBe(0)
    expect(lines.at(-3)?.split(';').map(Number)[0]).toBeCloseTo(Math.PI, 6)
    expect(opened.complaints).toEqual([])
  })
})

async function demoGroup(at: Page): Promise<string> {
  const { user } = (await (await at.request.get('/api/session')).json()) as Session
  return user?.memberships[0]?.groupId ?? ''
}

async function tablesAddress(at: Page, groupId: string): Promise<string> {
  const get = async <Answer>(path: string) => (await (await at.request.get(path)).json()) as Answer
  const { polymers } = await get<{ polymers: Polymer[] }>(`/api/groups/${groupId}/polymers`)
  const polymer = polymers[0]?.id ?? ''
  const { mappings } = await get<{ mappings: Mapping[] }>(`/api/polymers/${polymer}/mappings`)
  const { statePoints } = await get<{ statePoints: StatePoint[] }>(`/api/polymers/${polymer}/state-points`)
  const mapping = mappings.find(({ name }) => name === '3-to-1')?.id ?? ''
  const point = statePoints.find(({ temperature }) => temperature === 400)?.id ?? ''
  return `/polymers/${polymer}/mappings/${mapping}/tables?statePoint=${point}`
}
