import { Command } from 'commander'
import { BASIN_DEVIATIONS, LEAST_BASIN_DEPTH } from '../../shared/basins'
import { correlate, DEFAULT_SEED } from '../../shared/correlation'
import type { CoordinateKind, JointHistogram } from '../../shared/histogram'
import {
  guessJointIntakeSettings,
  jointHistogramFromTable,
  type JointIntakeSettings,
  readColumns,
} from '../../shared/intake'
import { DEFAULT_JOINT_ROWS, JOINT_ROWS } from '../../shared/joint-potential'
import { type CoordinateUnit, ENERGY_UNITS, type EnergyUnit, unitsOfKind } from '../../shared/units'
import { correlationJson } from './correlation-json'
import { correlationReport } from './correlation-report'
import { jointTableText } from './joint-table-text'
import { type Output, writeText } from './output'
import { type JointColumnChoice, jointColumns } from './parse-columns'
import { oneOf, pairOf, positiveNumber, rowPair, wholeNumber } from './parse-options'
import { type Input, readInput } from './read-input'
import { withFileName } from './refused-file'
import { UsageError } from './usage-error'

interface CorrelateOptions {
  readonly kinds: [CoordinateKind, CoordinateKind]
  readonly units: [CoordinateUnit, CoordinateUnit]
  readonly columns?: JointColumnChoice
  readonly independentSamples?: number
  readonly basinDepth: number
  readonly seed: number
  readonly json?: boolean
  readonly jointTable?: string
  readonly temperature?: number
  readonly energyUnit: EnergyUnit
  readonly jointRows?: [number, number]
}

/** `beadwright correlate`: may two coordinates be treated one by one? */
export function correlateCommand(output: Output): Command {
  return new Command('correlate')
    .description('Judge from their joint distribution whether two terms need one joint potential.')
    .argument('<file>', 'text file with a histogram in long form or paired samples; - for standard input')
    .requiredOption(
      '--kinds <first,second>',
      'such as bond,angle',
      pairOf(['bond', 'angle', 'dihedral'] as const),
    )
    .requiredOption(
      '--units <first,second>',
      'such as nm,degree',
      pairOf(['nm', 'angstrom', 'degree', 'radian'] as const),
    )
    .option(
      '--columns <names>',
      'columns from the left: x,y,VALUE with VALUE count, density or probability; or x,y for paired samples; skip ' +
        'passes over a column (default: guessed)',
      jointColumns,
    )
    .option(
      '--independent-samples <n>',
      'number of independent samples the file stands for (default: the sum of the counts)',
      positiveNumber,
    )
    .option(
      '--basin-depth <kT>',
      'how deep a basin must be to count, in kT; it must also exceed twice its own error',
      positiveNumber,
      LEAST_BASIN_DEPTH,
    )
    .option('--seed <n>', 'seed of the unrelated tables', wholeNumber(0), DEFAULT_SEED)
    .option(
      '--json',
      'print JSON instead of a report; basins: {map, product, depth} holds the numbers of basins',
    )
    .option(
      '--joint-table <file>',
      'write the smoothed joint potential as a grid of energies and both forces; - prints it in place of the report. ' +
        'Needs --temperature',
    )
    .option('--temperature <K>', 'temperature of the samples in kelvin, for --joint-table', positiveNumber)
    .option(
      '--energy-unit <unit>',
      'kJ/mol, kcal/mol or kT, for --joint-table',
      oneOf(ENERGY_UNITS),
      'kJ/mol',
    )
    .option(
      '--joint-rows <first,second>',
      `rows of the joint table along both coordinates (default: ${DEFAULT_JOINT_ROWS.bond} for a bond, ` +
        `${DEFAULT_JOINT_ROWS.angle} for an angle or a dihedral)`,
      rowPair(JOINT_ROWS.low, JOINT_ROWS.high),
    )
    .action((file: string, options: CorrelateOptions) => {
      withFileName(file, () => correlated(readInput(file), options, output))
    })
}

function correlated(input: Input, options: CorrelateOptions, output: Output): void {
  const columnsOfFile = readColumns(input.text)
  const settings = jointSettings(guessJointIntakeSettings(columnsOfFile, options.kinds), options, output)
  const { histogram, notes } = jointHistogramFromTable(columnsOfFile, settings)
  notes.forEach((note) => output.note(note))
  writeJointTable(histogram, options, input, output)
  if (options.jointTable === '-') return
  const basinThreshold = { depth: options.basinDepth, deviations: BASIN_DEVIATIONS }
  const correlation = correlate(histogram, { seed: options.seed, basinThreshold })
  correlation.warnings.forEach(({ code, message, action }) => output.note(`${code}: ${message} ${action}`))
  const json = correlationJson(correlation, options.units, input)
  output.print(options.json ? `${JSON.stringify(json, null, 2)}\n` : correlationReport(json))
}

function writeJointTable(
  histogram: JointHistogram,
  { jointTable: path, temperature, ...options }: CorrelateOptions,
  input: Input,
  output: Output,
): void {
  if (path === undefined) return
  if (temperature === undefined) {
    throw new UsageError(
      'A joint table is an energy at a temperature: give --temperature with --joint-table.',
    )
  }
  writeText(path, jointTableText(histogram, { ...options, temperature }, input, output), output)
}

function jointSettings(
  guess: ReturnType<typeof guessJointIntakeSettings>,
  { kinds, units, columns, independentSamples }: CorrelateOptions,
  output: Output,
): JointIntakeSettings {
  kinds.forEach((kind, place) => {
    if (unitsOfKind(kind).includes(units[place])) return
    throw new UsageError(`The unit of a ${kind} is ${unitsOfKind(kind).join(' or ')}, not ${units[place]}.`)
  })
  if (columns === undefined) guess.reasons.slice(0, 1).forEach((reason) => output.note(`guessed: ${reason}`))
  return { ...guess.settings, ...columns, units, independentSamples: independentSamples ?? null }
}
