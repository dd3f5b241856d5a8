import type { Command } from 'commander'
import {
  FORM_NAMES,
  type FormName,
  formsOfKind,
  type FormRanking,
  rankForms,
  termLimits,
} from '../../shared/forms'
import type { CoordinateKind } from '../../shared/histogram'
import { DEFAULT_INVERSION_SETTINGS, invert, type WarningCode } from '../../shared/inversion'
import {
  distributionCommand,
  type DistributionOptions,
  inefficiencyOption,
  readDistribution,
} from './distribution-options'
import { rankingJson } from './fit-json'
import { fitReport } from './fit-report'
import type { Output } from './output'
import { oneOf, wholeNumber } from './parse-options'
import { type Input, readInput } from './read-input'
import { withFileName } from './refused-file'
import { UsageError } from './usage-error'

interface FitOptions extends DistributionOptions {
  readonly inefficiency?: number
  readonly form?: FormName
  readonly terms?: number
  readonly json?: boolean
}

/** Doubts of the inversion that concern the distribution itself, and so the forms as well. */
const ABOUT_THE_DATA: readonly WarningCode[] = [
  'COUNTS_TAKEN_AS_INDEPENDENT',
  'FEW_SAMPLES',
  'UNIT_DOUBTFUL',
  'BOND_AT_ZERO',
  'BINS_UNEQUAL',
  'BINS_TOO_WIDE',
  'JACOBIAN_TWICE',
]

const JSON_HELP = `
The JSON holds fits, by ascending AIC, each with form, terms, formula, parameters {name, value, standardError, unit, atBound},
freeParameters, aic, deltaAic, goodness {chiSquare, freedom} and largestDeviation {value in kT, coordinate}; and refused, each
with form, code and message. Null stands for what nobody can know without a sample size.`

/** `beadwright fit`: analytic forms for one distribution, ranked. */
export function fitCommand(output: Output): Command {
  return distributionCommand('fit')
    .description('Fit analytic forms to the distribution of a bond, angle or dihedral and rank them by AIC.')
    .addOption(inefficiencyOption())
    .option('--form <name>', `print one form only: ${FORM_NAMES.join(', ')}`, oneOf(FORM_NAMES))
    .option(
      '--terms <n>',
      'number of cosines or Gaussians of --form (default: chosen by AIC)',
      wholeNumber(1),
    )
    .option('--json', 'print JSON instead of a report')
    .addHelpText('after', JSON_HELP)
    .action((file: string, options: FitOptions) => {
      withFileName(file, () => output.print(ranked(readInput(file), options, output)))
    })
}

function ranked(input: Input, options: FitOptions, output: Output): string {
  const { kind, temperature, form, energyUnit, inefficiency = null } = options
  checkForm(kind, options)
  const { histogram, unit } = readDistribution(input, options, output)
  const { potential: reference, warnings } = invert(histogram, temperature, {
    ...DEFAULT_INVERSION_SETTINGS,
    inefficiency,
  })
  const terms = form !== undefined && options.terms !== undefined ? { [form]: options.terms } : {}
  const ranking = rankForms(histogram, temperature, { terms, reference, inefficiency })
  const doubts = [...warnings.filter(({ code }) => ABOUT_THE_DATA.includes(code)), ...ranking.warnings]
  doubts.forEach(({ code, message, action }) => output.note(`${code}: ${message} ${action}`))
  const units = { coordinate: unit, energy: energyUnit }
  const json = rankingJson(only(ranking, form), units, input, doubts)
  return options.json ? `${JSON.stringify(json, null, 2)}\n` : fitReport(json)
}

/** The ranking with one form; its ΔAIC stays that among all. */
function only(ranking: FormRanking, form: FormName | undefined): FormRanking {
  if (form === undefined) return ranking
  return { ...ranking, candidates: ranking.candidates.filter((candidate) => candidate.form === form) }
}

function checkForm(kind: CoordinateKind, { form, terms }: FitOptions): void {
  const allowed = formsOfKind(kind)
  if (form !== undefined && !allowed.includes(form)) {
    throw new UsageError(
      `The forms of ${kind === 'angle' ? 'an' : 'a'} ${kind} are ${allowed.join(', ')}, not ${form}.`,
    )
  }
  if (terms === undefined) return
  if (form === undefined) throw new UsageError('Say with --form which form has this number of terms.')
  const limits = termLimits(form)
  if (limits !== null && terms >= limits.least && terms <= limits.most) return
  const has = limits === null ? 'no number of terms' : `${limits.least} to ${limits.most} terms`
  throw new UsageError(`The form ${form} has ${has}, not ${terms}.`)
}
