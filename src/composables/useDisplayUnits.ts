import { reactive, type Ref } from 'vue'
import { useLocalStorage } from '@vueuse/core'
import { ENERGY_UNITS, unitsOfKind, type AngleUnit, type EnergyUnit, type LengthUnit } from '@shared/units'

/** The units a person reads in. */
export interface DisplayUnitChoice {
  length: LengthUnit
  angle: AngleUnit
  energy: EnergyUnit
}

/** The units a person reads in, kept in the browser: a preference of this device, not of the data. */
export function useDisplayUnits(): DisplayUnitChoice {
  return reactive({
    length: remembered<LengthUnit>('length', unitsOfKind('bond')),
    angle: remembered<AngleUnit>('angle', unitsOfKind('angle')),
    energy: remembered<EnergyUnit>('energy', ENERGY_UNITS),
  })
}

/** One choice among units. What the browser kept and nobody knows any more counts as not chosen: the first one holds. */
function remembered<Unit extends string>(name: string, units: readonly string[]): Ref<Unit> {
  const first = units[0] as Unit
  return useLocalStorage<Unit>(`beadwright.${name}-unit`, first, {
    writeDefaults: false,
    serializer: {
      read: (kept) => (units.includes(kept) ? (kept as Unit) : first),
      write: (unit) => unit,
    },
  })
}
