import { mount } from '@vue/test-utils'
import { afterEach, describe, expect, it } from 'vitest'
import { createVuetify } from 'vuetify'
import type { StatePoint } from '@shared/contracts/polymer'
import BenchTermRail from '@/components/bench/BenchTermRail.vue'
import { mappingDocument, term } from '../../unit/src/components/bench/bench-terms'

const terms = [
  term('angle', 'BEH', { standing: 'inverted' }),
  term('bond', 'BB', { standing: 'inverted' }),
  term('bond', 'BE'),
  term('dihedral', 'BBEH', { standing: 'no data', silhouette: null }),
]
const statePoint = { temperature: 400, pressure: 1, phase: 'melt', composition: '' } as StatePoint

const rail = (chosen: string | null) =>
  mount(BenchTermRail, {
    props: { terms, document: mappingDocument, statePoint, chosen },
    global: { plugins: [createVuetify()] },
    attachTo: document.body,
  })

afterEach(() => {
  document.body.innerHTML = ''
})

describe('BenchTermRail', () => {
  it('lists the terms by kind with their standing in words', () => {
    const wrapper = rail(terms[0].id)
    expect(wrapper.findAll('h3').map((heading) => heading.text())).toEqual(['Bonds', 'Angles', 'Dihedrals'])
    const rows = wrapper
      .findAll('[data-term]')
      .map((row) => [row.find('.name').text(), row.find('.standing').text()])
    expect(rows).toEqual([
      ['B–B', 'inverted'],
      ['B–E', 'data'],
      ['B–E–H', 'inverted'],
      ['B–B–E–H', 'no data'],
    ])
  })

  it('is one tab stop, at the term on the bench', () => {
    const stops = rail(terms[0].id)
      .findAll('[data-term]')
      .filter((row) => row.attributes('tabindex') === '0')
    expect(stops.map((row) => row.attributes('data-term'))).toEqual([terms[0].id])
    expect(stops[0].attributes('aria-current')).toBe('true')
  })

  it('is still reachable when no term is on the bench', () => {
    expect(rail(null).findAll('[data-term][tabindex="0"]')).toHaveLength(1)
  })

  it('goes from term to term with the arrows, across the groups, and takes the focus along', async () => {
    const wrapper = rail(terms[2].id)
    await wrapper.find(`[data-term="${terms[2].id}"]`).trigger('keydown', { key: 'ArrowDown' })
    expect(wrapper.emitted('choose')).toEqual([[terms[0].id]])
    expect(document.activeElement?.getAttribute('data-term')).toBe(terms[0].id)
    await wrapper.find(`[data-term="${terms[0].id}"]`).trigger('keydown', { key: 'Home' })
    expect(wrapper.emitted('choose')?.at(-1)).toEqual([terms[1].id])
  })

  it('counts the standings and names the state point at its foot', () => {
    const text = rail(null).text()
    expect(text).toContain('3 of 4 with data')
    expect(text).toContain('400 K, 1 bar, melt')
    for (const count of ['2 inverted', '1 data', '1 no data']) expect(text).toContain(count)
  })

  it('steps to the neighbours on a phone and ends at the last term', async () => {
    const wrapper = rail(terms[3].id)
    const stepper = wrapper.find('nav')
    const [previous, , next] = stepper.findAll('button')
    expect(previous.attributes('aria-label')).toBe('Previous term, B–E–H')
    expect(next.attributes('disabled')).toBeDefined()
    expect(stepper.text()).toContain('4 of 4 terms')
    await previous.trigger('click')
    expect(wrapper.emitted('choose')).toEqual([[terms[0].id]])
  })
})
