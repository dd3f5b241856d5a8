import { createHash } from 'node:crypto'
import { type Command, Option } from 'commander'
import { derivePotential, FORM_NAMES, type FormName } from '../../shared/forms'
import {
  DEFAULT_INVERSION_SETTINGS,
  type InversionSettings,
  SETTING_LIMITS,
  type SmoothingSettings,
  type StraightAngle,
} from '../../shared/inversion'
import { type BeyondTable, type Layout, type TableAbout, writeTableInLayout } from '../../shared/layouts'
import {
  formatRows,
  formatTable,
  makeTable,
  tableComments,
  tablePoint,
  type TableUnits,
} from '../../shared/tables'
import { coordinateToInternal, type CoordinateUnit, energyScale } from '../../shared/units'
import {
  distributionCommand,
  type DistributionOptions,
  inefficiencyOption,
  readDistribution,
} from './distribution-options'
import { inversionJson } from './inversion-json'
import type { Output } from './output'
import { number, numberWithin, oneOf, positiveNumber, smoothing, wholeNumber } from './parse-options'
import { type Input, readInput } from './read-input'
import { readLayout } from './read-layout'
import { withFileName } from './refused-file'
import { UsageError } from './usage-error'

interface InvertOptions extends DistributionOptions {
  readonly jacobian: 'on' | 'off'
  readonly smoothing: SmoothingSettings
  readonly inefficiency?: number
  readonly straightAngle: StraightAngle
  readonly tailStiffness: number
  readonly form?: FormName
  readonly cap?: number
  readonly rows: number
  readonly from?: number
  readonly to?: number
  readonly json?: boolean
  readonly layout?: string
}

/** `beadwright invert`: from the histogram of one coordinate to a table. */
export function invertCommand(output: Output): Command {
  const { table, smoothing: proposed, straightAngle, tails } = DEFAULT_INVERSION_SETTINGS
  const { low: softest, high: stiffest } = SETTING_LIMITS.tailStiffness
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
    .addOption(inefficiencyOption())
    .option(
      '--straight-angle <free|level>',
      'leave the slope of an angle at 180 degrees to the data, or make it vanish there',
      oneOf(['free', 'level'] as const),
      straightAngle,
    )
    .option(
      '--tail-stiffness <x>',
      `least curvature of the tails in kT/variance of the data, ${softest} to ${stiffest}`,
      numberWithin(softest, stiffest),
      tails.stiffness,
    )
    .option(
      '--form <name>',
      `write the table of an analytic form: ${FORM_NAMES.join(', ')} (default: the smoothed curve)`,
      oneOf(FORM_NAMES),
    )
    .option('--cap <e>', 'highest energy of the table, in --energy-unit (default: none)', positiveNumber)
    .option('--rows <n>', 'rows of the table', wholeNumber(SETTING_LIMITS.rows.low), table.rows)
    .option('--from <x>', 'first coordinate of the table, in --unit', number)
    .option('--to <x>', 'last coordinate of the table, in --unit', number)
    .option('--layout <file>', 'write the table as a layout file says, in its units (docs/layouts.md)')
    .option('--json', 'print JSON instead of the table')
    .action((file: string, options: InvertOptions) => {
      if (options.layout !== undefined && options.json) {
        throw new UsageError('Choose one of --layout and --json: a layout may write JSON of its own.')
      }
      const layout = options.layout === undefined ? null : readLayout(options.layout)
      withFileName(file, () => output.print(inverted(readInput(file), layout, options, output)))
    })
}

function inverted(input: Input, layout: Layout | null, options: InvertOptions, output: Output): string {
  const { histogram, sampleInefficiency, unit } = readDistribution(input, options, output)
  const settings = inversionSettings(options, unit)
  const { inversion, form } = derivePotential(histogram, options.temperature, settings)
  const table = makeTable(inversion.potential, settings.table)
  const units: TableUnits = { coordinateUnit: unit, energyUnit: options.energyUnit }
  const remarks = [...inversion.warnings, ...inversion.notes]
  remarks.forEach(({ code, message, action }) => output.note(`${code}: ${message} ${action}`))
  if (options.json) {
    const evidence = { histogram, sampleInefficiency, form, input }
    return `${JSON.stringify(inversionJson(inversion, evidence, table, units), null, 2)}\n`
  }
  const about: TableAbout['comments'] = {
    invented: false,
    polymer: null,
    mapping: null,
    term: null,
    kind: options.kind,
    beadOrder: null,
    temperature: options.temperature,
    statePoint: null,
    settings,
    smoothing: inversion.smoothing,
    form,
    independentSamples: inversion.independentSamples,
    inefficiency: inversion.inefficiency,
    warnings: inversion.warnings,
    input,
    savedOn: null,
  }
  if (layout !== null) {
    const beyond: BeyondTable = (coordinate) =>
      tablePoint(inversion.potential, settings.table.cap, coordinate)
    const content = { comments: about, repeatUnit: null, types: [], handOver: null }
    let text = ''
    withFileName(options.layout ?? '', () => {
      text = writeTableInLayout(table, layout, content, sha256, beyond)
    })
    return text
  }
  const comments = tableComments({ ...about, units, rowsSha256: sha256(formatRows(table, units)) })
  return formatTable(table, units, comments)
}

const sha256 = (text: string): string => createHash('sha256').update(text).digest('hex')

function inversionSettings(options: InvertOptions, unit: CoordinateUnit): InversionSettings {
  const bound = (value: number | undefined) =>
    value === undefined ? null : coordinateToInternal(value, unit)
  const cap = options.cap && options.cap / energyScale(options.energyUnit, options.temperature)
  return {
    ...DEFAULT_INVERSION_SETTINGS,
    jacobian: options.jacobian === 'on',
    smoothing: options.smoothing,
    inefficiency: options.inefficiency ?? null,
    straightAngle: options.straightAngle,
    tails: { stiffness: options.tailStiffness },
    form: options.form ?? null,
    table: { rows: options.rows, low: bound(options.from), high: bound(options.to), cap: cap ?? null },
  }
}
