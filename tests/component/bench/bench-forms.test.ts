import { mount, type VueWrapper } from '@vue/test-utils'
import { describe, expect, it } from 'vitest'
import { createVuetify } from 'vuetify'
import { dihedralFlatness } from '@shared/flatness'
import { DEFAULT_INVERSION_SETTINGS, type InversionSettings } from '@shared/inversion'
import BenchFlatness from '@/components/bench/BenchFlatness.vue'
import BenchForms from '@/components/bench/BenchForms.vue'
import BenchMoreSettings from '@/components/bench/BenchMoreSettings.vue'
import { runRanking } from '@/workers/inversion-task'
import {
  angleCounts,
  countsOf,
  dihedralCounts,
  evenEdges,
  inverted,
  TEMPERATURE,
  withoutSampleSize,
} from '../../unit/src/components/bench/distributions'

const rankingOf = (histogram = angleCounts()) =>
  runRanking({
    histogram,
    temperature: TEMPERATURE,
    settings: DEFAULT_INVERSION_SETTINGS,
    basinDepth: 0.5,
    flatBelow: 0.5,
  }).answer!
const words = (text: string): string => text.replace(/\s+/g, ' ').trim()

describe('BenchForms', () => {
  const forms = (change: Partial<InstanceType<typeof BenchForms>['$props']> = {}) =>
    mount(BenchForms, {
      props: {
        answer: rankingOf(),
        failure: '',
        chosen: null,
        coordinateUnit: 'degree',
        energyUnit: 'kJ/mol',
        decimals: 1,
        suffix: '°',
        readonly: false,
        ...change,
      },
    })
  const rowsOf = (wrapper: VueWrapper): string[][] =>
    wrapper.findAll('tbody tr').map((row) => row.findAll('th, td').map((cell) => words(cell.text())))

  it('ranks forms and table by AIC, the least of all 0, the table chosen until someone chooses', () => {
    const wrapper = forms()
    const rows = rowsOf(wrapper)
    expect(rows.map(([name]) => name)).toEqual(
      expect.arrayContaining(['table', 'harmonic', 'cosine-harmonic', 'one Gaussian in p/sin θ']),
    )
    const aic = rows.map(([, value]) => Number(value.replace(/\s/g, '')))
    expect(aic[0]).toBe(0)
    expect([...aic].sort((one, other) => one - other)).toEqual(aic)
    expect(rows.find(([name]) => name === 'table')?.[2]).toBe('–')
    expect(wrapper.find<HTMLInputElement>('.chosen input').element.checked).toBe(true)
    expect(wrapper.find('.chosen').text()).toContain('table')
  })

  it('chooses by a radio button, and back to the table', async () => {
    const wrapper = forms()
    const radio = (name: string) =>
      wrapper
        .findAll('tbody tr')
        .find((row) => words(row.find('th').text()) === name)!
        .find('input')
    await radio('harmonic').trigger('change')
    await radio('table').trigger('change')
    expect(wrapper.emitted('choose')).toEqual([['harmonic'], [null]])
  })

  it('says what a chosen form loses, with formula and parameters one step away', async () => {
    const wrapper = forms({ chosen: 'harmonic' })
    const lost = words(wrapper.find('.lost').text())
    expect(lost).toMatch(
      /^The table is written from this form\. It differs .* by up to [\d.]+ kT; its AIC is/,
    )
    expect(wrapper.text()).not.toContain('½')
    await wrapper.find('button[aria-expanded]').trigger('click')
    expect(wrapper.text()).toContain('U = ½ k (θ − θ0)²')
    // 60 (θ − 110°)² is k = 120 kJ/mol/rad² = 0.0366 kJ/mol/deg².
    expect(words(wrapper.find('section section').text())).toMatch(
      /k 0\.036\d+ ± 0\.000\d+ kJ\/mol\/deg².*θ0 1(09|10)\.\d+ ± 0\.\d+ °/,
    )
  })

  it('lists forms that do not fit with their reason, and says why there is no AIC', () => {
    const wrapper = forms({ answer: rankingOf(withoutSampleSize(angleCounts())) })
    expect(rowsOf(wrapper).every(([, aic]) => aic === '–')).toBe(true)
    expect(wrapper.text()).toContain('neither standard errors nor AIC')
    expect(wrapper.text()).toContain('Gaussians does not fit: The number of terms cannot be chosen')
  })

  it('says that it fits, or why it cannot', () => {
    expect(forms({ answer: null }).text()).toBe('Fitting the analytic forms …')
    expect(forms({ answer: null, failure: 'Too few bins.' }).text()).toBe('No forms: Too few bins.')
  })

  it('cannot be changed by someone who only reads', () => {
    const inputs = forms({ readonly: true }).findAll('input')
    expect(inputs.every((input) => input.attributes('disabled') !== undefined)).toBe(true)
  })
})

describe('BenchFlatness', () => {
  const card = (energy: (angle: number) => number, total: number): string => {
    const histogram = countsOf('dihedral', evenEdges(-Math.PI, Math.PI, 72), energy, total)
    const flatness = dihedralFlatness(inverted(histogram))
    return words(mount(BenchFlatness, { props: { flatness } }).text())
  }

  it('says that a flat dihedral may be dropped, with the numbers it rests on', () => {
    const text = card(() => 0, 1_000_000)
    expect(text).toContain('Flat: may be dropped')
    for (const part of ['Amplitude', 'against', 'nats', 'Likelihood ratio, p']) expect(text).toContain(part)
  })

  it('keeps one that is not, and leaves open what the samples do not decide', () => {
    expect(card((angle) => 3 * (1 + Math.cos(3 * angle)), 200_000)).toContain('Keep this dihedral')
    expect(card((angle) => 0.8 * Math.cos(angle), 2000)).toContain('not decided')
  })

  it('asks for the sample size where nobody stated it', () => {
    const flatness = dihedralFlatness(inverted(withoutSampleSize(dihedralCounts())))
    expect(mount(BenchFlatness, { props: { flatness } }).text()).toContain('not stated')
  })
})

describe('BenchMoreSettings', () => {
  const more = (settings: Partial<InversionSettings> = {}, kind: 'angle' | 'dihedral' = 'angle') =>
    mount(BenchMoreSettings, {
      props: {
        kind,
        settings: { ...DEFAULT_INVERSION_SETTINGS, ...settings },
        energyUnit: 'kcal/mol',
        temperature: TEMPERATURE,
        readonly: false,
        refusal: { field: 'cap', message: 'The cap must be an energy above 0.' },
      },
      global: { plugins: [createVuetify()] },
    })
  const enter = async (wrapper: ReturnType<typeof more>, index: number, text: string): Promise<void> => {
    const input = wrapper.findAll('input[type=text][inputmode=decimal]')[index]
    await input.trigger('focus')
    await input.setValue(text)
    await input.trigger('keydown', { key: 'Enter' })
  }

  it('takes stiffness, cap in the unit shown, and the slope at 180°', async () => {
    const wrapper = more()
    await enter(wrapper, 0, '1.5')
    await enter(wrapper, 1, '10')
    const choice = wrapper.findComponent({ name: 'BaseChoice' }) as unknown as VueWrapper
    choice.vm.$emit('update:modelValue', 'level')
    const changes = wrapper.emitted<[Partial<InversionSettings>]>('change')!.map(([change]) => change)
    expect(changes[0]).toEqual({ tails: { stiffness: 1.5 } })
    expect(changes[1].table?.cap).toBeCloseTo(41.84, 9)
    expect(changes[2]).toEqual({ straightAngle: 'level' })
    expect(wrapper.find('[role=alert]').text()).toBe('The cap must be an energy above 0.')
  })

  it('offers only the cap for a dihedral, and says that a form has its own ends', () => {
    expect(more({}, 'dihedral').text()).not.toContain('Slope')
    expect(more({ form: 'harmonic' }).text()).toContain('are those of the form')
  })
})
