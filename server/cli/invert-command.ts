import { createHash } from 'node:crypto'
import { Command, Option } from 'commander'
import type { CoordinateKind } from '../../shared/histogram'
import {
  guessIntakeSettings,
  histogramFromTable,
  type IntakeSettings,
  readColumns,
} from '../../shared/intake'
import {
  DEFAULT_INVERSION_SETTINGS,
  invert,
  type InversionSettings,
  SETTING_LIMITS,
  type SmoothingSettings,
} from '../../shared/inversion'
import { formatRows, formatTable, makeTable, tableComments, type TableUnits } from '../../shared/tables'
import {
  coordinateToInternal,
  type CoordinateUnit,
  ENERGY_UNITS,
  type EnergyUnit,
  unitsOfKind,
} from '../../shared/units'
import { inversionJson } from './inversion-json'
import type { Output } from './output'
import { type ColumnChoice, columns } from './parse-columns'
import { number, oneOf, positiveNumber, smoothing, wholeNumber } from './parse-options'
import { type Input, readInput } from './read-input'
import { withFileName } from './refused-file'
import { UsageError } from './usage-error'

interface InvertOptions {
  readonly kind: CoordinateKind
  readonly temperature: number
  readonly unit?: CoordinateUnit
  readonly columns?: ColumnChoice
  readonly alreadyDivided?: boolean
  readonly jacobian: 'on' | 'off'
  readonly smoothing: SmoothingSettings
  readonly independentSamples?: number
  readonly energyUnit: EnergyUnit
  readonly rows: number
  readonly from?: number
  readonly to?: number
  readonly json?: boolean
}

/** `beadwright invert`: from the histogram of one coordinate to a table. */
export function invertCommand(output: Output): Command {
  const { table, smoothing: proposed } = DEFAULT_INVERSION_SETTINGS
  return new Command('invert')
    .description('Invert the distribution of a bond, angle or dihedral into a tabulated potential.')
    .argument('<file>', 'text file with a histogram or raw samples; - for standard input')
    .requiredOption('--kind <kind>', 'bond, angle or dihedral', oneOf(['bond', 'angle', 'dihedral'] as const))
    .requiredOption('--temperature <K>', 'temperature of the samples in kelvin', positiveNumber)
    .option(
      '--unit <unit>',
      'unit of the coordinate in the file and in the table: nm, angstrom, degree or radian (default: guessed)',
      oneOf(['nm', 'angstrom', 'degree', 'radian'] as const),
    )
    .option(
      '--columns <names>',
      'columns from the left: centre,VALUE or low,high,VALUE with VALUE count, density or probability; or sample; ' +
        'skip passes over a column (default: guessed)',
      columns,
    )
    .option('--already-divided', 'the file was divided by its Jacobian before')
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
    .option(
      '--independent-samples <n>',
      'number of independent samples the file stands for (default: the sum of the counts)',
      positiveNumber,
    )
    .option('--energy-unit <unit>', 'kJ/mol, kcal/mol or kT', oneOf(ENERGY_UNITS), 'kJ/mol')
    .option('--rows <n>', 'rows of the table', wholeNumber(SETTING_LIMITS.rows.low), table.rows)
    .option('--from <x>', 'first coordinate of the table, in --unit', number)
    .option('--to <x>', 'last coordinate of the table, in --unit', number)
    .option('--json', 'print JSON instead of the table')
    .action((file: string, options: InvertOptions) => {
      withFileName(file, () => output.print(inverted(readInput(file), options, output)))
    })
}

function inverted(input: Input, options: InvertOptions, output: Output): string {
  const columnsOfFile = readColumns(input.text)
  const intake = intakeSettings(guessIntakeSettings(columnsOfFile, options.kind), options, output)
  const { histogram, notes } = histogramFromTable(columnsOfFile, intake)
  notes.forEach((note) => output.note(note))
  const settings = inversionSettings(options, intake.unit)
  const inversion = invert(histogram, options.temperature, settings)
  const table = makeTable(inversion.potential, settings.table)
  const units: TableUnits = { coordinateUnit: intake.unit, energyUnit: options.energyUnit }
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

/** What the options say, and guesses, said on standard error, for what they leave open. */
function intakeSettings(
  guess: ReturnType<typeof guessIntakeSettings>,
  { kind, unit, columns, alreadyDivided, independentSamples }: InvertOptions,
  output: Output,
): IntakeSettings {
  if (unit !== undefined && !unitsOfKind(kind).includes(unit)) {
    throw new UsageError(`The unit of a ${kind} is ${unitsOfKind(kind).join(' or ')}, not ${unit}.`)
  }
  if (unit === undefined || columns === undefined) {
    guess.reasons.forEach((reason) => output.note(`guessed: ${reason}`))
  }
  return {
    ...guess.settings,
    ...columns,
    unit: unit ?? guess.settings.unit,
    alreadyDivided: alreadyDivided ?? false,
    independentSamples: independentSamples ?? null,
  }
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
