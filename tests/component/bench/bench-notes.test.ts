import { mount, type VueWrapper } from '@vue/test-utils'
import { afterEach, describe, expect, it } from 'vitest'
import { createVuetify } from 'vuetify'
import { DEFAULT_INVERSION_SETTINGS, type InversionSettings } from '@shared/inversion'
import { formatNumber, formatRows } from '@shared/tables'
import BenchEvidence from '@/components/bench/BenchEvidence.vue'
import BenchSettings from '@/components/bench/BenchSettings.vue'
import BenchTable from '@/components/bench/BenchTable.vue'
import { coordinateNames, type DisplayUnits } from '@/components/figure/coordinate-names'
import { runInversion } from '@/workers/inversion-task'
import { angleCounts, TEMPERATURE, withoutSampleSize } from '../../unit/src/components/bench/distributions'
import { storedDistribution } from '../../unit/src/components/bench/stored-records'

const units: DisplayUnits = { length: 'nm', angle: 'degree', energy: 'kJ/mol' }
const names = coordinateNames('angle', units)
const open = (wrapper: VueWrapper, title: string): Promise<void> =>
  wrapper
    .findAll('button[aria-expanded]')
    .find((button) => button.text() === title)!
    .trigger('click')
const histogram = angleCounts()
const answer = runInversion({
  histogram,
  temperature: TEMPERATURE,
  settings: DEFAULT_INVERSION_SETTINGS,
  basinDepth: 0.5,
  flatBelow: 0.5,
}).answer!
const { inversion, table } = answer

afterEach(() => {
  document.body.innerHTML = ''
})

describe('BenchSettings', () => {
  const settings = (change: Partial<InstanceType<typeof BenchSettings>['$props']> = {}) =>
    mount(BenchSettings, {
      props: {
        kind: 'angle',
        settings: DEFAULT_INVERSION_SETTINGS,
        result: inversion.smoothing,
        automatic: inversion.smoothing.log10Lambda,
        sampleSizeKnown: true,
        energyUnit: 'kJ/mol',
        temperature: TEMPERATURE,
        refusal: null,
        readonly: false,
        ...change,
      },
      global: { plugins: [createVuetify()] },
    })
  const choose = (wrapper: ReturnType<typeof settings>, label: string, value: string): void => {
    const choices = wrapper.findAllComponents({ name: 'BaseChoice' }) as unknown as VueWrapper[]
    choices
      .find((choice) => (choice.props() as { label: string }).label === label)!
      .vm.$emit('update:modelValue', value)
  }

  it('shows the Jacobian by its formula, and switches it off', () => {
    const wrapper = settings()
    expect(wrapper.text()).toContain('sin θ, exact per bin')
    choose(wrapper, 'Jacobian', 'off')
    expect(wrapper.emitted('change')).toEqual([[{ jacobian: false }]])
  })

  it('takes over by hand where automatic smoothing sits', () => {
    const wrapper = settings()
    choose(wrapper, 'Smoothing', 'manual')
    choose(wrapper, 'Smoothing', 'aic')
    choose(wrapper, 'Smoothing', 'off')
    expect(wrapper.emitted('change')).toEqual([
      [{ smoothing: { mode: 'manual', log10Lambda: inversion.smoothing.log10Lambda } }],
      [{ smoothing: { mode: 'auto', criterion: 'aic' } }],
      [{ smoothing: { mode: 'off' } }],
    ])
  })

  it('offers no choice where the Jacobian is constant', () => {
    const wrapper = settings({ kind: 'dihedral' })
    expect(wrapper.text()).toContain('constant')
    expect(wrapper.text()).toContain('flat')
  })

  it('says why nothing is smoothed without a sample size', () => {
    const wrapper = settings({ sampleSizeKnown: false, result: null, automatic: null })
    expect(wrapper.text()).toContain('the number of independent samples is not stated')
    expect(wrapper.find('input[type=range]').attributes('disabled')).toBeDefined()
  })

  it('gives a reviewer words instead of controls', () => {
    const wrapper = settings({ readonly: true })
    expect(wrapper.findAllComponents({ name: 'BaseChoice' })).toHaveLength(0)
    expect(wrapper.find('input').exists()).toBe(false)
    expect(wrapper.text()).toContain('by likelihood')
  })
})

describe('BenchEvidence', () => {
  const evidence = (change: Partial<InstanceType<typeof BenchEvidence>['$props']> = {}) =>
    mount(BenchEvidence, {
      props: {
        distribution: storedDistribution(histogram),
        answer,
        temperature: TEMPERATURE,
        names,
        coordinateUnit: 'degree',
        decimals: 1,
        basinDepth: 0.5,
        inefficiency: null,
        readonly: false,
        sampleError: '',
        inefficiencyError: '',
        ...change,
      },
    })
  const plain = (text: string): string => text.replaceAll('\u00a0', ' ')

  it('states counts, inefficiency, dimension and where the potential is lowest', () => {
    const text = plain(evidence({ readonly: true }).text())
    const total = histogram.weights.reduce((sum, weight) => sum + weight, 0)
    expect(text).toContain(plain(total.toLocaleString('en-GB').replaceAll(',', ' ')))
    expect(text).toContain('20 000')
    expect(text).toMatch(/Inefficiency g\s*10\.00, from the stated samples/)
    expect(text).toContain(`${inversion.smoothing.effectiveDimension?.toFixed(1)} of 60 bins`)
    expect(text).toMatch(/Lowest U at\s*1(09|10)\.\d°/)
  })

  it('lets the number of independent samples be stated', async () => {
    const density = storedDistribution(withoutSampleSize(histogram))
    const wrapper = evidence({ distribution: density, answer: null })
    expect(wrapper.text()).toContain('none: a probability')
    const input = wrapper.find('input')
    expect(input.attributes('placeholder')).toBe('not stated')
    await input.trigger('focus')
    await input.setValue('500')
    await input.trigger('keydown', { key: 'Enter' })
    expect(wrapper.emitted('samples')).toEqual([[500]])
  })

  it('says that counts without a stated number are taken as independent', () => {
    const unstated = { ...histogram, independentSamples: null }
    const found = runInversion({
      histogram: unstated,
      temperature: TEMPERATURE,
      settings: DEFAULT_INVERSION_SETTINGS,
      basinDepth: 0.5,
      flatBelow: 0.5,
    }).answer
    const text = evidence({ distribution: storedDistribution(unstated), answer: found }).text()
    expect(text).toContain('1.00, taken as independent')
  })

  it('takes another inefficiency for these settings', async () => {
    const wrapper = evidence()
    await open(wrapper, 'State the sample size')
    const input = wrapper.findAll('input')[1]
    await input.trigger('focus')
    await input.setValue('7.5')
    await input.trigger('keydown', { key: 'Enter' })
    expect(wrapper.emitted('inefficiency')).toEqual([[7.5]])
  })

  it('asks for basins at another depth, and shows how their number falls with it', async () => {
    const wrapper = evidence()
    expect(wrapper.text()).toMatch(/deeper than 0\.5 kT\s*1/)
    await open(wrapper, 'Basins against depth')
    expect(wrapper.find('svg[role=img]').attributes('aria-label')).toMatch(/1 at 0\.5 kT/)
    const input = wrapper.find('input')
    await input.trigger('focus')
    await input.setValue('1')
    await input.trigger('keydown', { key: 'Enter' })
    expect(wrapper.emitted('depth')).toEqual([[1]])
  })
})

describe('BenchTable', () => {
  const shown = (change: Partial<InstanceType<typeof BenchTable>['$props']> = {}) =>
    mount(BenchTable, {
      props: {
        settings: DEFAULT_INVERSION_SETTINGS.table,
        table,
        names,
        coordinateUnit: 'degree',
        energyUnit: 'kJ/mol',
        reading: Math.PI / 2,
        readonly: false,
        refusal: null,
        ...change,
      },
    })
  const field = (wrapper: ReturnType<typeof shown>, label: string) =>
    wrapper
      .findAll('label')
      .find((each) => each.text() === label)!
      .element.parentElement!.querySelector('input')!

  it('shows the rows of the file, digit by digit', () => {
    const lines = formatRows(table, { coordinateUnit: 'degree', energyUnit: 'kJ/mol' })
      .trim()
      .split('\n')
      .map((line) => line.trim().split(/\s+/).map(Number).map(formatNumber).join(' '))
    const rows = shown().findAll('tbody tr')
    expect(rows).toHaveLength(7)
    for (const row of rows) {
      const cells = row.findAll('td').map((cell) => cell.text().replace('−', '-'))
      expect(lines).toContain(cells.join(' '))
    }
  })

  it('names the ends that hold while none are typed', () => {
    const wrapper = shown()
    expect(field(wrapper, 'From').placeholder).toBe('0')
    expect(field(wrapper, 'To').placeholder).toBe('180')
  })

  it('takes ends in the units shown and hands them on in internal ones', async () => {
    const wrapper = shown({ energyUnit: 'kcal/mol' })
    const type = async (label: string, text: string): Promise<InversionSettings['table']> => {
      const input = field(wrapper, label)
      input.dispatchEvent(new Event('focus'))
      input.value = text
      input.dispatchEvent(new Event('input'))
      input.dispatchEvent(new KeyboardEvent('keydown', { key: 'Enter' }))
      await wrapper.vm.$nextTick()
      return wrapper.emitted<[InversionSettings['table']]>('change')!.at(-1)![0]
    }
    expect((await type('From', '90')).low).toBeCloseTo(Math.PI / 2, 12)
    expect((await type('Rows', '500')).rows).toBe(500)
  })

  it('says at the field why the core refused it', () => {
    const wrapper = shown({ refusal: { field: 'high', message: 'The table must end above its start.' } })
    expect(wrapper.find('[role=alert]').text()).toBe('The table must end above its start.')
    expect(field(wrapper, 'To').getAttribute('aria-invalid')).toBe('true')
  })

  it('cannot be changed by someone who only reads', () => {
    expect(
      shown({ readonly: true })
        .findAll('input')
        .every((input) => input.attributes('disabled') !== undefined),
    ).toBe(true)
  })
})
