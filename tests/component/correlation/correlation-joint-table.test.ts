import { mount } from '@vue/test-utils'
import { describe, expect, it } from 'vitest'
import { createVuetify } from 'vuetify'
import type { JointDistribution } from '@shared/contracts/distribution'
import CorrelationJointTable from '@/components/correlation/CorrelationJointTable.vue'

const ID = '00000000-0000-4000-8000-000000000000'

function offer(content: JointDistribution['content'], independentSamples: number | null) {
  return mount(CorrelationJointTable, {
    props: {
      joint: { id: ID, content, independentSamples },
      units: { length: 'angstrom', angle: 'radian', energy: 'kT' },
    },
    global: { plugins: [createVuetify()] },
  })
}

describe('CorrelationJointTable', () => {
  it('offers the table in the units on screen, and says that it wants validation', () => {
    const wrapper = offer('count', null)
    const link = wrapper.get('a')
    expect(link.text()).toBe('Download joint table')
    expect(link.attributes('href')).toBe(
      `/api/joint-distributions/${ID}/table?length=angstrom&angle=radian&energy=kT`,
    )
    expect(link.attributes()).toHaveProperty('download')
    expect(wrapper.text()).toContain('one state point')
    expect(wrapper.text()).toContain('validate it')
  })

  it('offers it for a density with a stated number of samples', () => {
    expect(offer('density', 4000).find('a').exists()).toBe(true)
  })

  it('offers none for a density without one, and says why', () => {
    const wrapper = offer('probability', null)
    expect(wrapper.find('a').exists()).toBe(false)
    expect(wrapper.text()).toContain('how many independent samples')
  })
})
