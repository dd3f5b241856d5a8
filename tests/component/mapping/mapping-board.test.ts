import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { flushPromises } from '@vue/test-utils'
import { layoutRepeatUnit, parseRepeatUnit } from '@shared/chemistry'
import type { Mapping } from '@shared/contracts/mapping'
import { h } from 'vue'
import { readMappingFile, writeMappingFile } from '@shared/documents'
import type { MappingDocument } from '@shared/mapping'
import * as saving from '@/components/figure/save-file'
import MappingBoard from '@/components/mapping/MappingBoard.vue'
import { HEXYL_ACRYLATE, THREE_TO_ONE } from '../../unit/shared/mapping/hexyl-acrylate'
import { click, control, fakeApi, mountAt, pageText, type SentRequest } from '../../support/mount'

const drawn = {
  unit: await parseRepeatUnit(HEXYL_ACRYLATE),
  layout: await layoutRepeatUnit(HEXYL_ACRYLATE),
}
const mappingOf = (document: MappingDocument): Mapping => ({
  id: 'm',
  polymerId: 'p',
  name: '3-to-1',
  document,
  revision: 1,
  version: 1,
  hasData: false,
  savedAt: '2026-01-05T10:00:00.000Z',
  savedBy: null,
  counts: { beads: 3, terms: 10, leftOut: 0, termsWithData: 0, termsUnfit: 0 },
})

let sent: SentRequest[]
const open = async (document: MappingDocument, canWrite = true) => {
  const mapping = mappingOf(document)
  sent = fakeApi({ 'PUT /api/mappings/m': { body: mapping } })
  const view = { render: () => h(MappingBoard, { drawn, mapping, canWrite }) }
  return mountAt('mapping', '/polymers/p/mappings/m/mapping', view)
}
const beadNames = (): (string | undefined)[] =>
  [...document.querySelectorAll('tbody tr:not(.editor, .loose)')].map((row) =>
    row.querySelector('td .base-bead-disc')?.textContent?.trim(),
  )
/** The saved document, once the pause after the last change is over. */
const savedDocument = async (): Promise<MappingDocument> => {
  await vi.advanceTimersByTimeAsync(1000)
  await flushPromises()
  return (sent.at(-1)?.body as { document: MappingDocument }).document
}

const target = (name: RegExp): SVGElement => {
  const found = [...document.querySelectorAll<SVGElement>('[data-target]')].find((each) =>
    name.test(each.getAttribute('aria-label') ?? ''),
  )
  if (!found) throw new Error(`No atom is called ${String(name)}`)
  return found
}
/** What follows from a stroke takes some frames. */
const frames = async (): Promise<void> => {
  await flushPromises()
  await vi.advanceTimersByTimeAsync(100)
}
const pointer = async (on: Element, type: string, init: PointerEventInit = {}): Promise<void> => {
  on.dispatchEvent(new PointerEvent(type, { button: 0, bubbles: true, cancelable: true, ...init }))
  await frames()
}
const press = async (name: RegExp, init: PointerEventInit = {}): Promise<void> => {
  // Its name changes with what holds it.
  const atom = target(name)
  await pointer(atom, 'pointerdown', init)
  await pointer(atom, 'pointerup', init)
}
const key = async (on: Element, name: string, shiftKey = false): Promise<void> => {
  on.dispatchEvent(new KeyboardEvent('keydown', { key: name, shiftKey, bubbles: true, cancelable: true }))
  await frames()
}
const drawing = (): SVGSVGElement => document.querySelector('.canvas > svg') as SVGSVGElement

beforeEach(() => {
  vi.useFakeTimers({
    toFake: ['setTimeout', 'clearTimeout', 'requestAnimationFrame', 'cancelAnimationFrame'],
  })
})
afterEach(() => {
  vi.useRealTimers()
  vi.unstubAllGlobals()
  document.body.innerHTML = ''
})

describe('suggestions on the board', () => {
  it('starts an empty mapping: a suggestion is shown with its reason, accepted, and taken back by Undo', async () => {
    await open({ version: 1, beads: [] })
    await click('start from a suggestion')
    expect(pageText()).toContain('Suggestion with 3 beads')
    expect(pageText()).toMatch(/Cut at .*, which can turn\. Kept whole: ester\./)
    expect(document.querySelectorAll('.halo--offered')).toHaveLength(3)
    expect(beadNames()).toEqual([])
    expect(document.activeElement).toBe(control('Accept'))
    await click('Accept')
    expect(document.querySelectorAll('.halo--offered')).toHaveLength(0)
    expect(beadNames()).toHaveLength(3)
    expect(pageText()).not.toContain('is in no bead')
    await click('Undo')
    expect(beadNames()).toEqual([])
  })

  it('goes on to the next number of beads, to a chosen one, and leaves what was painted alone', async () => {
    await open(THREE_TO_ONE)
    await click('Suggest')
    expect(pageText()).toContain('Accepting replaces what is painted')
    await click('Next')
    expect(pageText()).toContain('Suggestion with 4 beads')
    await click('1 bead')
    expect(pageText()).toContain('Suggestion with 1 bead')
    expect(document.querySelectorAll('.halo--offered')).toHaveLength(1)
    await click('Leave')
    expect(pageText()).not.toContain('Suggestion with')
    expect(beadNames()).toEqual(['B', 'E', 'H'])
  })

  it('leaves by Escape, and when painting goes on', async () => {
    await open(THREE_TO_ONE)
    await click('Suggest')
    control('Accept').dispatchEvent(new KeyboardEvent('keydown', { key: 'Escape', bubbles: true }))
    await flushPromises()
    expect(pageText()).not.toContain('Suggestion with')
    await click('Suggest')
    const atom = document.querySelector('[data-atom="0"]')
    atom?.dispatchEvent(new PointerEvent('pointerdown', { button: 0, bubbles: true, cancelable: true }))
    await flushPromises()
    expect(pageText()).not.toContain('Suggestion with')
  })

  it('gives accepted beads ids that never stood before', async () => {
    await open(THREE_TO_ONE)
    const ids: string[] = []
    for (let time = 0; time < 2; time++) {
      await click('Suggest')
      await click('Accept')
      ids.push(...(await savedDocument()).beads.map(({ id }) => id))
    }
    expect(new Set(ids).size).toBe(6)
  })

  it('is not offered to those who read', async () => {
    await open({ version: 1, beads: [] }, false)
    expect(() => control('Suggest')).toThrow()
    expect(() => control('start from a suggestion')).toThrow()
  })
})

describe('decisions about places on the board', () => {
  it('are stored with the mapping and taken back by Undo', async () => {
    await open(THREE_TO_ONE)
    await click('Split into two terms')
    expect(pageText()).toContain('B–B–E is split by place into two terms.')
    expect(pageText()).toContain('B–B–E (2)')
    expect((await savedDocument()).poolings).toEqual([
      { types: ['B', 'B', 'E'], choice: 'split', reason: '' },
    ])
    await click('Undo')
    expect(pageText()).not.toContain('B–B–E (2)')
    expect((await savedDocument()).poolings).toBeUndefined()
  })
})

describe('terms that share a bond or a bead', () => {
  const heads = (): string[] =>
    [...document.querySelectorAll('.group__title')].map((each) => (each.textContent ?? '').trim())
  const checkbox = (name: string): HTMLInputElement => {
    const label = [...document.querySelectorAll<HTMLLabelElement>('.group__use')].find(
      (each) => each.textContent?.trim() === name,
    )
    if (!label) throw new Error(`No term is called ${name}`)
    return label.querySelector('input') as HTMLInputElement
  }

  it('are proposed without redundancy; the proposal is taken in one step and counts in the coverage', async () => {
    await open(THREE_TO_ONE)
    expect(heads()).toContain('Dihedrals about B–B')
    expect(pageText()).toContain('Each unit has 9 degrees of freedom')
    await click(/^Take the proposal for Dihedrals about B–B/)
    expect(checkbox('B–B–B–B').checked).toBe(true)
    expect(checkbox('B–B–B–E').checked).toBe(false)
    expect(document.querySelector('[data-term="dihedral B–B–B–E"]')?.textContent).toContain('left out')
    expect(pageText()).toMatch(/none has data yet, \d left out/)
    expect(pageText()).toMatch(/Left out: .*B–B–B–E/)
    const { termChoices } = await savedDocument()
    expect(termChoices?.find(({ types }) => types.join() === 'B,B,B,E')).toMatchObject({ use: 'left out' })
    await click('Undo')
    expect(pageText()).not.toMatch(/\d left out/)
  })

  it('can be chosen one by one, each with a reason', async () => {
    await open(THREE_TO_ONE)
    checkbox('B–B–B–E').click()
    await flushPromises()
    expect(pageText()).toContain('none has data yet, 1 left out')
    const why = document.querySelector<HTMLInputElement>('[aria-label="Why B–B–B–E is left out"]')
    if (!why) throw new Error('The reason has a field.')
    why.value = 'turns with B–B–B–B'
    why.dispatchEvent(new Event('change', { bubbles: true }))
    await flushPromises()
    expect((await savedDocument()).termChoices).toEqual([
      { types: ['B', 'B', 'B', 'E'], placeKey: '', use: 'left out', reason: 'turns with B–B–B–B' },
    ])
    checkbox('B–B–B–E').click()
    await flushPromises()
    expect(pageText()).not.toMatch(/\d left out/)
  })

  it('are only shown to those who read', async () => {
    await open(THREE_TO_ONE, false)
    expect(checkbox('B–B–B–E').disabled).toBe(true)
    expect(() => control(/^Take the proposal/)).toThrow()
  })
})

describe('atoms shared between beads', () => {
  it('are made by Shift and a press, drawn in two tones, named in the legend, and taken back the same way', async () => {
    await open(THREE_TO_ONE)
    await press(/^C3, in bead E/, { shiftKey: true })
    expect(target(/^C3, in bead B and E$/)).toBeTruthy()
    expect(document.querySelectorAll('.sector')).toHaveLength(2)
    expect(pageText()).toContain('atom shared by beads')
    expect((await savedDocument()).beads.map(({ atoms }) => atoms.find(({ atom }) => atom === 2))).toEqual([
      { atom: 2, weight: 0.5, unit: 0 },
      { atom: 2, weight: 0.5, unit: 0 },
      undefined,
    ])
    await press(/^C3, in/, { shiftKey: true })
    expect(target(/^C3, in bead E$/)).toBeTruthy()
    expect(pageText()).not.toContain('atom shared by beads')
  })

  it('are made by keys, and by a button where there is no Shift', async () => {
    await open(THREE_TO_ONE)
    await key(target(/^C1, /), 'ArrowRight')
    const focused = document.activeElement
    expect(focused?.getAttribute('aria-label')).toBe('C2, in bead B')
    await key(target(/^C3, /), 'ArrowDown')
    target(/^C3, /).focus()
    await key(target(/^C3, /), ' ', true)
    expect(target(/^C3, in bead B and E$/)).toBeTruthy()
    await click('Share')
    expect(control('Share').getAttribute('aria-pressed')).toBe('true')
    await press(/^O1, /)
    expect(target(/^O1, in bead B and E$/)).toBeTruthy()
  })

  it('have weights in the bead editor, and two that share always hold one atom', async () => {
    await open(THREE_TO_ONE)
    await press(/^C3, in bead E/, { shiftKey: true })
    const share = document.querySelector<HTMLInputElement>('.shares input')
    if (!share) throw new Error('The share has a field.')
    const set = async (text: string): Promise<void> => {
      share.value = text
      share.dispatchEvent(new Event('change', { bubbles: true }))
      await flushPromises()
    }
    await set('0.25')
    expect(pageText()).toContain('C3 × 0.25')
    expect(pageText()).toContain('C3 × 0.75')
    await set('2')
    expect(document.querySelector('.shares [role=alert]')?.textContent).toContain('between 0 and 1')
    expect(pageText()).toContain('C3 × 0.25')
  })
})

describe('atoms across the border', () => {
  it('go to the bead in hand with an offset, and back when they are pressed again', async () => {
    await open(THREE_TO_ONE)
    await press(/^C1 of the next unit/)
    expect(target(/^C1 of the next unit, in bead B$/).getAttribute('aria-pressed')).toBe('true')
    expect(target(/^C1, in bead B of the unit before$/)).toBeTruthy()
    const [b] = (await savedDocument()).beads
    expect(b.atoms).toEqual([
      { atom: 1, weight: 1, unit: 0 },
      { atom: 0, weight: 1, unit: 1 },
    ])
    await press(/^C1 of the next unit/)
    expect(target(/^C1, in no bead$/)).toBeTruthy()
  })

  it('are reached by the arrows, and painted whole again in their own unit', async () => {
    await open(THREE_TO_ONE)
    target(/^C2, /).focus()
    await flushPromises()
    await key(target(/^C2, /), 'ArrowRight')
    expect(document.activeElement?.getAttribute('aria-label')).toMatch(/^C1 of the next unit/)
    await key(document.activeElement as Element, 'Enter')
    expect(target(/^C1, in bead B of the unit before$/)).toBeTruthy()
    await press(/^C1, /)
    expect(target(/^C1, in bead B$/)).toBeTruthy()
  })
})

describe('the drawing', () => {
  /** The window that the test DOM does not have. */
  const box = (): void => {
    const [x, y, width, height] = (drawing().getAttribute('viewBox') ?? '').split(' ').map(Number)
    drawing().getBoundingClientRect = () => new DOMRect(x, y, width, height)
  }
  const viewBox = (): number[] => (drawing().getAttribute('viewBox') ?? '').split(' ').map(Number)

  it('gives the atoms inside a loop to the bead in hand, as one step', async () => {
    await open({ version: 1, beads: [] })
    box()
    const [first, second] = [target(/^C1, /), target(/^C2, /)]
    const at = (each: SVGElement) => ({
      x: Number(each.getAttribute('cx')),
      y: Number(each.getAttribute('cy')),
    })
    const [left, right] = [at(first).x - 15, at(second).x + 15]
    const [top, bottom] = [Math.min(at(first).y, at(second).y) - 15, Math.max(at(first).y, at(second).y) + 15]
    await pointer(drawing(), 'pointerdown', { clientX: left, clientY: top })
    for (const [x, y] of [
      [right, top],
      [right, bottom],
      [left, bottom],
    ]) {
      await pointer(drawing(), 'pointermove', { clientX: x, clientY: y })
    }
    expect(document.querySelector('.canvas__lasso')).not.toBeNull()
    await pointer(drawing(), 'pointerup')
    expect(document.querySelector('.canvas__lasso')).toBeNull()
    expect(target(/^C1, in bead A$/)).toBeTruthy()
    expect(target(/^C2, in bead A$/)).toBeTruthy()
    expect(target(/^C3, in no bead$/)).toBeTruthy()
    await click('Undo')
    expect(target(/^C1, in no bead$/)).toBeTruthy()
  })

  it('is magnified by buttons, keys and the wheel, moved by Shift and arrows, and fitted again', async () => {
    await open(THREE_TO_ONE)
    box()
    const whole = viewBox()
    expect(control('Fit the drawing').hasAttribute('disabled')).toBe(true)
    await click('Zoom in')
    expect(viewBox()[2]).toBeCloseTo(whole[2] / 1.25, 6)
    const before = viewBox()
    await key(target(/^C1, /), 'ArrowRight', true)
    expect(viewBox()[0]).toBeCloseTo(before[0] + 0.1 * before[2], 6)
    await click('Fit the drawing')
    expect(viewBox()).toEqual(whole)
    const rolled = new WheelEvent('wheel', { deltaY: 100, cancelable: true })
    // The test DOM gives a wheel no modifier.
    drawing().dispatchEvent(Object.defineProperty(rolled, 'ctrlKey', { value: true }))
    await flushPromises()
    expect(viewBox()[2]).toBeCloseTo(whole[2] * 1.25, 6)
  })

  it('is turned and mirrored, which the browser keeps for the polymer and the mapping does not', async () => {
    const { wrapper } = await open(THREE_TO_ONE)
    const places = (): number[] =>
      [target(/^C1, /), target(/^C2, /)].map((each) => Number(each.getAttribute('cx')))
    const [one, two] = places()
    await click('Mirror the drawing')
    const [mirroredOne, mirroredTwo] = places()
    expect(mirroredTwo - mirroredOne).toBeCloseTo(one - two, 6)
    await click('Turn by 30 degrees')
    expect(JSON.parse(localStorage.getItem('beadwright.drawing.p') ?? '')).toEqual({
      degrees: 30,
      mirrored: true,
    })
    await click('Level')
    expect(places()).toEqual([one, two])
    expect(sent).toEqual([])
    wrapper.unmount()
  })
})

describe('how far the mapping goes', () => {
  it('is said in numbers, the gain as an estimate with its assumptions', async () => {
    await open(THREE_TO_ONE)
    const line = document.querySelector('[aria-label="How far the mapping goes"]')
    const said = [...(line?.querySelectorAll('button') ?? [])].map((each) => each.textContent?.trim())
    // 9 C, 16 H and 2 O make 27 atoms: 9 a bead, and (27/3)² × 5 = 405 times less work.
    expect(said).toEqual([
      '3 beads a unit',
      '9.0 atoms a bead',
      '9 of 81 degrees of freedom kept',
      'about 410 times less work',
    ])
    const explained = document.getElementById(
      line?.querySelectorAll('button')[3].getAttribute('aria-describedby') ?? '',
    )
    expect(explained?.textContent).toMatch(/An estimate, not measured: .*time step is taken as 5 times/)
  })
})

describe('the mapping as a file', () => {
  const choose = async (text: string): Promise<void> => {
    const input = document.querySelector<HTMLInputElement>('input[type=file]')
    if (!input) throw new Error('A file can be chosen.')
    const file = new File([text], 'other.json', { type: 'application/json' })
    Object.defineProperty(input, 'files', { value: [file], configurable: true })
    input.dispatchEvent(new Event('change', { bubbles: true }))
    await vi.waitFor(() => expect(document.querySelector('.files')?.textContent).toMatch(/Undo|Nothing/))
  }

  it('is saved as JSON that reads back', async () => {
    const save = vi.spyOn(saving, 'saveFile').mockImplementation(() => undefined)
    await open(THREE_TO_ONE)
    await click('Save the mapping file')
    const [name, content] = save.mock.calls[0]
    expect(name).toMatch(/_3-to-1\.json$/)
    const reading = readMappingFile(await content.text())
    expect(reading.ok && reading.file.beads.map((bead) => bead.name)).toEqual(['B', 'E', 'H'])
    save.mockRestore()
  })

  it('is taken over in one step that Undo takes back', async () => {
    await open({ version: 1, beads: [] })
    await choose(writeMappingFile(drawn.unit, THREE_TO_ONE, 'other'))
    await vi.waitFor(() => expect(beadNames()).toEqual(['B', 'E', 'H']))
    expect(pageText()).toContain('other.json is on the board')
    await click('Undo')
    expect(beadNames()).toEqual([])
  })

  it('is refused with what is wrong and where, and nothing changes', async () => {
    await open(THREE_TO_ONE)
    const file = JSON.parse(writeMappingFile(drawn.unit, THREE_TO_ONE, 'other')) as {
      beads: { name: string }[]
    }
    file.beads[1].name = 'much too long'
    await choose(JSON.stringify(file))
    expect(pageText()).toContain('The mapping file could not be taken over')
    expect(document.querySelector('.files [role=alert]')?.textContent).toContain('beads[1].name')
    expect(beadNames()).toEqual(['B', 'E', 'H'])
  })

  it('is saved by those who read, too, but not opened', async () => {
    await open(THREE_TO_ONE, false)
    expect(control('Save the mapping file')).toBeTruthy()
    expect(control('Export figure')).toBeTruthy()
    expect(() => control('Open a mapping file')).toThrow()
  })
})
