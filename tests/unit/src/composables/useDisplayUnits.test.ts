import { beforeEach, describe, expect, it } from 'vitest'
import { nextTick } from 'vue'
import { HOUSE_DEFAULTS } from '@shared/contracts/group'
import { useDisplayUnits } from '@/composables/useDisplayUnits'
import { useSessionStore } from '@/stores/session'
import { freshStores } from '../../../support/mount'

beforeEach(() => {
  freshStores()
})

const setGroupUnits = (units: typeof HOUSE_DEFAULTS.units): void => {
  const session = useSessionStore()
  const [membership] = session.memberships
  const memberships = [{ ...membership, defaults: { ...HOUSE_DEFAULTS, units } }]
  if (session.user) session.user = { ...session.user, memberships }
}

describe('useDisplayUnits', () => {
  it('proposes nanometres, degrees and kJ/mol', () => {
    expect(useDisplayUnits()).toEqual({ length: 'nm', angle: 'degree', energy: 'kJ/mol' })
  })

  it('remembers a choice on this device', async () => {
    useDisplayUnits().energy = 'kT'
    await nextTick()
    expect(useDisplayUnits().energy).toBe('kT')
  })

  it('begins with the units of the group, and lets this device choose others', async () => {
    setGroupUnits({ length: 'angstrom', angle: 'radian', energy: 'kcal/mol' })
    expect(useDisplayUnits()).toEqual({ length: 'angstrom', angle: 'radian', energy: 'kcal/mol' })
    useDisplayUnits().length = 'nm'
    await nextTick()
    expect(useDisplayUnits()).toMatchObject({ length: 'nm', angle: 'radian' })
  })

  it('takes a kept unit that nobody knows as not chosen', () => {
    localStorage.setItem('beadwright.angle-unit', 'gradian')
    expect(useDisplayUnits().angle).toBe('degree')
  })
})
