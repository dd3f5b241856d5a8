import { mount } from '@vue/test-utils'
import { describe, expect, it } from 'vitest'
import BenchNumberField from '@/components/bench/BenchNumberField.vue'

const field = (props: Record<string, unknown> = {}) =>
  mount(BenchNumberField, { props: { label: 'Rows', value: 1000, shown: '1\u00a0000', ...props } })

const type = async (wrapper: ReturnType<typeof field>, text: string): Promise<void> => {
  await wrapper.find('input').trigger('focus')
  await wrapper.find('input').setValue(text)
  await wrapper.find('input').trigger('keydown', { key: 'Enter' })
}

describe('BenchNumberField', () => {
  it('reads with parted thousands and is typed without them', async () => {
    const input = field().find('input')
    expect(input.element.value).toBe('1\u00a0000')
    await input.trigger('focus')
    expect(input.element.value).toBe('1000')
  })

  it('hands on a number once it is typed', async () => {
    const wrapper = field()
    await type(wrapper, '2000')
    expect(wrapper.emitted('change')).toEqual([[2000]])
  })

  it('takes a real minus and parted thousands as they are shown', async () => {
    const wrapper = field()
    await type(wrapper, '−12\u00a0500')
    expect(wrapper.emitted('change')).toEqual([[-12500]])
  })

  it('refuses what is not a number, names a decimal comma, and changes nothing', async () => {
    const wrapper = field()
    await type(wrapper, 'many')
    expect(wrapper.find('[role=alert]').text()).toBe('Type a number.')
    await type(wrapper, '0,5')
    expect(wrapper.find('[role=alert]').text()).toBe('Write the decimals after a point.')
    expect(wrapper.emitted('change')).toBeUndefined()
  })

  it('takes an empty field as the default only where there is one', async () => {
    const required = field()
    await type(required, '')
    expect(required.emitted('change')).toBeUndefined()
    const optional = field({ whenEmpty: 'no cap' })
    await type(optional, '')
    expect(optional.emitted('change')).toEqual([[null]])
  })

  it('takes back what was typed on Escape', async () => {
    const wrapper = field()
    await wrapper.find('input').trigger('focus')
    await wrapper.find('input').setValue('7')
    await wrapper.find('input').trigger('keydown', { key: 'Escape' })
    await wrapper.find('input').trigger('blur')
    expect(wrapper.emitted('change')).toBeUndefined()
    expect(wrapper.find('input').element.value).toBe('1\u00a0000')
  })

  it('says why a value was refused by the core', () => {
    const wrapper = field({ error: 'A table has a whole number of rows.' })
    expect(wrapper.find('input').attributes('aria-invalid')).toBe('true')
    expect(wrapper.text()).toContain('A table has a whole number of rows.')
  })
})
