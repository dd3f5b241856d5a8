import { mount } from '@vue/test-utils'
import { describe, expect, it } from 'vitest'
import type { Correlation } from '@shared/correlation'
import CorrelationVerdict from '@/components/correlation/CorrelationVerdict.vue'
import { mapModel } from '@/components/correlation/figure/map-model'
import {
  correlationOf,
  correlationWithoutSampleSize,
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
    expect(text).toContain('are our defaults')
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
