import { Command, Option } from 'commander'
import type { CoordinateKind } from '../../shared/histogram'
import {
  distributionFromTable,
  guessIntakeSettings,
  type IntakeSettings,
  NO_BLOCK_FILES,
  readColumns,
} from '../../shared/intake'
import { SETTING_LIMITS } from '../../shared/inversion'
import { type CoordinateUnit, ENERGY_UNITS, type EnergyUnit, unitsOfKind } from '../../shared/units'
import type { Output } from './output'
import { type ColumnChoice, columns } from './parse-columns'
import { numberWithin, oneOf, positiveNumber } from './parse-options'
import { type Input, readInput } from './read-input'
import { UsageError } from './usage-error'

/** What every command on the distribution of one coordinate is told about its file. */
export interface DistributionOptions {
  readonly kind: CoordinateKind
  readonly temperature: number
  readonly unit?: CoordinateUnit
  readonly columns?: ColumnChoice
  readonly alreadyDivided?: boolean
  readonly independentSamples?: number
  readonly blocks?: readonly string[]
  readonly chains?: readonly string[]
  readonly energyUnit: EnergyUnit
}

/** A command on the distribution of one coordinate, with the options of `DistributionOptions`. */
export function distributionCommand(name: string): Command {
  return new Command(name)
    .argument('<file>', 'text file with a histogram or raw samples; - for standard input')
    .requiredOption('--kind <kind>', 'bond, angle or dihedral', oneOf(['bond', 'angle', 'dihedral'] as const))
    .requiredOption('--temperature <K>', 'temperature of the samples in kelvin', positiveNumber)
    .option(
      '--unit <unit>',
      'unit of the coordinate, in the file and in the result: nm, angstrom, degree or radian (default: guessed)',
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
      '--independent-samples <n>',
      'number of independent samples the file stands for (default: what --blocks and --chains say, else the counts)',
      positiveNumber,
    )
    .option(
      '--blocks <files...>',
      'files of 10 or more stretches of time, in their order, on the bins of the file',
    )
    .option('--chains <files...>', 'files of 10 or more single chains, on the bins of the file')
    .option('--energy-unit <unit>', 'kJ/mol, kcal/mol or kT', oneOf(ENERGY_UNITS), 'kJ/mol')
}

/** `--inefficiency`: the user's own statistical inefficiency. */
export function inefficiencyOption(): Option {
  const { low, high } = SETTING_LIMITS.inefficiency
  return new Option(
    '--inefficiency <g>',
    `statistical inefficiency that counts are divided by, at least ${low}; before --independent-samples`,
  ).argParser(numberWithin(low, high))
}

/**
 * The histogram of a file, and of its blocks and chains, as the options say, and guesses for what they leave open; both guesses and notes of the intake
 * are said on standard error.
 *
 * @throws {UsageError} when the unit does not belong to the kind
 * @throws {InvalidInputError} as the intake does
 */
export function readDistribution(input: Input, options: DistributionOptions, output: Output) {
  const columnsOfFile = readColumns(input.text)
  const intake = intakeSettings(guessIntakeSettings(columnsOfFile, options.kind), options, output)
  const named = (paths: readonly string[] = []) => paths.map(readInput)
  const { histogram, notes, sampleInefficiency } = distributionFromTable(
    columnsOfFile,
    { ...NO_BLOCK_FILES, time: named(options.blocks), chain: named(options.chains) },
    intake,
  )
  notes.forEach((note) => output.note(note))
  return { histogram, sampleInefficiency, unit: intake.unit }
}

function intakeSettings(
  guess: ReturnType<typeof guessIntakeSettings>,
  { kind, unit, columns, alreadyDivided, independentSamples }: DistributionOptions,
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
