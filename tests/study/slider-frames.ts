import type { Page } from 'playwright-core'
import { launchBrowser, openPage } from '../support/browser'

/** Steps that are counted; the first ones warm up. */
const STEPS = 120
const WARM_UP = 10
/** Pixels of a move, and moves until the slider turns back. */
const STRIDE = 3
const TURN = 30

/** One step of the slider as the page saw it. */
interface Step {
  /** Milliseconds from the input to the changed curve, and to the end of the frame that painted it. */
  readonly drawn: number
  readonly painted: number
  /** Frames between the one the input came in and the one that shows the curve: 1 is the very next. */
  readonly frames: number
}

declare global {
  interface Window {
    sliderSteps: Step[]
  }
}

/**
 * Prints how long the curve of the bench takes to follow the smoothing slider, on the finest histogram of the demonstration.
 * `npm run frames:slider -- URL`, with the address of a Beadwright that runs with the demonstration.
 */
async function study(baseUrl: string): Promise<void> {
  const browser = await launchBrowser()
  try {
    const { page } = await openPage(browser, { baseUrl })
    await page.goto('/sign-in')
    await page.getByRole('button', { name: /modeller/ }).click()
    await page
      .getByRole('link', { name: /acrylate/ })
      .first()
      .click()
    await page.getByRole('link', { name: 'Bench of 3-to-1' }).click()
    await page.locator('[data-term]', { has: page.getByText('E–H', { exact: true }) }).click()
    const slider = page.getByRole('slider', { name: /Smoothing/ })
    await slider.waitFor()
    await page.locator('[data-curve="potential"]').waitFor({ state: 'attached' })
    await record(page)
    const box = await slider.boundingBox()
    if (box === null) throw new Error('The slider is not drawn.')
    // To and fro in even strides, so that every move is an input.
    const at = (step: number): number => box.x + box.width / 2 + STRIDE * Math.abs((step % (2 * TURN)) - TURN)
    await page.mouse.move(at(0), box.y + box.height / 2)
    await page.mouse.down()
    for (let step = 1; step <= WARM_UP + STEPS; step++) {
      const before = await page.evaluate(() => window.sliderSteps.length)
      await page.mouse.move(at(step), box.y + box.height / 2)
      await page.waitForFunction((count) => window.sliderSteps.length > count, before)
    }
    await page.mouse.up()
    print((await page.evaluate(() => window.sliderSteps)).slice(WARM_UP))
  } finally {
    await browser.close()
  }
}

/** Notes each input and the frame in which the potential has changed. */
async function record(page: Page): Promise<void> {
  await page.evaluate(() => {
    window.sliderSteps = []
    const frames = {
      shown: 0,
      count() {
        this.shown += 1
        requestAnimationFrame(() => this.count())
      },
    }
    frames.count()
    let open: { at: number; frame: number } | null = null
    document.addEventListener(
      'input',
      () => (open = { at: performance.now(), frame: frames.shown + 1 }),
      true,
    )
    const potential = document.querySelector('[data-curve="potential"]')
    if (potential === null) throw new Error('There is no potential.')
    new MutationObserver(() => {
      if (open === null) return
      const step = open
      open = null
      const drawn = performance.now() - step.at
      const over = new MessageChannel()
      over.port1.onmessage = () => {
        window.sliderSteps.push({
          drawn,
          painted: performance.now() - step.at,
          frames: frames.shown - step.frame,
        })
        over.port1.close()
      }
      // The callback runs at the start of the frame, the message after it was painted.
      requestAnimationFrame(() => over.port2.postMessage(null))
    }).observe(potential, { attributeFilter: ['d'] })
  })
}

function print(steps: readonly Step[]): void {
  const line = (of: keyof Step, digits: number): string => {
    const sorted = steps.map((step) => step[of]).sort((one, other) => one - other)
    const at = (share: number): string =>
      sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))].toFixed(digits)
    return `${of} median ${at(0.5)}, p95 ${at(0.95)}, max ${at(1)}`
  }
  const next = steps.filter(({ frames }) => frames <= 1).length
  process.stdout.write(
    `${steps.length} steps; ${line('drawn', 1)} ms; ${line('painted', 1)} ms; ${line('frames', 0)} frames; ` +
      `${((100 * next) / steps.length).toFixed(0)} % in the next frame\n`,
  )
}

await study(process.argv[2] ?? 'http://127.0.0.1:4310')
