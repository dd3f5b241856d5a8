import type { CheckedFile } from './checked-file'
import { type LayoutCheck, shortNumber } from './layout-check'
import { forceSteps } from './printed-numbers'
import { writtenQuantities } from './written-quantities'

/** What energies and forces of two neighbouring rows may disagree by, in kT, besides `SHARE` of the step of the energy. */
const STEP_SLACK = 0.01
/** What they may disagree by over the whole domain, in kT. */
const SUM_SLACK = 0.05
/** A ten-thousandth of an energy matters to nobody. */
const SHARE = 1e-4

/** Whether the force column belongs to the energy column: step by step, and summed over the domain. */
export function forceChecks({ layout, printed }: CheckedFile): LayoutCheck[] {
  const written = writtenQuantities(layout)
  const hasForce = written.includes('force') || written.includes('derivative')
  if (!hasForce || !written.includes('energy')) return []
  const { energies, coordinates } = printed
  const gains = forceSteps(printed)
  let [worst, at, most] = [0, 0, 0]
  gains.forEach((gain, row) => {
    const step = energies[row + 1] - energies[row]
    most = Math.max(most, Math.abs(energies[row + 1]))
    const apart = Math.abs(gain - step) - SHARE * Math.abs(step)
    if (apart > worst) [worst, at] = [apart, row]
  })
  const sum = gains.reduce((total, gain) => total + gain, 0)
  const difference = energies[energies.length - 1] - energies[0]
  const rest = Math.abs(sum - difference)
  const sumOk = rest <= SUM_SLACK + SHARE * most
  return [
    {
      code: 'FORCE_CONSISTENT',
      ok: worst <= STEP_SLACK,
      message:
        worst <= STEP_SLACK
          ? `From row to row energies and forces agree within ${shortNumber(Math.max(worst, 1e-6), 1)} kT.`
          : `At ${shortNumber(coordinates[at])} energies and forces disagree by ${shortNumber(worst, 2)} kT from one row to the next. Write more rows or more digits.`,
    },
    {
      code: 'FORCE_SUM',
      ok: sumOk,
      message: sumOk
        ? `Summed over the rows the force gives the difference of energy between both ends, within ${shortNumber(Math.max(rest, 1e-6), 1)} kT.`
        : `Summed over the rows the force misses the difference of energy between both ends by ${shortNumber(rest, 2)} kT. Write more rows or more digits.`,
    },
  ]
}
