import AxeBuilder from '@axe-core/playwright'
import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import { launchBrowser, openPage } from '../support/browser'

let browser: Browser

beforeAll(async () => {
  browser = await launchBrowser()
})

afterAll(() => browser.close())

describe('a key made in the browser', () => {
  it.each([
    { width: 1280, theme: 'light' },
    { width: 390, theme: 'dark' },
  ] as const)('is shown once, works in a script, and stops when revoked ($width px)', async (view) => {
    const { page, complaints, picture, close } = await openPage(browser, view)
    const ask = async (key: string): Promise<number> => {
      const headers = { Authorization: `Bearer ${key}` }
      return (await fetch(`${inject('baseUrl')}/api/key`, { headers })).status
    }
    await page.goto('/sign-in?next=/account')
    await page.getByRole('button', { name: /modeller/ }).click()
    await page.getByRole('button', { name: 'New key' }).click()
    const name = `e2e ${view.width}`
    await page.getByLabel('Name', { exact: true }).last().fill(name)
    await page.getByRole('checkbox', { name: 'Write data' }).check()
    await picture('account-new-key')
    await page.getByRole('button', { name: 'Make key' }).click()
    const key = await page.getByLabel('The key', { exact: true }).inputValue()
    expect(await ask(key)).toBe(200)
    await page.getByRole('dialog').waitFor({ state: 'hidden' })
    await picture('account-key-shown')
    const { violations } = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa']).analyze()
    expect(violations.map(({ id }) => id)).toEqual([])
    await page.reload()
    await page.getByRole('button', { name: `Revoke ${name}` }).waitFor()
    expect(await page.content()).not.toContain(key)
    await picture('account-keys')
    await page.getByRole('button', { name: `Revoke ${name}` }).click()
    await page.getByRole('button', { name: 'Revoke key' }).click()
    await page.getByText(/revoked or out of date/).waitFor()
    expect(await ask(key)).toBe(401)
    expect(complaints).toEqual([])
    await close()
  })
})
