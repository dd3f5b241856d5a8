import { mount, RouterLinkStub } from '@vue/test-utils'
import { describe, expect, it } from 'vitest'
import BenchConflict from '@/components/bench/BenchConflict.vue'
import BenchDownload from '@/components/bench/BenchDownload.vue'
import BenchEmpty from '@/components/bench/BenchEmpty.vue'
import BenchFigureKey from '@/components/bench/BenchFigureKey.vue'
import BenchReading from '@/components/bench/BenchReading.vue'
import BenchReadingPill from '@/components/bench/BenchReadingPill.vue'
import BenchSmoothing from '@/components/bench/BenchSmoothing.vue'
import BenchWarnings from '@/components/bench/BenchWarnings.vue'
import { createVuetify } from 'vuetify'
import { coordinateNames, type DisplayUnits } from '@/components/figure/coordinate-names'
import type { Reading } from '@/components/bench/figure/reading'
import { angleCounts } from '../../unit/src/components/bench/distributions'
import { storedDistribution, storedPotential } from '../../unit/src/components/bench/stored-records'

const units: DisplayUnits = { length: 'nm', angle: 'degree', energy: 'kJ/mol' }
const shown = {
  measured: true,
  regenerated: true,
  residual: true,
  potential: true,
  smooth: true,
  rings: true,
  comparison: true,
}
const words = (text: string): string => text.replace(/\s+/g, ' ').trim()

describe('BenchFigureKey', () => {
  const key = (kind: 'angle' | 'dihedral', sampled = true) =>
    mount(BenchFigureKey, {
      props: {
        visible: shown,
        names: coordinateNames(kind, units),
        hasBand: sampled,
        hasSmooth: false,
        hasResidual: sampled,
        jacobian: true,
      },
    })

  it('names every curve and says which is switched off', async () => {
    const wrapper = key('angle')
    const entries = wrapper.findAll('button')
    expect(entries.map((entry) => words(entry.text()))).toEqual([
      'measured',
      'regenerated from U',
      'residual',
      'U, 95 % band',
      'bin by bin',
      'without sin θ',
    ])
    await wrapper.setProps({ visible: { ...shown, rings: false } })
    expect(entries.map((entry) => entry.attributes('aria-pressed'))).toEqual([
      'true',
      'true',
      'true',
      'true',
      'false',
      'true',
    ])
    await entries[4].trigger('click')
    expect(wrapper.emitted('toggle')).toEqual([['rings']])
  })

  it('says why there is no band, and offers no comparison where the Jacobian is constant', () => {
    expect(words(key('dihedral', false).text())).toContain('U, no band: sample size not stated')
    expect(key('dihedral', false).text()).not.toContain('residual')
    expect(key('dihedral').text()).not.toContain('without')
  })
})

describe('BenchReading', () => {
  const reading: Reading = {
    bin: 35,
    coordinate: 131,
    low: 130,
    high: 132,
    counts: 2065,
    share: 0.0172,
    independent: 111.02,
    residual: -1.24,
    energy: 3.8012,
    halfWidth: 0.4093,
    thermal: 1.143,
    force: 0.3853,
    comparison: 3.73,
    density: 0.8,
  }
  const row = (change: Partial<Reading> = {}) =>
    words(
      mount(BenchReading, {
        props: {
          reading: { ...reading, ...change },
          names: coordinateNames('angle', units),
          energyUnit: 'kJ/mol',
          decimals: 0,
          jacobian: true,
        },
      }).text(),
    )

  it('reads every number with its unit and the digits it has earned', () => {
    const text = row()
    for (const part of [
      '130–132°',
      '2 065',
      '111',
      '−1.2 σ',
      '3.80 ± 0.41 kJ/mol',
      '1.14',
      '0.385 kJ/mol/deg',
      '3.73',
    ]) {
      expect(text.replaceAll('\u00a0', ' ')).toContain(part)
    }
  })

  it('shows the share of a density, and states neither samples nor error it does not know', () => {
    const text = row({ counts: null, independent: null, residual: null, halfWidth: null }).replaceAll(
      '\u00a0',
      ' ',
    )
    expect(text).toContain('share1.72 %')
    expect(text).toContain('independentnot stated')
    expect(text).not.toContain('±')
    expect(text).not.toContain('residual')
  })
})

describe('BenchReadingPill', () => {
  const pill = () =>
    mount(BenchReadingPill, {
      props: {
        from: 10,
        to: 60,
        top: 0,
        text: '131.0°',
        bin: 35,
        bins: 60,
        description: '131.0°, U 3.80 kJ/mol',
      },
    })

  it('is a slider over the bins that says what it reads', () => {
    const attributes = pill().attributes()
    expect(attributes).toMatchObject({
      role: 'slider',
      tabindex: '0',
      'aria-valuemin': '1',
      'aria-valuemax': '60',
      'aria-valuenow': '36',
      'aria-valuetext': '131.0°, U 3.80 kJ/mol',
    })
  })

  it('moves by a bin, by ten with Shift or Page, and to both ends', async () => {
    const wrapper = pill()
    await wrapper.trigger('keydown', { key: 'ArrowRight' })
    await wrapper.trigger('keydown', { key: 'ArrowLeft', shiftKey: true })
    await wrapper.trigger('keydown', { key: 'PageUp' })
    expect(wrapper.emitted('move')).toEqual([[1], [-10], [10]])
    await wrapper.trigger('keydown', { key: 'Home' })
    await wrapper.trigger('keydown', { key: 'End' })
    expect(wrapper.emitted('go')).toEqual([[0], [59]])
  })
})

describe('BenchSmoothing', () => {
  const slider = (value: number | null) =>
    mount(BenchSmoothing, { props: { value, automatic: 2.85, stiffLimit: 'harmonic' } })

  it('slides in log10 λ and steps by a tenth from the keyboard', async () => {
    const wrapper = slider(3)
    const input = wrapper.find('input')
    expect(input.attributes('aria-valuetext')).toBe('log10 λ 3.00')
    await input.setValue('4.25')
    await input.trigger('keydown', { key: 'ArrowRight' })
    await input.trigger('keydown', { key: 'ArrowLeft', shiftKey: true })
    expect(wrapper.emitted('change')).toEqual([[4.25], [3.1], [2.99]])
  })

  it('says where automatic smoothing sits', () => {
    expect(slider(3).text()).toContain('automatic smoothing sits at log10 λ 2.85')
  })

  it('says that smoothing is off', () => {
    expect(slider(null).find('input').attributes('aria-valuetext')).toBe('off')
  })
})

describe('BenchWarnings', () => {
  const given = {
    distribution: storedDistribution(angleCounts()),
    smooth: true,
    readonly: false,
    answers: [],
    keepable: false,
    answerError: '',
  }
  const warning = { code: 'SAMPLE_SIZE_UNKNOWN', message: 'Nobody said.', action: 'State it.' } as const

  it('says what is wrong, why, and what to do, with the way to do it', async () => {
    const wrapper = mount(BenchWarnings, { props: { ...given, warnings: [warning], stale: null } })
    expect(wrapper.text()).toContain('Sample size not stated')
    expect(wrapper.text()).toContain('Nobody said.')
    await wrapper.find('button').trigger('click')
    expect(wrapper.emitted('stateSamples')).toHaveLength(1)
  })

  it('says that the data changed since the potential was saved', () => {
    const stale = storedPotential({ stale: true })
    const wrapper = mount(BenchWarnings, { props: { ...given, warnings: [], stale } })
    expect(words(wrapper.text())).toContain(
      'Out of date Revision 3 was saved on 12 June 2026; its temperature',
    )
  })

  it('says on which day the distribution was replaced', () => {
    const stale = storedPotential({ stale: true, distributionId: '00000000-0000-4000-8000-000000000099' })
    const wrapper = mount(BenchWarnings, { props: { ...given, warnings: [], stale } })
    expect(words(wrapper.text())).toContain('the distribution was replaced on 12 June 2026')
  })

  it('sets the slope at 180° to zero, unless a form has its own', async () => {
    const slope = { ...warning, code: 'SLOPE_AT_STRAIGHT_ANGLE' } as const
    const wrapper = mount(BenchWarnings, { props: { ...given, warnings: [slope], stale: null } })
    await wrapper.find('button').trigger('click')
    expect(wrapper.emitted('levelSlope')).toHaveLength(1)
    await wrapper.setProps({ smooth: false })
    expect(wrapper.find('button').exists()).toBe(false)
  })

  it('keeps a warning with its reason once the potential is saved, and shows the reason from then on', async () => {
    const wrapper = mount(BenchWarnings, {
      props: { ...given, warnings: [warning], stale: null },
      global: { plugins: [createVuetify()] },
    })
    const keep = () => wrapper.findAll('button').find((button) => button.text() === 'Keep, with reason')
    expect(keep()).toBeUndefined()
    await wrapper.setProps({ keepable: true })
    await keep()?.trigger('click')
    await wrapper.find('input').setValue(' ')
    await wrapper.find('form').trigger('submit')
    expect(wrapper.emitted('keep')).toBeUndefined()
    await wrapper.find('input').setValue('The other file has it.')
    await wrapper.find('form').trigger('submit')
    expect(wrapper.emitted('keep')).toEqual([['SAMPLE_SIZE_UNKNOWN', 'The other file has it.']])
    const answer = {
      code: warning.code,
      reason: 'The other file has it.',
      by: null,
      at: '2026-06-12T12:00:00Z',
    }
    await wrapper.setProps({ answers: [answer] })
    expect(wrapper.text()).toContain('Kept: The other file has it.')
    expect(keep()).toBeUndefined()
  })

  it('offers no act to someone who only reads, and nothing at all without warnings', () => {
    const stale = storedPotential({ stale: true })
    expect(
      mount(BenchWarnings, { props: { ...given, warnings: [warning], stale, readonly: true } })
        .find('button')
        .exists(),
    ).toBe(false)
    expect(mount(BenchWarnings, { props: { ...given, warnings: [], stale: null } }).text()).toBe('')
  })
})

describe('BenchDownload', () => {
  it('leads to the file that has what is on screen', () => {
    const link = mount(BenchDownload, { props: { href: '/api/t', changed: false, revision: 3 } }).find('a')
    expect(link.attributes('href')).toBe('/api/t')
    expect(link.text()).toBe('Download')
  })

  it('says that the file has the saved revision while there are changes', () => {
    const link = mount(BenchDownload, { props: { href: '/api/t', changed: true, revision: 3 } }).find('a')
    expect(link.text()).toBe('Download revision 3')
    expect(link.attributes('title')).toContain('without your changes')
  })

  it('offers no file before anything is saved', () => {
    const wrapper = mount(BenchDownload, { props: { href: null, changed: true, revision: null } })
    expect(wrapper.find('a').exists()).toBe(false)
    expect(wrapper.text()).toBe('no file before it is saved')
  })
})

describe('BenchConflict', () => {
  it('names who saved and leaves the choice to a person', async () => {
    const wrapper = mount(BenchConflict, {
      props: { theirs: storedPotential({ revision: 4 }), saving: false },
    })
    expect(wrapper.text()).toContain('Ana Rivera saved this potential')
    const [take, mine] = wrapper.findAll('button')
    expect(take.text()).toBe('Take revision 4')
    await take.trigger('click')
    await mine.trigger('click')
    expect(Object.keys(wrapper.emitted())).toEqual(expect.arrayContaining(['takeTheirs', 'saveMine']))
  })
})

describe('BenchEmpty', () => {
  const empty = (readonly: boolean) =>
    mount(BenchEmpty, {
      props: { termName: 'B–B–E–H', temperature: 400, intake: { name: 'intake' }, readonly },
      global: { stubs: { RouterLink: RouterLinkStub } },
    })

  it('says what is missing and gives two ways to get it', () => {
    const wrapper = empty(false)
    expect(wrapper.text()).toContain('No distribution for B–B–E–H at 400 K')
    expect(wrapper.findAllComponents(RouterLinkStub)).toHaveLength(2)
  })

  it('sends nobody to the intake who may not write', () => {
    expect(empty(true).findAllComponents(RouterLinkStub)).toHaveLength(0)
  })
})
