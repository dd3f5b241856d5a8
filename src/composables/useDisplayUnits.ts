import { reactive, type Ref } from 'vue'
import { useLocalStorage } from '@vueuse/core'
import { ENERGY_UNITS, unitsOfKind, type AngleUnit, type EnergyUnit, type LengthUnit } from '@shared/units'
import { useGroupDefaults } from './useGroupDefaults'

/** The units a person reads in. */
export interface DisplayUnitChoice {
  length: LengthUnit
  angle: AngleUnit
  energy: EnergyUnit
}

/**
 * The units a person reads in, kept in the browser: a preference of this device, not of the data. Until they choose, the
 * group's hold.
 */
export function useDisplayUnits(): DisplayUnitChoice {
  const { units } = useGroupDefaults().value
  return reactive({
    length: remembered<LengthUnit>('length', unitsOfKind('bond'), units.length),
    angle: remembered<AngleUnit>('angle', unitsOfKind('angle'), units.angle),
    energy: remembered<EnergyUnit>('energy', ENERGY_UNITS, units.energy),
  })
}

/** One choice among units. What the browser kept and nobody knows any more counts as not chosen: the start value holds. */
function remembered<Unit extends string>(name: string, units: readonly string[], start: Unit): Ref<Unit> {
  return useLocalStorage<Unit>(`beadwright.${name}-unit`, start, {
    writeDefaults: false,
    serializer: {
      read: (kept) => (units.includes(kept) ? (kept as Unit) : start),
      write: (unit) => unit,
    },
  })
}
