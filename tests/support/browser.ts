import { mkdirSync } from 'node:fs'
import { join } from 'node:path'
import { chromium, type Browser, type Page } from 'playwright-core'
import { inject } from 'vitest'
import { findChromium } from '../../server/start/chromium.mjs'
import { outputFolder } from './output-folder'

const FLAGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-dev-shm-usage',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
]
const HEIGHTS: Readonly<Record<number, number>> = { 390: 844, 1280: 800 }

export interface PageOptions {
  /** In CSS pixels; 1280 and 390 are the widths that every room is looked at. */
  readonly width?: number
  readonly theme?: 'light' | 'dark'
  /** Where relative addresses lead; the server with the demonstration unless told otherwise. */
  readonly baseUrl?: string
}

export interface OpenedPage {
  readonly page: Page
  /** What the page complained about: console errors, uncaught exceptions, requests to other hosts. */
  readonly complaints: readonly string[]
  /** Takes a picture of the whole page into the output folder and returns its path. */
  readonly picture: (name: string) => Promise<string>
  readonly close: () => Promise<void>
}

/** Starts Chromium; close it when the file is done. */
export function launchBrowser(): Promise<Browser> {
  const executablePath = findChromium()
  if (!executablePath) throw new Error('Chromium is missing: npm test installs it.')
  return chromium.launch({ executablePath, args: FLAGS })
}

/** Opens a page in a context of its own, as a person with no past on this site. */
export async function openPage(
  browser: Browser,
  { width = 1280, theme = 'light', baseUrl: baseURL = inject('baseUrl') }: PageOptions = {},
): Promise<OpenedPage> {
  const context = await browser.newContext({
    baseURL,
    viewport: { width, height: HEIGHTS[width] ?? 800 },
    colorScheme: theme,
    reducedMotion: 'reduce',
    acceptDownloads: true,
  })
  const page = await context.newPage()
  page.setDefaultTimeout(10_000)
  return {
    page,
    complaints: listen(page, new URL(baseURL).host),
    picture: async (name) => {
      mkdirSync(outputFolder, { recursive: true })
      const path = join(outputFolder, `${name}-${width}-${theme}.png`)
      await page.screenshot({ path, fullPage: true, animations: 'disabled' })
      return path
    },
    close: () => context.close(),
  }
}

function listen(page: Page, host: string): readonly string[] {
  const complaints: string[] = []
  page.on('console', (message) => {
    // 404 is how the API says that a record is not there yet; Chromium writes that down as an error.
    const notThere = /^Failed to load resource.* 404 /.test(message.text())
    if (message.type() === 'error' && !notThere) complaints.push(`console: ${message.text()}`)
  })
  page.on('pageerror', (error) => complaints.push(`exception: ${error.message}`))
  page.on('request', (request) => {
    const url = new URL(request.url())
    if (/^(https?|wss?):$/.test(url.protocol) && url.host !== host)
      complaints.push(`foreign request: ${url.href}`)
  })
  return complaints
}
