import { flushPromises, mount } from '@vue/test-utils'
import { describe, expect, it, vi } from 'vitest'
import { createVuetify } from 'vuetify'
import type { Decision } from '@shared/contracts/distribution'
import type { CorrelationVerdict } from '@shared/correlation'
import { ApiError } from '@/api/http'
import CorrelationDecision from '@/components/correlation/CorrelationDecision.vue'

const decision: Decision = {
  choice: 'separate',
  reason: 'The coupling sits where the chain never is.',
  decidedBy: { id: '00000000-0000-4000-8000-000000000000', name: 'Milo Ferrante' },
  decidedAt: '2026-06-12T09:30:00.000Z',
  numbers: {
    verdict: 'joint',
    mutualInformation: 0.55,
    mutualInformationCorrected: 0.4932,
    nullMean: 0.05,
    pValue: 0.005,
    independentSamples: 6466,
  },
}

function decide(props: { decision?: Decision; verdict?: CorrelationVerdict; readonly?: boolean } = {}) {
  const record = vi.fn(() => Promise.resolve())
  const wrapper = mount(CorrelationDecision, {
    props: { decision: null, verdict: 'joint', readonly: false, record, ...props },
    global: { plugins: [createVuetify()] },
    attachTo: document.body,
  })
  return { wrapper, record }
}

describe('CorrelationDecision', () => {
  it('records nothing without a choice and a reason, and says what is missing', async () => {
    const { wrapper, record } = decide()
    await wrapper.find('form').trigger('submit')
    await flushPromises()
    expect(record).not.toHaveBeenCalled()
    expect(wrapper.text()).toContain('Choose one of the three.')
    expect(wrapper.text()).toContain('Say in a few words why')
  })

  it('records the choice with its reason', async () => {
    const { wrapper, record } = decide()
    await wrapper.find('input[value="joint"]').setValue()
    await wrapper.find('textarea').setValue('Two conformers.')
    await wrapper.find('form').trigger('submit')
    await flushPromises()
    expect(record).toHaveBeenCalledWith({ choice: 'joint', reason: 'Two conformers.' })
  })

  it('says what it means to decide against the verdict, before it is recorded', async () => {
    const { wrapper } = decide({ verdict: 'joint' })
    expect(wrapper.text()).not.toContain('A joint potential is advised')
    await wrapper.find('input[value="separate"]').setValue()
    expect(wrapper.text()).toContain('A joint potential is advised')
  })

  it('shows who decided what, when, why and at which number', () => {
    const { wrapper } = decide({ decision })
    expect(wrapper.text()).toContain('Two tables, one by one')
    expect(wrapper.text()).toContain(decision.reason)
    expect(wrapper.text()).toContain('Milo Ferrante, 12 June 2026')
    expect(wrapper.text()).toContain('at 0.493 nats')
    expect(wrapper.find('form').exists()).toBe(false)
  })

  it('starts again from the decision on record', async () => {
    const { wrapper } = decide({ decision })
    await wrapper.find('button').trigger('click')
    expect(wrapper.find<HTMLInputElement>('input[value="separate"]').element.checked).toBe(true)
    expect(wrapper.find('textarea').element.value).toBe(decision.reason)
  })

  it('offers no form to those who only read', () => {
    const { wrapper } = decide({ readonly: true })
    expect(wrapper.find('form').exists()).toBe(false)
    expect(wrapper.text()).toContain('Nobody has decided yet.')
  })

  it('keeps what was typed when the server refuses, and says so', async () => {
    const { wrapper, record } = decide()
    record.mockRejectedValueOnce(new ApiError(503, { code: 'UNAVAILABLE', message: 'Try again.' }))
    await wrapper.find('input[value="joint"]').setValue()
    await wrapper.find('textarea').setValue('Two conformers.')
    await wrapper.find('form').trigger('submit')
    await flushPromises()
    expect(wrapper.text()).toContain('The decision was not recorded')
    expect(wrapper.find('textarea').element.value).toBe('Two conformers.')
  })
})
