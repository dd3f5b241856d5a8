import { flushPromises, mount } from '@vue/test-utils'
import { afterEach, describe, expect, it } from 'vitest'
import { parseRepeatUnit } from '@shared/chemistry'
import { deriveTerms, type MappingDocument, placeFlags, setPooling, setTermUse } from '@shared/mapping'
import MappingTerms from '@/components/mapping/MappingTerms.vue'
import { term } from '../../unit/src/components/bench/bench-terms'
import { HEXYL_ACRYLATE, THREE_TO_ONE } from '../../unit/shared/mapping/hexyl-acrylate'

const unit = await parseRepeatUnit(HEXYL_ACRYLATE)
const terms = deriveTerms(unit, THREE_TO_ONE)
const words = (text: string): string => text.replace(/\s+/g, ' ').trim()

const list = (
  saved = [term('bond', 'BE'), term('angle', 'BBE', { standing: 'inverted' })],
  mapping: MappingDocument = THREE_TO_ONE,
  readonly = false,
) =>
  mount(MappingTerms, {
    props: {
      terms: deriveTerms(unit, mapping),
      document: mapping,
      saved,
      flags: placeFlags(unit, mapping),
      readonly,
    },
    attachTo: document.body,
  })
const row = (wrapper: ReturnType<typeof list>, key: string) =>
  wrapper.get<HTMLElement>(`[data-term="${key}"]`)
const nameIn = (wrapper: ReturnType<typeof list>, key: string): string =>
  words(row(wrapper, key).get('.term-row__name').text())
const pointedAt = (wrapper: ReturnType<typeof list>): (string | null)[] =>
  (wrapper.emitted('point') ?? []).map(([pointed]) => (pointed as { name: string } | null)?.name ?? null)

afterEach(() => {
  document.body.innerHTML = ''
})

describe('places that differ', () => {
  const button = (wrapper: ReturnType<typeof list>, text: string) => {
    const found = wrapper.findAll('button').find((each) => words(each.text()) === text)
    if (found === undefined) throw new Error(`No button says ${text}`)
    return found
  }
  const decisions = (wrapper: ReturnType<typeof list>) =>
    (wrapper.emitted('decide') ?? []).map(([flags, choice, reason]) => [
      (flags as { name: string }[]).map(({ name }) => name),
      choice,
      reason,
    ])

  it('can be split into terms, one sequence or all at once', async () => {
    const wrapper = list()
    await button(wrapper, 'Split into two terms').trigger('click')
    await button(wrapper, 'Split all three').trigger('click')
    expect(decisions(wrapper)).toEqual([
      [['B–B–E'], 'split', ''],
      [['B–B–E', 'B–B–B–E', 'B–B–E–H'], 'split', ''],
    ])
  })

  it('are pooled with a reason only, asked for in a field that has the focus', async () => {
    const wrapper = list()
    await button(wrapper, 'Pool, with reason').trigger('click')
    await flushPromises()
    const field = wrapper.get<HTMLInputElement>('form input')
    expect(document.activeElement).toBe(field.element)
    await wrapper.get('form').trigger('submit')
    expect(wrapper.get('form').text()).toContain('Say why the places are pooled')
    expect(decisions(wrapper)).toEqual([])
    await field.setValue(' they look alike ')
    await wrapper.get('form').trigger('submit')
    expect(decisions(wrapper)).toEqual([[['B–B–E'], 'pooled', 'they look alike']])
  })

  it('say what was decided, and can be decided again', async () => {
    const decided = setPooling(
      setPooling(THREE_TO_ONE, ['B', 'B', 'E'], 'split'),
      ['B', 'B', 'B', 'E'],
      'pooled',
      'few samples',
    )
    const wrapper = list([], decided)
    const lines = wrapper.findAll('[aria-label="Decided about places"] li').map((line) => words(line.text()))
    expect(lines).toEqual([
      'B–B–E is split by place into two terms. Decide again',
      'B–B–B–E is pooled over two places that differ: few samples Decide again',
    ])
    expect(nameIn(wrapper, 'dihedral B–B–B–E')).toBe('B–B–B–E 2 places, pooled')
    expect(nameIn(wrapper, 'angle B–B–E (2)')).toBe('B–B–E (2)')
    await wrapper.get('[aria-label="Decide again about B–B–E"]').trigger('click')
    expect(decisions(wrapper)).toEqual([[['B–B–E'], null, '']])
  })

  it('are only shown to those who read', () => {
    const wrapper = list([], THREE_TO_ONE, true)
    expect(wrapper.findAll('[aria-label=Warning] button').map((each) => words(each.text()))).toEqual([
      'Show B–B–E on the chain',
    ])
  })
})

describe('MappingTerms', () => {
  it('lists the terms in three columns with their counts', () => {
    const wrapper = list()
    expect(words(wrapper.get('h2').text())).toBe('Terms that follow, 10')
    expect(wrapper.findAll('h3').map((heading) => words(heading.text()))).toEqual([
      'Bonds 3',
      'Angles 3',
      'Dihedrals 4',
    ])
  })

  it('marks the terms that have data and counts them', () => {
    const wrapper = list()
    expect(wrapper.text()).toContain('2 of 10 with data')
    expect(wrapper.findAll('.base-standing [role=img]').map((mark) => mark.attributes('aria-label'))).toEqual(
      ['data', 'inverted'],
    )
    expect(list([]).text()).toContain('none has data yet')
  })

  it('leaves data of terms that are no longer current aside', () => {
    expect(list([term('bond', 'BE', { current: false })]).text()).toContain('none has data yet')
  })

  it('flags terms at places that differ and explains the first of them', () => {
    const wrapper = list()
    expect(nameIn(wrapper, 'angle B–B–E')).toBe('B–B–E 2 places')
    expect(nameIn(wrapper, 'angle B–B–B')).toBe('B–B–B')
    expect(words(wrapper.get('[aria-label=Warning]').text())).toMatch(
      /^B–B–E stands at two places that differ.* Two more terms share the question\./,
    )
  })

  it('explains the term that is pointed at, where it has places that differ', async () => {
    const wrapper = list()
    await row(wrapper, 'dihedral B–B–E–H').trigger('pointerenter')
    expect(wrapper.get('[aria-label=Warning]').text()).toContain('B–B–E–H stands at two places')
    await row(wrapper, 'bond B–B').trigger('pointerenter')
    expect(wrapper.get('[aria-label=Warning]').text()).toContain('B–B–E stands at two places')
  })

  it('is one tab stop, and the arrows go on across the columns', async () => {
    const wrapper = list()
    expect(wrapper.findAll('[data-term][tabindex="0"]').map((each) => each.attributes('data-term'))).toEqual([
      'bond B–B',
    ])
    row(wrapper, 'bond B–B').element.focus()
    for (const key of ['ArrowDown', 'ArrowDown', 'ArrowDown']) {
      await wrapper.get('[data-term]:focus').trigger('keydown', { key })
    }
    expect(document.activeElement?.getAttribute('data-term')).toBe('angle B–B–B')
    await wrapper.get('[data-term]:focus').trigger('keydown', { key: 'End' })
    expect(document.activeElement?.getAttribute('data-term')).toBe('dihedral B–B–E–H')
    expect(wrapper.findAll('[data-term][tabindex="0"]')).toHaveLength(1)
  })

  it('goes back to the term with the focus when the pointer leaves another', async () => {
    const wrapper = list()
    row(wrapper, 'bond B–E').element.focus()
    await wrapper.vm.$nextTick()
    await row(wrapper, 'bond E–H').trigger('pointerenter')
    await row(wrapper, 'bond E–H').trigger('pointerleave')
    row(wrapper, 'bond B–E').element.blur()
    await wrapper.vm.$nextTick()
    expect(pointedAt(wrapper)).toEqual(['B–E', 'E–H', 'B–E', null])
  })

  it('takes the focus to the explained term and asks for the chain', async () => {
    const wrapper = list()
    const show = wrapper.findAll('[aria-label=Warning] button').at(-1)
    expect(show?.text()).toBe('Show B–B–E on the chain')
    await show?.trigger('click')
    await flushPromises()
    expect(document.activeElement?.getAttribute('data-term')).toBe('angle B–B–E')
    expect(pointedAt(wrapper)).toEqual(['B–B–E'])
    expect(wrapper.emitted('show')).toHaveLength(1)
  })

  it('counts the data of used terms only, and marks the others', () => {
    const angle = terms.find(({ name }) => name === 'B–B–E')
    if (angle === undefined) throw new Error('The mapping has this angle.')
    const wrapper = list(undefined, setTermUse(THREE_TO_ONE, angle, 'left out', 'follows from the others'))
    expect(wrapper.text()).toContain('1 of 9 with data, 1 left out')
    expect(nameIn(wrapper, 'angle B–B–E')).toContain('left out')
  })

  it('says why there is none', () => {
    const wrapper = mount(MappingTerms, {
      props: { terms: [], document: { version: 1, beads: [] }, saved: [], flags: [], readonly: false },
    })
    expect(wrapper.text()).toContain('No two beads are bonded yet.')
  })
})
