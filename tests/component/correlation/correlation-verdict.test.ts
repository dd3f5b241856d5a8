import { mount } from '@vue/test-utils'
import { describe, expect, it } from 'vitest'
import type { Correlation } from '@shared/correlation'
import CorrelationVerdict from '@/components/correlation/CorrelationVerdict.vue'
import { mapModel } from '@/components/correlation/figure/map-model'
import {
  correlationOf,
  correlationWithoutSampleSize,
  twoBasins,
} from '../../unit/src/components/correlation/correlations'

const card = (correlation: Correlation) =>
  mount(CorrelationVerdict, {
    props: {
      correlation,
      model: mapModel(correlation, { length: 'nm', angle: 'degree', energy: 'kJ/mol' }),
      names: ['E–H', 'B–E–H'] as const,
    },
  })

describe('CorrelationVerdict', () => {
  it('names the verdict, its number with an error, and every piece of evidence', () => {
    const text = card(correlationOf(0.8)).text()
    expect(text).toContain('Joint potential advised')
    expect(text).toMatch(/0\.\d{3} ± 0\.\d{3} nats/)
    for (const evidence of [
      'Null level, 99 %',
      'Largest coupling',
      'Total variation',
      'Pearson, Spearman',
      'Miller–Madow',
      'Independent samples',
    ]) {
      expect(text).toContain(evidence)
    }
    expect(text).toContain('are the thresholds of the group')
  })

  it('says what each number is, in a sentence tied to it', () => {
    const wrapper = card(correlationOf(0.8))
    const [first] = wrapper.findAll('dd button')
    const sentence = wrapper.get(`[id="${first.attributes('aria-describedby')}"]`)
    expect(sentence.attributes('role')).toBe('tooltip')
    expect(sentence.text()).toContain('unrelated terms')
  })

  it('counts the basins of map and product with the depth asked for, and lists them one step away', async () => {
    const wrapper = card(twoBasins())
    expect(wrapper.text()).toMatch(/Basins, map and product\s*2 and 4,\s*deeper than 0\.5 kT/)
    await wrapper.get('button[aria-expanded]').trigger('click')
    const rows = wrapper.findAll('tbody tr').map((row) => row.findAll('td').map((cell) => cell.text()))
    expect(rows.map(([number]) => number)).toEqual(['1', '2', '', ''])
    expect(rows[0].slice(2)).toEqual(['60 %', 'lowest', 'both'])
    expect(rows.slice(2).every(([, , , , kind]) => kind === 'product only')).toBe(true)
  })

  it('puts the bead of the scale further right the stronger the coupling', () => {
    const bead = (strength: number) => Number(card(correlationOf(strength)).find('.bead').attributes('cx'))
    expect(bead(0)).toBeLessThan(bead(0.35))
    expect(bead(0.35)).toBeLessThan(bead(0.8))
  })

  it('gives no number and no scale where the sample size is not stated', () => {
    const wrapper = card(correlationWithoutSampleSize(0.8))
    expect(wrapper.text()).toContain('Sample size not stated')
    expect(wrapper.text()).not.toContain('± ')
    expect(wrapper.find('.scale').exists()).toBe(false)
    expect(wrapper.text()).toContain('not stated')
  })
})
