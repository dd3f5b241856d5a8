import { enableAutoUnmount, mount, type VueWrapper } from '@vue/test-utils'
import { afterEach, describe, expect, it } from 'vitest'
import { h } from 'vue'
import { VApp } from 'vuetify/components'
import { layoutDocumentSchema } from '@shared/contracts/layout'
import LayoutPicker from '@/components/layouts/LayoutPicker.vue'
import { createBeadwrightVuetify } from '@/plugins/vuetify'
import { layoutWith, PLAIN_UNITS } from '../../support/layout-builder'

enableAutoUnmount(afterEach)

const layouts = [
  {
    id: 'mine',
    name: 'For the cluster',
    document: layoutDocumentSchema.parse(layoutWith({ separator: 'tab' })),
  },
]

const pick = (chosen: string) => {
  const app = mount(
    { render: () => h(VApp, () => h(LayoutPicker, { layouts, units: PLAIN_UNITS, modelValue: chosen })) },
    { global: { plugins: [createBeadwrightVuetify()] }, attachTo: document.body },
  )
  return app.findComponent(LayoutPicker)
}

// A generic component has no type that a search could take.
const choiceOf = (picker: VueWrapper) => picker.findComponent({ name: 'BaseChoice' }) as unknown as VueWrapper

describe('the choice of a layout', () => {
  it('offers those of the group, those of the house, and one of one’s own', () => {
    const { items } = choiceOf(pick('mine')).props() as { items: { title: string }[] }
    const titles = items.map(({ title }) => title)
    expect(titles[0]).toBe('For the cluster')
    expect(titles).toContain('JSON')
    expect(titles.at(-1)).toBe('One of my own')
  })

  it('lets one’s own begin as the one chosen before', () => {
    const picker = pick('mine')
    choiceOf(picker).vm.$emit('update:modelValue', 'own')
    expect(picker.emitted('update:own')?.[0]).toEqual([layouts[0]?.document])
    expect(picker.emitted('update:modelValue')?.[0]).toEqual(['own'])
  })

  it('begins one’s own in the units of the page where a layout of the house was chosen', () => {
    const picker = pick('json')
    choiceOf(picker).vm.$emit('update:modelValue', 'own')
    expect(picker.emitted('update:own')?.[0]).toMatchObject([
      { writing: 'json', angle: { coordinateUnit: 'degree' } },
    ])
  })
})
