import { enableAutoUnmount, flushPromises, mount } from '@vue/test-utils'
import { afterEach, describe, expect, it } from 'vitest'
import { h } from 'vue'
import { VApp } from 'vuetify/components'
import type { CoordinateKind } from '@shared/units'
import { previewDistribution, type IntakeSettings as Settings } from '@shared/intake'
import IntakeDrop from '@/components/intake/IntakeDrop.vue'
import IntakeFirstLines from '@/components/intake/IntakeFirstLines.vue'
import IntakeRefusal from '@/components/intake/IntakeRefusal.vue'
import IntakeSamples from '@/components/intake/IntakeSamples.vue'
import IntakeSettings from '@/components/intake/IntakeSettings.vue'
import IntakeSketch from '@/components/intake/IntakeSketch.vue'
import { createBeadwrightVuetify } from '@/plugins/vuetify'
import { pageText, type } from '../../support/mount'

enableAutoUnmount(afterEach)

const bond = '# measured\nr count\n0.30 12\n0.31 15\n0.32 18\n0.33 14\n0.34 9\n'
const words = (text: string): string => text.replace(/\s+/g, ' ').trim()

describe('IntakeDrop', () => {
  it('takes files that are dropped on it, several at once', async () => {
    const wrapper = mount(IntakeDrop, {
      props: { compact: false, forTerm: 'B–E' },
      global: { plugins: [createBeadwrightVuetify()] },
    })
    expect(words(wrapper.text())).toContain('is taken for B–E')
    const files = [new File(['1'], 'a.txt'), new File(['2'], 'b.txt')]
    await wrapper.trigger('dragenter')
    expect(wrapper.classes()).toContain('intake-drop--over')
    await wrapper.trigger('drop', { dataTransfer: { files } })
    expect(wrapper.emitted('bring')).toEqual([[files]])
    expect(wrapper.classes()).not.toContain('intake-drop--over')
  })
})

describe('IntakeFirstLines', () => {
  const { firstLines, columnCount } = previewDistribution(bond, 'bond', null)
  const lines = (badLine?: number) =>
    mount(IntakeFirstLines, {
      props: { lines: firstLines, columnCount, badLine, roles: new Map([[0, 'centre']]) },
    })

  it('names the columns that are read and says which are not', () => {
    expect(
      lines()
        .findAll('thead th')
        .map((cell) => cell.text()),
    ).toEqual(['line', 'centre', 'not read'])
  })

  it('shows comments and header as they stand, data in its columns', () => {
    const rows = lines().findAll('tbody tr')
    expect(rows[0].findAll('td')[1].text()).toBe('# measured')
    expect(rows[2].findAll('td').map((cell) => cell.text())).toEqual(['3', '0.30', '12'])
  })

  it('marks the line that is to blame', () => {
    const marked = lines(4).findAll('.intake-lines__bad')
    expect(marked.map((row) => row.find('td').text())).toEqual(['4'])
  })
})

describe('IntakeRefusal', () => {
  it('says where, why, shows the line, and that nothing was stored', () => {
    const error = {
      code: 'TEXT_NOT_A_NUMBER',
      message: 'Line 214, column 2: “abc” stands where a count should be.',
      place: { line: 214, column: 2 },
    } as const
    const text = words(mount(IntakeRefusal, { props: { error, badLine: '0.31 abc' } }).text())
    expect(text).toContain('Line 214, column 2 cannot be read')
    expect(text).toContain('“abc” stands where a count should be. Nothing was stored.')
    expect(text).toContain('2140.31 abc')
    expect(text.match(/column 2/g)).toHaveLength(1)
  })

  it('speaks of the whole file where no line is to blame', () => {
    const error = { code: 'FILE_EMPTY', message: 'There is nothing in it.', place: {} } as const
    const wrapper = mount(IntakeRefusal, { props: { error, badLine: null } })
    expect(wrapper.text()).toContain('The file cannot be read like this')
    expect(wrapper.find('pre').exists()).toBe(false)
  })
})

describe('IntakeSamples', () => {
  const open = (stated: number | null, counts: number | null) =>
    mount(IntakeSamples, { props: { stated, counts }, attachTo: document.body })

  it('says what an empty answer means, with and without counts', () => {
    expect(open(null, 24000).text()).toContain('all 24\u00a0000 counts are taken as independent')
    const measured = mount(IntakeSamples, { props: { stated: null, counts: 24000, fromBlocks: true } })
    expect(measured.text()).toContain('divided by the inefficiency of the blocks')
    expect(open(null, null).text()).toContain('nothing is smoothed and no band is drawn')
  })

  it.each([
    ['6 792', 6792],
    ['1e4', 10000],
    ['', null],
  ])('takes "%s" as %s', async (text, value) => {
    const wrapper = open(null, 24000)
    await type('Independent samples', text)
    expect(wrapper.emitted('state')).toEqual([[value]])
  })

  it.each([
    ['many', 'Give a number above 0'],
    ['0', 'Give a number above 0'],
    ['24001', 'It cannot be more than the counts'],
  ])('refuses "%s" in place', async (text, message) => {
    const wrapper = open(null, 24000)
    await type('Independent samples', text)
    expect(wrapper.text()).toContain(message)
    expect(wrapper.emitted('state')).toBeUndefined()
  })
})

describe('IntakeSettings', () => {
  const open = async (text: string, kind: CoordinateKind, change: Partial<Settings> = {}) => {
    const preview = previewDistribution(text, kind, null)
    const changes: Settings[] = []
    mount(
      {
        render: () =>
          h(VApp, () =>
            h(IntakeSettings, {
              preview,
              settings: { ...preview.settings!, ...change },
              onChange: (next: Settings) => changes.push(next),
            }),
          ),
      },
      { global: { plugins: [createBeadwrightVuetify()] }, attachTo: document.body },
    )
    await flushPromises()
    return changes
  }
  const angle = bond.replace(/0\.3(\d)/g, '3$1.5')
  const radio = (label: string) =>
    [...document.querySelectorAll<HTMLInputElement>('input[type=radio]')].find(
      (each) => each.parentElement?.parentElement?.parentElement?.textContent?.trim() === label,
    )!

  it.each([
    [bond, 'bond', 'r²'],
    [angle, 'angle', 'sin θ'],
  ] as const)(
    'asks whether the values were already divided by the Jacobian, default no',
    async (text, kind, name) => {
      await open(text, kind)
      expect(pageText()).toContain(`already divided by the Jacobian, ${name}?`)
      expect(radio('No, as they were counted').checked).toBe(true)
    },
  )

  it('does not ask where there is nothing to divide by: a dihedral, or samples', async () => {
    await open(angle, 'dihedral')
    expect(pageText()).not.toContain('Jacobian')
    document.body.innerHTML = ''
    await open('0.31\n0.32\n0.33\n0.34\n0.35\n', 'bond')
    expect(pageText()).not.toContain('Jacobian')
    expect(pageText()).not.toContain('Values are')
  })

  it('passes the answer on with everything else as it was', async () => {
    const changes = await open(bond, 'bond')
    radio('Yes').click()
    await flushPromises()
    const guessed = previewDistribution(bond, 'bond', null).settings
    expect(changes).toEqual([{ ...guessed, alreadyDivided: true }])
  })

  it('asks for the upper edge only where a line holds two', async () => {
    await open(bond, 'bond')
    expect(pageText()).not.toContain('Upper edge')
    document.body.innerHTML = ''
    await open('0.30 0.31 12\n0.31 0.32 15\n0.32 0.33 18\n0.33 0.34 14\n0.34 0.35 9\n', 'bond')
    expect(pageText()).toContain('Upper edge')
  })
})

describe('IntakeSketch', () => {
  it('draws every bin, in the unit of the file', () => {
    const { histogram } = previewDistribution(bond, 'bond', null)
    const wrapper = mount(IntakeSketch, { props: { histogram: histogram!, unit: 'angstrom' } })
    expect(wrapper.find('svg').attributes('aria-label')).toBe('Distribution from 2.95 to 3.45 Å in 5 bins')
    expect(wrapper.find('path[fill="var(--data)"]').attributes('d')?.match(/L/g)).toHaveLength(11)
    expect(wrapper.text()).toContain('1/Å')
  })
})
