import type { PreparedBins } from './prepared-bins'
import type { Warning } from './warning'

/** What a reader of the result should know although nothing speaks against it: counts nobody called correlated or not. */
export function inversionNotes({ inefficiency }: PreparedBins): Warning[] {
  if (inefficiency?.source !== 'assumed') return []
  return [
    {
      code: 'COUNTS_TAKEN_AS_INDEPENDENT',
      message:
        'Every count was taken as an independent sample. Successive frames of a simulation are not: the error band is then too narrow, by the root of the statistical inefficiency, and the curve follows noise.',
      action:
        'Add block files or one file per chain, or state the inefficiency or the number of independent samples.',
    },
  ]
}
