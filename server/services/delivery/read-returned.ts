import {
  guessIntakeSettings,
  guessJointIntakeSettings,
  histogramFromTable,
  jointHistogramFromTable,
  readColumns,
} from '../../../shared/intake'
import { type CoordinateKind, unitWord } from '../../../shared/units'

const LAYOUTS = {
  centre: 'bin centres',
  edges: 'bin edges',
  samples: 'raw samples',
  grid: 'cells of a grid',
} as const

/**
 * Whether a file that came back can be read as a distribution, as the intake would read it when nobody says more.
 *
 * @param kinds of the table: one coordinate or two
 * @returns how it was read, in a line: "bin centres in nm with count, 100 bins"
 * @throws {InvalidInputError} what the reader refuses, with line and column
 */
export function readReturned(text: string, kinds: readonly CoordinateKind[]): string {
  const table = readColumns(text)
  if (kinds.length === 1) {
    const { settings } = guessIntakeSettings(table, kinds[0])
    const { histogram } = histogramFromTable(table, settings)
    return words(settings, unitWord(settings.unit), `${histogram.weights.length} bins`)
  }
  const { settings } = guessJointIntakeSettings(table, [kinds[0], kinds[1]])
  const { histogram } = jointHistogramFromTable(table, settings)
  const [x, y] = [histogram.xEdges.length - 1, histogram.yEdges.length - 1]
  return words(settings, settings.units.map(unitWord).join(' and '), `${x} by ${y} bins`)
}

function words(
  { layout, value }: { readonly layout: keyof typeof LAYOUTS; readonly value: string },
  units: string,
  bins: string,
): string {
  return `${LAYOUTS[layout]} in ${units}${layout === 'samples' ? '' : ` with ${value}`}, ${bins}`
}
