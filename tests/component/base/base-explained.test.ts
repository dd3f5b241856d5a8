import { enableAutoUnmount, mount } from '@vue/test-utils'
import { afterEach, describe, expect, it, vi } from 'vitest'
import { h, nextTick } from 'vue'
import BaseDisclosure from '@/components/base/BaseDisclosure.vue'
import BaseExplained from '@/components/base/BaseExplained.vue'
import BaseExplainedList from '@/components/base/BaseExplainedList.vue'

enableAutoUnmount(afterEach)
afterEach(() => vi.useRealTimers())

const explained = (sentence = 'How many there are.') =>
  mount(BaseExplained, { props: { sentence }, slots: { default: '42' }, attachTo: document.body })
const isOpen = (wrapper: ReturnType<typeof explained>): boolean =>
  wrapper.find<HTMLElement>('[role=tooltip]').element.style.display !== 'none'

describe('BaseExplained', () => {
  it('describes its number at all times, and shows the sentence on focus until focus leaves', async () => {
    const wrapper = explained()
    const button = wrapper.find('button')
    expect(button.attributes('aria-describedby')).toBe(wrapper.find('[role=tooltip]').attributes('id'))
    expect(isOpen(wrapper)).toBe(false)
    await button.trigger('focusin')
    expect(isOpen(wrapper)).toBe(true)
    await button.trigger('focusout')
    expect(isOpen(wrapper)).toBe(false)
  })

  it('goes away with Escape, which does nothing else then', async () => {
    const wrapper = explained()
    const outside = vi.fn()
    window.addEventListener('keydown', outside)
    await wrapper.trigger('pointerenter')
    document.body.dispatchEvent(new KeyboardEvent('keydown', { key: 'Escape', bubbles: true }))
    await nextTick()
    expect(isOpen(wrapper)).toBe(false)
    expect(outside).not.toHaveBeenCalled()
    document.body.dispatchEvent(new KeyboardEvent('keydown', { key: 'Escape', bubbles: true }))
    expect(outside).toHaveBeenCalledTimes(1)
    window.removeEventListener('keydown', outside)
  })

  it('stays while the pointer crosses to it, and goes when the pointer is gone', async () => {
    vi.useFakeTimers()
    const wrapper = explained()
    await wrapper.trigger('pointerenter')
    await wrapper.trigger('pointerleave')
    await wrapper.trigger('pointerenter')
    vi.runAllTimers()
    await nextTick()
    expect(isOpen(wrapper)).toBe(true)
    await wrapper.trigger('pointerleave')
    vi.runAllTimers()
    await nextTick()
    expect(isOpen(wrapper)).toBe(false)
  })

  it('goes when the page scrolls under the pointer, and stays with a number that has the focus', async () => {
    const wrapper = explained()
    await wrapper.trigger('pointerenter')
    document.dispatchEvent(new Event('scroll'))
    await nextTick()
    expect(isOpen(wrapper)).toBe(false)
    wrapper.find('button').element.focus()
    await nextTick()
    document.dispatchEvent(new Event('scroll'))
    await nextTick()
    expect(isOpen(wrapper)).toBe(true)
  })

  it('leaves the tab stop to a control that it explains, and shows nothing without a sentence', async () => {
    const wrapper = mount(BaseExplained, {
      props: { sentence: '', control: true },
      slots: {
        default: ({ described }: { described: string }) => h('input', { 'aria-describedby': described }),
      },
    })
    expect(wrapper.find('button').exists()).toBe(false)
    await wrapper.find('input').trigger('focusin')
    expect(wrapper.find<HTMLElement>('[role=tooltip]').element.style.display).toBe('none')
  })
})

describe('BaseExplainedList', () => {
  const list = () =>
    mount(BaseExplainedList, {
      slots: {
        default: () =>
          ['one', 'two', 'three'].map((text) => h(BaseExplained, { sentence: text }, () => text)),
      },
      attachTo: document.body,
    })
  const stops = (wrapper: ReturnType<typeof list>): (string | undefined)[] =>
    wrapper.findAll('button').map((button) => button.attributes('tabindex'))

  it('is one tab stop that arrows, Home and End move', async () => {
    const wrapper = list()
    expect(stops(wrapper)).toEqual(['0', '-1', '-1'])
    wrapper.findAll<HTMLElement>('button')[0].element.focus()
    const press = async (key: string): Promise<string | null | undefined> => {
      document.activeElement?.dispatchEvent(
        new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true }),
      )
      await nextTick()
      return document.activeElement?.textContent?.trim()
    }
    expect(await press('ArrowDown')).toBe('two')
    expect(stops(wrapper)).toEqual(['-1', '0', '-1'])
    expect(await press('End')).toBe('three')
    expect(await press('ArrowDown')).toBe('three')
    expect(await press('Home')).toBe('one')
  })
})

describe('BaseDisclosure', () => {
  it('says whether it is open and what it opens', async () => {
    const wrapper = mount(BaseDisclosure, { props: { title: 'More' }, slots: { default: 'behind' } })
    const button = wrapper.find('button')
    expect([button.attributes('aria-expanded'), wrapper.text()]).toEqual(['false', 'More'])
    await button.trigger('click')
    expect(button.attributes('aria-expanded')).toBe('true')
    expect(wrapper.find(`[id="${button.attributes('aria-controls')}"]`).text()).toBe('behind')
  })
})
