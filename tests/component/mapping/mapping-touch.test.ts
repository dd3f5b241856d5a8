import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { flushPromises } from '@vue/test-utils'
import { h } from 'vue'
import { layoutRepeatUnit, parseRepeatUnit } from '@shared/chemistry'
import { boardLayout } from '@shared/mapping-drawing'
import MappingCanvas from '@/components/mapping/MappingCanvas.vue'
import { HEXYL_ACRYLATE, THREE_TO_ONE } from '../../unit/shared/mapping/hexyl-acrylate'
import { mountAt } from '../../support/mount'

const unit = await parseRepeatUnit(HEXYL_ACRYLATE)
const board = boardLayout(unit, await layoutRepeatUnit(HEXYL_ACRYLATE))
let said: (readonly unknown[])[]

const open = async (readonly = false): Promise<void> => {
  said = []
  const says = Object.fromEntries(
    ['begin', 'over', 'end', 'drop', 'gather'].map((event) => [
      `on${event[0].toUpperCase()}${event.slice(1)}`,
      (...given: unknown[]) => said.push([event, ...given]),
    ]),
  )
  const render = () =>
    h(MappingCanvas, {
      unit,
      board,
      document: THREE_TO_ONE,
      offered: null,
      selected: THREE_TO_ONE.beads[0],
      loose: null,
      painting: false,
      sharing: false,
      readonly,
      ...says,
    })
  await mountAt('mapping', '/polymers/p/mappings/m/mapping', { render })
  // The test DOM lays out nothing: the window is taken to be the drawing, px for px.
  const [x, y, width, height] = viewBox()
  drawing().getBoundingClientRect = () => new DOMRect(x, y, width, height)
}
const drawing = (): SVGSVGElement => document.querySelector('.canvas > svg') as SVGSVGElement
const viewBox = (): number[] => (drawing().getAttribute('viewBox') ?? '').split(' ').map(Number)
const finger = async (type: string, pointerId: number, x: number, y: number, on?: Element) => {
  const init = { pointerId, pointerType: 'touch', button: 0, clientX: x, clientY: y }
  const target = on ?? drawing()
  target.dispatchEvent(new PointerEvent(type, { ...init, bubbles: true, cancelable: true }))
  await flushPromises()
}
const disc = (atom: number): Element => document.querySelector(`[data-atom="${atom}"]`) as Element

beforeEach(() => vi.stubGlobal('matchMedia', () => ({ matches: false, addEventListener: () => undefined })))
afterEach(() => {
  vi.unstubAllGlobals()
  document.body.innerHTML = ''
})

describe('fingers on the drawing', () => {
  it('paint, one alone, every atom on their way however quick they are', async () => {
    await open()
    const [from, to] = [board.positions[0], board.positions[1]]
    await finger('pointerdown', 1, from.x, from.y, disc(0))
    await finger('pointermove', 1, to.x, to.y)
    await finger('pointerup', 1, to.x, to.y)
    expect(said[0]).toEqual(['begin', 0])
    expect(said).toContainEqual(['over', 1])
    expect(said.at(-1)).toEqual(['end'])
  })

  it('magnify, two of them, about the place between them, and drop what the first one began to paint', async () => {
    await open()
    const [x, y, width, height] = viewBox()
    const [middle, level] = [x + width / 4, y + height / 2]
    await finger('pointerdown', 1, middle - 50, level, disc(0))
    await finger('pointerdown', 2, middle + 50, level)
    expect(said).toEqual([['begin', 0], ['drop']])
    await finger('pointermove', 1, middle - 100, level)
    await finger('pointermove', 2, middle + 100, level)
    const [left, top, wide, high] = viewBox()
    expect(wide).toBeCloseTo(width / 2, 6)
    expect(high).toBeCloseTo(height / 2, 6)
    // The place between the fingers is where it was.
    expect((middle - left) / wide).toBeCloseTo(1 / 4, 6)
    expect((level - top) / high).toBeCloseTo(1 / 2, 6)
    await finger('pointerup', 2, middle + 100, level)
    await finger('pointermove', 1, board.positions[1].x, board.positions[1].y)
    await finger('pointerup', 1, middle, level)
    expect(said).toHaveLength(2)
  })

  it('pull, two of them, and paint again once both were lifted', async () => {
    await open()
    const [x, y, width] = viewBox()
    await finger('pointerdown', 1, x + 10, y + 10)
    await finger('pointerdown', 2, x + 110, y + 10)
    for (const id of [1, 2]) await finger('pointermove', id, x + 100 * id - 40, y + 40)
    const [left, top, wide] = viewBox()
    expect(wide).toBeCloseTo(width, 6)
    expect([left, top].map((each, axis) => each - [x, y][axis])).toEqual([
      expect.closeTo(-50, 6) as number,
      expect.closeTo(-30, 6) as number,
    ])
    for (const id of [1, 2]) await finger('pointerup', id, x, y)
    await finger('pointerdown', 3, 0, 0, disc(2))
    await finger('pointerup', 3, 0, 0)
    expect(said).toEqual([['begin', 2], ['end']])
  })

  it('leave a drawing that is only looked at to the page', async () => {
    await open(true)
    const before = viewBox()
    await finger('pointerdown', 1, 0, 0, disc(0))
    await finger('pointermove', 1, 40, 40)
    await finger('pointerup', 1, 40, 40)
    expect(viewBox()).toEqual(before)
    expect(said).toEqual([])
  })
})
