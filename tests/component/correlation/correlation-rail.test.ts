import { mount } from '@vue/test-utils'
import { describe, expect, it } from 'vitest'
import type { Pair } from '@shared/contracts/distribution'
import type { Term } from '@shared/contracts/mapping'
import CorrelationRail from '@/components/correlation/CorrelationRail.vue'

const terms = ['B–E', 'E–H', 'B–E–H', 'B–E–H–T'].map((name) => ({
  id: name,
  name,
  kind: (['bond', 'angle', 'dihedral'] as const)[name.split('–').length - 2],
})) as Term[]
const numbers = {
  verdict: 'joint',
  mutualInformation: 0.55,
  mutualInformationCorrected: 0.4932,
  nullMean: 0.05,
  pValue: 0.005,
  independentSamples: 6466,
} as const
const pairs: Pair[] = [
  {
    firstTermId: 'B–E',
    secondTermId: 'B–E–H',
    name: '',
    jointDistributionId: null,
    numbers: null,
    decision: null,
  },
  {
    firstTermId: 'E–H',
    secondTermId: 'B–E–H',
    name: '',
    jointDistributionId: 'joint',
    numbers,
    decision: null,
  },
]
const rail = (chosen: Pair) =>
  mount(CorrelationRail, { props: { pairs, chosen, terms }, attachTo: document.body })

describe('CorrelationRail', () => {
  it('names each pair with its verdict in words and its number, and says where there are no data', () => {
    const rows = rail(pairs[1]).findAll('button')
    expect(rows[0].text()).toContain('no data')
    expect(rows[1].text()).toContain('E–H with B–E–H')
    expect(rows[1].text()).toContain('0.493')
    expect(rows[1].text()).toContain('Joint potential advised, 0.493 nats')
  })

  it('parts the pairs by the kinds of their terms, whichever a file named first', () => {
    const pair = (firstTermId: string, secondTermId: string): Pair => ({
      ...pairs[0],
      firstTermId,
      secondTermId,
    })
    const all = [...pairs, pair('B–E–H', 'B–E'), pair('B–E', 'E–H'), pair('B–E–H', 'B–E–H–T')]
    const wrapper = mount(CorrelationRail, { props: { pairs: all, chosen: all[0], terms } })
    const headings = wrapper.findAll('h3').map((heading) => heading.text())
    expect(headings).toEqual(['Bond with angle', 'Bond with bond', 'Angle with dihedral'])
    expect(wrapper.findAll('button')).toHaveLength(5)
  })

  it('is one tab stop on the chosen pair, and arrows choose the neighbours', async () => {
    const wrapper = rail(pairs[0])
    const stops = wrapper.findAll('button').map((row) => row.attributes('tabindex'))
    expect(stops).toEqual(['0', '-1'])
    await wrapper.find('ul').trigger('keydown', { key: 'ArrowDown' })
    await wrapper.find('ul').trigger('keydown', { key: 'ArrowUp' })
    expect(wrapper.emitted('choose')).toEqual([[pairs[1]]])
  })

  it('keeps the focus on the chosen row while arrows walk', async () => {
    const wrapper = rail(pairs[0])
    wrapper.findAll('button')[0].element.focus()
    await wrapper.setProps({ chosen: pairs[1] })
    expect(document.activeElement).toBe(wrapper.findAll('button')[1].element)
  })

  it('says which pair is the current one', () => {
    const rows = rail(pairs[1]).findAll('button')
    expect(rows.map((row) => row.attributes('aria-current'))).toEqual([undefined, 'true'])
  })
})
