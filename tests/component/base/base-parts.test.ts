import { mount } from '@vue/test-utils'
import { describe, expect, it } from 'vitest'
import BaseChemicalName from '@/components/base/BaseChemicalName.vue'
import BaseError from '@/components/base/BaseError.vue'
import BaseField from '@/components/base/BaseField.vue'
import BaseFormula from '@/components/base/BaseFormula.vue'
import BaseInput from '@/components/base/BaseInput.vue'
import BaseProgress from '@/components/base/BaseProgress.vue'
import BaseStandingMark from '@/components/base/BaseStandingMark.vue'
import BaseWarning from '@/components/base/BaseWarning.vue'

describe('BaseChemicalName', () => {
  const italics = (name: string) => {
    const wrapper = mount(BaseChemicalName, { props: { name } })
    expect(wrapper.text()).toBe(name)
    return wrapper.findAll('i').map((each) => each.text())
  }

  it.each([
    ['poly(n-hexyl acrylate)', ['n']],
    ['poly(tert-butyl acrylate)', ['tert']],
    ['poly(ethylene-co-propylene)', ['co']],
    ['cis-1,4-polyisoprene', ['cis']],
    ['polystyrene', []],
    ['nylon-6', []],
    ['PS-b-PMMA', ['b']],
  ])('sets the prefixes of %s in italics and changes no letter', (name, expected) => {
    expect(italics(name)).toEqual(expected)
  })
})

describe('BaseFormula', () => {
  it('sets the numbers below the line', () => {
    const wrapper = mount(BaseFormula, { props: { formula: 'C9H16O2' } })
    expect(wrapper.text()).toBe('C9H16O2')
    expect(wrapper.findAll('sub').map((each) => each.text())).toEqual(['9', '16', '2'])
  })
})

describe('BaseStandingMark', () => {
  it.each(['no data', 'data', 'inverted', 'questioned', 'accepted'] as const)(
    'says "%s" in a word, or names its shape when the word is left out',
    (standing) => {
      const word = mount(BaseStandingMark, { props: { standing } })
      expect(word.text()).toBe(standing)
      expect(word.find('svg').attributes('aria-hidden')).toBe('true')
      const bare = mount(BaseStandingMark, { props: { standing, word: false } })
      expect(bare.find('svg').attributes()).toMatchObject({ role: 'img', 'aria-label': standing })
    },
  )

  it('gives every standing a shape of its own', () => {
    const shapes = (['no data', 'data', 'inverted', 'questioned', 'accepted'] as const).map((standing) =>
      mount(BaseStandingMark, { props: { standing } }).find('svg').html(),
    )
    expect(new Set(shapes).size).toBe(5)
  })
})

describe('BaseInput', () => {
  it('ties its label and its note to the box', () => {
    const wrapper = mount(BaseInput, { props: { label: 'Temperature', hint: 'In kelvin', modelValue: '' } })
    const box = wrapper.find('input')
    expect(wrapper.find('label').attributes('for')).toBe(box.attributes('id'))
    const note = wrapper.find(`[id="${box.attributes('aria-describedby')}"]`)
    expect(note.text()).toBe('In kelvin')
    expect(box.attributes('aria-invalid')).toBeUndefined()
  })

  it('puts the error in the place of the rule and marks the box', () => {
    const props = { label: 'Temperature', hint: 'In kelvin', error: 'Above 0 K.', modelValue: '-3' }
    const wrapper = mount(BaseInput, { props })
    expect(wrapper.text()).toContain('Above 0 K.')
    expect(wrapper.text()).not.toContain('In kelvin')
    expect(wrapper.find('input').attributes('aria-invalid')).toBe('true')
  })

  it('never lets a browser reinterpret a number while it is typed', () => {
    const wrapper = mount(BaseInput, { props: { label: 'Pressure', type: 'number', modelValue: '' } })
    expect(wrapper.find('input').attributes()).toMatchObject({ type: 'text', inputmode: 'decimal' })
  })
})

describe('BaseProgress', () => {
  it('tells how far it is, and stays on its thread beyond the end', () => {
    const wrapper = mount(BaseProgress, { props: { done: 3, of: 4, label: 'Terms with data' } })
    expect(wrapper.attributes()).toMatchObject({
      role: 'progressbar',
      'aria-valuenow': '3',
      'aria-valuemax': '4',
      'aria-label': 'Terms with data',
    })
    expect(wrapper.find('.base-progress__bead').attributes('style')).toContain('75%')
    const over = mount(BaseProgress, { props: { done: 9, of: 4, label: 'x' } })
    expect(over.find('.base-progress__bead').attributes('style')).toContain('100%')
  })
})

describe('BaseField', () => {
  it('is a label only where there is a control to name', () => {
    expect(
      mount(BaseField, { props: { label: 'Unit' } })
        .find('label')
        .exists(),
    ).toBe(false)
    const named = mount(BaseField, { props: { label: 'Unit', for: 'unit' } })
    expect(named.find('label').attributes('for')).toBe('unit')
  })
})

describe('BaseWarning and BaseError', () => {
  const slots = { default: 'why', actions: '<button>what to do</button>' }

  it('say what, why and what to do, in this order', () => {
    for (const part of [BaseWarning, BaseError]) {
      const wrapper = mount(part, { props: { title: 'what' }, slots })
      expect(wrapper.text().replace(/\s+/g, ' ')).toMatch(/what ?why ?what to do/)
    }
  })

  it('speak up only for an error', () => {
    expect(mount(BaseError, { props: { title: 'what' } }).attributes('role')).toBe('alert')
    expect(mount(BaseWarning, { props: { title: 'what' } }).attributes('role')).toBe('group')
  })
})
