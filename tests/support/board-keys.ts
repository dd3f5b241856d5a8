import type { Page } from 'playwright-core'
import { atomTowards, type Direction } from '@/components/mapping/drawing/atom-towards'

const ARROWS: readonly Direction[] = ['ArrowLeft', 'ArrowRight', 'ArrowUp', 'ArrowDown']
/** No room has more tab stops. */
const MOST_STOPS = 150

/** Presses Tab until the focus is on what a selector names. */
export async function focusByTab(
  page: Page,
  selector: string,
  key: 'Tab' | 'Shift+Tab' = 'Tab',
): Promise<void> {
  for (let stop = 0; stop < MOST_STOPS; stop++) {
    if (await page.evaluate((asked) => document.activeElement?.matches(asked) ?? false, selector)) return
    await page.keyboard.press(key)
  }
  throw new Error(`No tab stop is ${selector}.`)
}

/** Goes from the atom that has the focus to another by the fewest arrows. */
export async function walkTo(page: Page, label: string): Promise<void> {
  const targets = await page.locator('[data-target]').evaluateAll((all) =>
    all.map((each) => ({
      x: Number(each.getAttribute('cx')),
      y: Number(each.getAttribute('cy')),
      name: each.getAttribute('aria-label') ?? '',
      focused: each === document.activeElement,
    })),
  )
  const start = targets.findIndex(({ focused }) => focused)
  const ways = new Map<number, Direction[]>([[start, []]])
  for (const [from, way] of ways) {
    if (targets[from].name.startsWith(`${label}, in `)) {
      for (const key of way) await page.keyboard.press(key)
      return
    }
    for (const direction of ARROWS) {
      const to = atomTowards(targets, from, direction)
      if (!ways.has(to)) ways.set(to, [...way, direction])
    }
  }
  throw new Error(`No arrows lead to ${label}.`)
}
