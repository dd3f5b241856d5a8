import type { Page } from 'playwright-core'

interface Place {
  readonly x: number
  readonly y: number
}

/** px around atoms that a loop leaves. */
const ROOM = 12

/** Where atoms of the unit are on the screen, by their labels. */
export async function pathOf(page: Page, labels: readonly string[]): Promise<Place[]> {
  const places: Place[] = []
  for (const label of labels) {
    const box = await page.getByRole('button', { name: new RegExp(`^${label}, in `) }).boundingBox()
    if (box === null) throw new Error(`${label} is not drawn.`)
    places.push({ x: box.x + box.width / 2, y: box.y + box.height / 2 })
  }
  return places
}

/** Drags from the first place over the others. */
export async function paintAlong(page: Page, [first, ...others]: readonly Place[]): Promise<void> {
  await page.mouse.move(first.x, first.y)
  await page.mouse.down()
  for (const { x, y } of others) await page.mouse.move(x, y, { steps: 4 })
  await page.mouse.up()
}

/** Draws a loop around places, from a point of empty ground above or below them. */
export async function lassoAround(page: Page, places: readonly Place[]): Promise<void> {
  const [xs, ys] = [places.map(({ x }) => x), places.map(({ y }) => y)]
  const [left, right] = [Math.min(...xs) - ROOM, Math.max(...xs) + ROOM]
  const [top, bottom] = [Math.min(...ys) - ROOM, Math.max(...ys) + ROOM]
  for (let away = 0; away < 120; away += 8) {
    for (const [start, far] of [
      [top - away, bottom],
      [bottom + away, top],
    ]) {
      if (!(await page.evaluate(isGround, { x: left, y: start }))) continue
      await page.mouse.move(left, start)
      await page.mouse.down()
      for (const [x, y] of [
        [left, far],
        [right, far],
        [right, start],
      ]) {
        await page.mouse.move(x, y, { steps: 4 })
      }
      await page.mouse.up()
      return
    }
  }
  throw new Error('There is no empty ground beside the atoms.')
}

/** Runs in the page. */
const isGround = ({ x, y }: Place): boolean => {
  const element = document.elementFromPoint(x, y)
  return element?.closest('.canvas > svg') != null && element.closest('[data-target]') === null
}
