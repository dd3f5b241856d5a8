import AxeBuilder from '@axe-core/playwright'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { launchBrowser, openPage } from '../support/browser'

const REASON = 'Not settled yet.'

let browser: Browser

beforeAll(async () => {
  browser = await launchBrowser()
})

afterAll(() => browser.close())

async function signIn(page: Page, role: RegExp): Promise<void> {
  await page.goto('/sign-in')
  await page.getByRole('button', { name: role }).click()
  await page.getByRole('heading', { name: /^Adhesives/ }).waitFor()
}

async function accessible(page: Page): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page }).analyze()
  return violations.map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`)
}

describe('a hand-over', () => {
  it('goes from a draft over review to a release, with a modeller, a reviewer and an owner', async () => {
    const modeller = await openPage(browser)
    await signIn(modeller.page, /modeller/)
    const { page } = modeller
    await page
      .getByRole('link', { name: /hexyl acrylate/ })
      .first()
      .click()
    await page.getByRole('link', { name: 'Hand-overs' }).click()
    await page.getByRole('button', { name: 'New hand-over' }).click()
    await page.getByLabel('Title').fill('Set of the browser test')
    await page.getByRole('button', { name: 'Start' }).click()
    await page.getByRole('heading', { name: 'Set of the browser test' }).waitFor()
    expect(await page.getByRole('button', { name: 'Ask for review' }).isDisabled()).toBe(true)

    // What has no table yet is left out, each with its reason.
    for (const name of ['E–H', 'B–E–H', 'B–B–B–E', 'E–B–B–E', 'B–B–E–H']) {
      await page.getByRole('button', { name: `Leave out, with reason: ${name}`, exact: true }).click()
      await page.getByLabel('Reason, for the record').fill(REASON)
      await page.getByRole('button', { name: 'Leave out', exact: true }).click()
      await page.getByRole('button', { name: `Take in: ${name}`, exact: true }).waitFor()
    }
    expect(await accessible(page)).toEqual([])
    await modeller.picture('hand-over-draft')
    await page.getByRole('button', { name: 'Ask for review' }).click()
    await page.getByText('in review, with').first().waitFor()
    const address = new URL(page.url()).pathname

    const reviewer = await openPage(browser, { width: 390 })
    await signIn(reviewer.page, /reviewer/)
    await reviewer.page.goto(address)
    await reviewer.page.getByRole('button', { name: 'Accept B–E', exact: true }).click()
    await reviewer.page.getByText('1 of 5 terms accepted').waitFor()
    expect(await accessible(reviewer.page)).toEqual([])
    await reviewer.picture('hand-over-review')
    await reviewer.page.getByRole('button', { name: 'Sign off' }).click()
    await reviewer.page.getByText('signed off by').first().waitFor()

    const owner = await openPage(browser)
    await signIn(owner.page, /owner/)
    await owner.page.goto(address)
    await owner.page.getByRole('button', { name: 'Release' }).click()
    await owner.page.getByRole('heading', { name: /^Hand-over \d+$/ }).waitFor({ timeout: 60_000 })
    await owner.page.getByRole('heading', { name: /^Changed since hand-over/ }).waitFor()
    const download = owner.page.waitForEvent('download')
    await owner.page.getByRole('link', { name: 'Download all' }).click()
    expect((await download).suggestedFilename()).toMatch(/_400K_hand-over-\d+\.zip$/)
    expect(await accessible(owner.page)).toEqual([])
    await owner.picture('hand-over-released')
    for (const each of [modeller, reviewer, owner]) {
      expect(each.complaints).toEqual([])
      await each.close()
    }
  })
})
