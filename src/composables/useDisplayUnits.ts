import { reactive } from 'vue'
import { useLocalStorage } from '@vueuse/core'
import type { AngleUnit, EnergyUnit, LengthUnit } from '@shared/units'

/** The units a person reads in. */
export interface DisplayUnitChoice {
  length: LengthUnit
  angle: AngleUnit
  energy: EnergyUnit
}

/** The units a person reads in, kept in the browser: a preference of this device, not of the data. */
export function useDisplayUnits(): DisplayUnitChoice {
  return reactive({
    length: useLocalStorage<LengthUnit>('beadwright.length-unit', 'nm'),
    angle: useLocalStorage<AngleUnit>('beadwright.angle-unit', 'degree'),
    energy: useLocalStorage<EnergyUnit>('beadwright.energy-unit', 'kJ/mol'),
  })
}
