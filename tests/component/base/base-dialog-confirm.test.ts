import { enableAutoUnmount, flushPromises, mount } from '@vue/test-utils'
import { afterEach, describe, expect, it } from 'vitest'
import { h } from 'vue'
import { VApp } from 'vuetify/components'
import BaseDialogConfirm from '@/components/base/BaseDialogConfirm.vue'
import { createBeadwrightVuetify } from '@/plugins/vuetify'
import { control, field, pageText, submit, type } from '../../support/mount'

enableAutoUnmount(afterEach)

const open = async (props: Record<string, unknown>) => {
  const confirmed: string[] = []
  const shown: boolean[] = []
  mount(
    {
      render: () =>
        h(VApp, () =>
          h(
            BaseDialogConfirm,
            {
              modelValue: true,
              title: 'Delete mapping 5-to-1?',
              confirmLabel: 'Delete mapping',
              nameLabel: 'Type the name of the mapping',
              onConfirm: () => confirmed.push('yes'),
              'onUpdate:modelValue': (value: boolean) => shown.push(value),
              ...props,
            },
            () => '16 terms go with it.',
          ),
        ),
    },
    { global: { plugins: [createBeadwrightVuetify()] }, attachTo: document.body },
  )
  await flushPromises()
  return { confirmed, shown }
}
const button = () => control('Delete mapping') as HTMLButtonElement

describe('BaseDialogConfirm', () => {
  it('deletes only once the name is typed, exactly', async () => {
    const { confirmed } = await open({ nameToType: '5-to-1' })
    expect(pageText()).toContain('16 terms go with it.')
    expect(button().disabled).toBe(true)
    await type('Type the name of the mapping', '5-to')
    await submit()
    expect(confirmed).toEqual([])
    await type('Type the name of the mapping', ' 5-to-1 ')
    expect(button().disabled).toBe(false)
    await submit()
    expect(confirmed).toEqual(['yes'])
  })

  it('takes a hyphen for a dash only where it is told to', async () => {
    await open({ nameToType: 'B–E–H', looseHyphens: true })
    await type('Type the name of the mapping', 'B-E-H')
    expect(button().disabled).toBe(false)
  })

  it('asks for the very dash otherwise', async () => {
    await open({ nameToType: 'B–E–H' })
    await type('Type the name of the mapping', 'B-E-H')
    expect(button().disabled).toBe(true)
  })

  it('asks for no name when there is none to type, and closes by the safe way', async () => {
    const { shown } = await open({})
    expect(() => field('Type the name of the mapping')).toThrow()
    expect(button().disabled).toBe(false)
    control('Keep it').click()
    expect(shown).toEqual([false])
  })

  it('lets nothing be pressed while it works, and says what went wrong', async () => {
    await open({ busy: true, error: 'The server does not answer.' })
    expect(button().disabled).toBe(true)
    expect((control('Keep it') as HTMLButtonElement).disabled).toBe(true)
    expect(pageText()).toContain('The server does not answer.')
  })
})
