import { beforeEach, describe, expect, it } from 'vitest'
import { nextTick } from 'vue'
import { useDisplayUnits } from '@/composables/useDisplayUnits'

beforeEach(() => localStorage.clear())

describe('useDisplayUnits', () => {
  it('proposes nanometres, degrees and kJ/mol', () => {
    expect(useDisplayUnits()).toEqual({ length: 'nm', angle: 'degree', energy: 'kJ/mol' })
  })

  it('remembers a choice on this device', async () => {
    useDisplayUnits().energy = 'kT'
    await nextTick()
    expect(useDisplayUnits().energy).toBe('kT')
  })

  it('takes a kept unit that nobody knows as not chosen', () => {
    localStorage.setItem('beadwright.angle-unit', 'gradian')
    expect(useDisplayUnits().angle).toBe('degree')
  })
})
