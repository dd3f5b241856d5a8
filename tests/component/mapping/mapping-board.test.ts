import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { flushPromises } from '@vue/test-utils'
import { layoutRepeatUnit, parseRepeatUnit } from '@shared/chemistry'
import type { Mapping } from '@shared/contracts/mapping'
import { h } from 'vue'
import type { MappingDocument } from '@shared/mapping'
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
  savedAt: '2026-01-05T10:00:00.000Z',
  savedBy: null,
  counts: { beads: 3, terms: 10, termsWithData: 0 },
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

beforeEach(() => {
  vi.useFakeTimers({ toFake: ['setTimeout', 'clearTimeout'] })
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
