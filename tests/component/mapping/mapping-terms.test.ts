import { flushPromises, mount } from '@vue/test-utils'
import { afterEach, describe, expect, it } from 'vitest'
import { parseRepeatUnit } from '@shared/chemistry'
import { deriveTerms } from '@shared/mapping'
import MappingTerms from '@/components/mapping/MappingTerms.vue'
import { term } from '../../unit/src/components/bench/bench-terms'
import { HEXYL_ACRYLATE, THREE_TO_ONE } from '../../unit/shared/mapping/hexyl-acrylate'

const unit = await parseRepeatUnit(HEXYL_ACRYLATE)
const terms = deriveTerms(unit, THREE_TO_ONE)
const words = (text: string): string => text.replace(/\s+/g, ' ').trim()

const list = (saved = [term('bond', 'BE'), term('angle', 'BBE', { standing: 'inverted' })]) =>
  mount(MappingTerms, {
    props: { terms, document: THREE_TO_ONE, saved },
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
    await wrapper.get('[aria-label=Warning] button').trigger('click')
    await flushPromises()
    expect(document.activeElement?.getAttribute('data-term')).toBe('angle B–B–E')
    expect(pointedAt(wrapper)).toEqual(['B–B–E'])
    expect(wrapper.emitted('show')).toHaveLength(1)
  })

  it('says why there is none', () => {
    const wrapper = mount(MappingTerms, {
      props: { terms: [], document: { version: 1, beads: [] }, saved: [] },
    })
    expect(wrapper.text()).toContain('No two beads are bonded yet.')
  })
})
