import { createHash } from 'node:crypto'
import { type Command, Option } from 'commander'
import {
  DEFAULT_INVERSION_SETTINGS,
  invert,
  type InversionSettings,
  SETTING_LIMITS,
  type SmoothingSettings,
} from '../../shared/inversion'
import { formatRows, formatTable, makeTable, tableComments, type TableUnits } from '../../shared/tables'
import { coordinateToInternal, type CoordinateUnit } from '../../shared/units'
import { distributionCommand, type DistributionOptions, readDistribution } from './distribution-options'
import { inversionJson } from './inversion-json'
import type { Output } from './output'
import { number, oneOf, smoothing, wholeNumber } from './parse-options'
import { type Input, readInput } from './read-input'
import { withFileName } from './refused-file'

interface InvertOptions extends DistributionOptions {
  readonly jacobian: 'on' | 'off'
  readonly smoothing: SmoothingSettings
  readonly rows: number
  readonly from?: number
  readonly to?: number
  readonly json?: boolean
}

/** `beadwright invert`: from the histogram of one coordinate to a table. */
export function invertCommand(output: Output): Command {
  const { table, smoothing: proposed } = DEFAULT_INVERSION_SETTINGS
  return distributionCommand('invert')
    .description('Invert the distribution of a bond, angle or dihedral into a tabulated potential.')
    .option(
      '--jacobian <on|off>',
      'divide by the exact volume of each bin',
      oneOf(['on', 'off'] as const),
      'on',
    )
    .addOption(
      new Option(
        '--smoothing <auto|off|number>',
        'λ chosen by marginal likelihood, none, or λ itself (log10 λ is rounded to 0.01)',
      )
        .argParser(smoothing)
        .default(proposed, 'auto'),
    )
    .option('--rows <n>', 'rows of the table', wholeNumber(SETTING_LIMITS.rows.low), table.rows)
    .option('--from <x>', 'first coordinate of the table, in --unit', number)
    .option('--to <x>', 'last coordinate of the table, in --unit', number)
    .option('--json', 'print JSON instead of the table')
    .action((file: string, options: InvertOptions) => {
      withFileName(file, () => output.print(inverted(readInput(file), options, output)))
    })
}

function inverted(input: Input, options: InvertOptions, output: Output): string {
  const { histogram, unit } = readDistribution(input, options, output)
  const settings = inversionSettings(options, unit)
  const inversion = invert(histogram, options.temperature, settings)
  const table = makeTable(inversion.potential, settings.table)
  const units: TableUnits = { coordinateUnit: unit, energyUnit: options.energyUnit }
  inversion.warnings.forEach(({ code, message, action }) => output.note(`${code}: ${message} ${action}`))
  if (options.json) {
    return `${JSON.stringify(inversionJson(histogram, inversion, table, units, input), null, 2)}\n`
  }
  const comments = tableComments({
    invented: false,
    polymer: null,
    mapping: null,
    term: null,
    kind: options.kind,
    beadOrder: null,
    temperature: options.temperature,
    statePoint: null,
    units,
    settings,
    smoothing: inversion.smoothing,
    independentSamples: inversion.independentSamples,
    warnings: inversion.warnings,
    input,
    rowsSha256: createHash('sha256').update(formatRows(table, units)).digest('hex'),
    savedOn: null,
  })
  return formatTable(table, units, comments)
}

function inversionSettings(options: InvertOptions, unit: CoordinateUnit): InversionSettings {
  const bound = (value: number | undefined) =>
    value === undefined ? null : coordinateToInternal(value, unit)
  return {
    ...DEFAULT_INVERSION_SETTINGS,
    jacobian: options.jacobian === 'on',
    smoothing: options.smoothing,
    table: { rows: options.rows, low: bound(options.from), high: bound(options.to), cap: null },
  }
}
