import AxeBuilder from '@axe-core/playwright'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Mapping } from '@shared/contracts/mapping'
import type { Polymer, StatePoint } from '@shared/contracts/polymer'
import type { HandOver } from '@shared/contracts/hand-over-desk'
import type { Session } from '@shared/contracts/session'
import { launchBrowser, openPage } from '../support/browser'

const VIEWS = [
  { width: 1280, theme: 'light' },
  { width: 1280, theme: 'dark' },
  { width: 390, theme: 'light' },
  { width: 390, theme: 'dark' },
] as const

/** Room, address, and what stands in it once it is there. */
const ROOMS = [
  ['front desk', '/', 'poly('],
  ['polymer', '/polymers/P', 'State points'],
  ['comparison', '/polymers/P/comparison', 'Correlation left behind'],
  ['hand-overs', '/polymers/P/hand-overs', 'New hand-over'],
  ['data sheet', '/hand-overs/H/sheet', 'How far these tables carry'],
  ['account', '/account', 'API keys'],
  ['new polymer', '/polymers/new', 'How a repeat unit is written'],
  ['mapping', '/polymers/P/mappings/M/mapping', 'Terms that follow'],
  ['mapping print', '/polymers/P/mappings/M/mapping/print', 'How far it goes'],
  ['intake', '/polymers/P/mappings/M/intake', 'Choose files'],
  ['bench', '/polymers/P/mappings/M/bench', 'Effective dimension'],
  ['correlation', '/polymers/P/mappings/M/correlation', 'Independent samples'],
  ['tables', '/polymers/P/mappings/M/tables', 'First lines of'],
  ['members', '/groups/G/members', ', you'],
  ['defaults', '/groups/G/defaults', 'Dihedral flat below'],
  ['history', '/groups/G/history', 'Export as CSV'],
  ['tray', '/tray', 'There is no tray here'],
  ['forgotten password', '/forgot', 'Send the link'],
  ['received', '/received/nothing', 'There is no such link'],
  ['layouts', '/groups/G/layouts', 'Four columns'],
  ['layout', '/groups/G/layouts/new', 'Preview of'],
] as const

let browser: Browser

beforeAll(async () => {
  browser = await launchBrowser()
})

afterAll(() => browser.close())

describe('the sign-in page', () => {
  it('loads less than 200 kB of compressed JavaScript', async () => {
    const { page, close } = await openPage(browser)
    const session = await page.context().newCDPSession(page)
    await session.send('Network.enable')
    const scripts = new Map<string, number>()
    session.on('Network.responseReceived', ({ requestId, type }) => {
      if (type === 'Script') scripts.set(requestId, 0)
    })
    session.on('Network.loadingFinished', ({ requestId, encodedDataLength }) => {
      if (scripts.has(requestId)) scripts.set(requestId, encodedDataLength)
    })
    await page.goto('/sign-in', { waitUntil: 'networkidle' })
    const bytes = [...scripts.values()].reduce((sum, each) => sum + each, 0)
    expect(bytes).toBeGreaterThan(20_000)
    expect(bytes).toBeLessThan(200_000)
    await close()
  })
})

describe.each(VIEWS)('the rooms in $theme at $width px', ({ width, theme }) => {
  it('are accessible, fit the width, say nothing on the console and ask no other host', async () => {
    const { page, complaints, picture, close } = await openPage(browser, { width, theme })
    await page.goto('/sign-in')
    await page.getByRole('heading', { name: 'Sign in' }).waitFor()
    const findings = await examine(page, 'sign-in')
    await picture('room-sign-in')
    await page.getByRole('button', { name: /modeller/ }).click()
    await page.getByRole('heading', { name: /^Adhesives/ }).waitFor()
    const { group, polymer, mapping, statePoint, handOver } = await demoAddresses(page)
    for (const [room, path, words] of ROOMS) {
      const address = path
        .replace('G', group)
        .replace('P', polymer)
        .replace('M', mapping)
        .replace('H', handOver)
      await page.goto(path.includes('M') ? `${address}?statePoint=${statePoint}` : address)
      await page.getByText(words).first().waitFor()
      findings.push(...(await examine(page, room)))
      await picture(`room-${room.replace(' ', '-')}`)
    }
    expect(findings).toEqual([])
    expect(complaints).toEqual([])
    await close()
  })
})

/** What is wrong with the page as it stands: accessibility rules broken, or a page wider than the window. */
async function examine(page: Page, room: string): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa'])
    .analyze()
  const findings = violations.flatMap(({ id, nodes }) =>
    nodes.map(({ target }) => `${room}: ${id} at ${target.join(' ')}`),
  )
  const overflow = await page.evaluate(
    () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
  )
  return overflow > 0 ? [...findings, `${room}: ${overflow} px wider than the window`] : findings
}

async function demoAddresses(page: Page) {
  const get = async <Answer>(path: string) => (await (await page.request.get(path)).json()) as Answer
  const { user } = await get<Session>('/api/session')
  const group = user?.memberships[0].groupId ?? ''
  const { polymers } = await get<{ polymers: Polymer[] }>(`/api/groups/${group}/polymers`)
  const polymer = polymers[0].id
  const { mappings } = await get<{ mappings: Mapping[] }>(`/api/polymers/${polymer}/mappings`)
  const { statePoints } = await get<{ statePoints: StatePoint[] }>(`/api/polymers/${polymer}/state-points`)
  const mapping = mappings.find(({ name }) => name === '3-to-1')?.id ?? ''
  const statePoint = statePoints.find(({ temperature }) => temperature === 400)?.id ?? ''
  const { handOvers } = await get<{ handOvers: HandOver[] }>(`/api/polymers/${polymer}/hand-overs`)
  const handOver = handOvers.find(({ standing }) => standing === 'released')?.id ?? ''
  return { group, polymer, mapping, statePoint, handOver }
}
