import AxeBuilder from '@axe-core/playwright'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { launchBrowser, openPage, type OpenedPage } from '../support/browser'

let browser: Browser

beforeAll(async () => {
  browser = await launchBrowser()
})

afterAll(() => browser.close())

async function openDocs(width: number): Promise<OpenedPage> {
  const opened = await openPage(browser, { width })
  // Swagger UI is a megabyte and a half of script.
  opened.page.setDefaultTimeout(40_000)
  await opened.page.goto('/api/docs')
  return opened
}

const openResource = (page: Page, name: string): Promise<void> =>
  page.locator(`.opblock-tag[data-tag="${name}"] button`).click()

describe('the page of the API', () => {
  it.each([1280, 390])(
    'shows resources and their operations at %d px, with a clean console',
    async (width) => {
      const { page, complaints, picture, close } = await openDocs(width)
      await openResource(page, 'terms')
      await page.getByText('/api/terms/{termId}/distributions').waitFor()
      expect(await page.locator('.opblock-tag').count()).toBeGreaterThan(10)
      await picture('api-docs')
      const overflow = await page.evaluate(
        () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
      )
      expect(overflow).toBeLessThanOrEqual(0)
      const own = new AxeBuilder({ page }).include(['header']).withTags(['wcag2a', 'wcag2aa'])
      expect((await own.analyze()).violations.map(({ id }) => id)).toEqual([])
      expect(complaints).toEqual([])
      await close()
    },
  )

  it('opens an operation with its example and its errors, and tries one with a key', async () => {
    const { page, complaints, picture, close } = await openDocs(1280)
    await openResource(page, 'terms')
    const upload = page.locator('.opblock', { hasText: 'Bring in a file as the distribution' })
    await upload.locator('.opblock-summary-control').click()
    await upload.getByText('TERM_GONE').first().waitFor()
    await upload.getByText('alreadyDivided').first().waitFor({ state: 'attached' })
    await picture('api-docs-operation')
    await upload.locator('.opblock-summary-control').click()
    await page.getByRole('button', { name: 'Authorize' }).first().click()
    const bearer = page.locator('.auth-container', { hasText: 'bearer' })
    await bearer.getByRole('textbox').fill('bw_wrong')
    await bearer.getByRole('button', { name: /apply/i }).click()
    await bearer.getByRole('button', { name: 'Close' }).click()
    await openResource(page, 'key')
    const own = page.locator('.opblock', { hasText: 'the key it came with' })
    await own.locator('.opblock-summary-control').click()
    await own.getByRole('button', { name: 'Try it out' }).click()
    await own.getByRole('button', { name: 'Execute' }).click()
    await own.getByText('This key is not known here.').first().waitFor()
    // Chromium writes down the refusal that was asked for; nothing else stands there.
    expect(complaints).toEqual([expect.stringContaining('401')])
    await close()
  })
})
