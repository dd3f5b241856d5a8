import type { FormFit } from '../forms'
import type { AppliedInefficiency, InversionSettings, SmoothingResult, Warning } from '../inversion'
import { type CoordinateKind, unitWord } from '../units'
import { coordinateSentence, jacobianSentence } from './coordinate-sentences'
import { formatNumber } from './format-number'
import { deviationSentence, parameterSentence, plainLetters } from './form-sentences'
import { inefficiencySentence } from './inefficiency-sentence'
import type { TableUnits } from './table'

/** What the comment lines of a table state; null leaves a line out. All of it comes in as an argument. */
export interface TableCommentInput {
  /** True when the data are made up, as in the demo. */
  readonly invented: boolean
  readonly polymer: string | null
  readonly mapping: string | null
  /** Name of the term, e.g. 'B–E–H'; null when the file stands for none. */
  readonly term: string | null
  readonly kind: CoordinateKind
  /** Beads in the order the coordinate is measured, e.g. 'B(0) E(0) H(0)'. */
  readonly beadOrder: string | null
  /** K */
  readonly temperature: number
  /** Anything else that names the state point, e.g. '1 bar, pure melt'. */
  readonly statePoint: string | null
  readonly units: TableUnits
  /** Sentences on coordinate and units for a layout that counts or scales in its own way; left out for those of `units`. */
  readonly wording?: { readonly coordinate: string; readonly units: string }
  readonly settings: InversionSettings
  readonly smoothing: SmoothingResult
  /** The analytic form the rows are written from; null or left out for the smoothed curve. */
  readonly form?: FormFit | null
  readonly independentSamples: number | null
  /** What counts were divided by; null or left out for a density or a probability. */
  readonly inefficiency?: AppliedInefficiency | null
  readonly warnings: readonly Warning[]
  /** Name and SHA-256 of the file the distribution came from. */
  readonly input: { readonly name: string; readonly sha256: string } | null
  /** SHA-256 of the rows as `formatRows` gives them. */
  readonly rowsSha256: string
  /** When the inversion was saved, e.g. '2025-03-14'; null writes none. */
  readonly savedOn: string | null
}

/**
 * Comment lines of a table: what it is, what it was made from and how, and what it may be used for. Pure: the same
 * arguments give the same lines.
 *
 * @returns lines without the leading '# ', in a fixed order, without line breaks
 */
export function tableComments(input: TableCommentInput): string[] {
  const lines = [
    input.invented && 'INVENTED data: made up for demonstration, not for use',
    line('polymer', input.polymer),
    line('mapping', input.mapping),
    line('term', input.term),
    line('coordinate', input.wording?.coordinate ?? coordinateSentence(input.kind)),
    line('bead order', input.beadOrder),
    line('state point', statePoint(input)),
    line('units', input.wording?.units ?? unitSentence(input)),
    line(
      'Jacobian',
      input.settings.jacobian ? jacobianSentence(input.kind) : 'off: bins divided by their width only',
    ),
    line('smoothing', smoothingSentence(input)),
    line('inefficiency', input.inefficiency ? inefficiencySentence(input.inefficiency) : null),
    ...formLines(input),
    line('straight angle', straightAngleSentence(input)),
    line('tails', tailSentence(input)),
    line('cap', capSentence(input)),
    line('input', input.input && `${input.input.name}, SHA-256 ${input.input.sha256}`),
    line('rows', `SHA-256 ${input.rowsSha256}`),
    line('saved', input.savedOn),
    ...input.warnings.map((warning) => line('warning', `${warning.code}: ${warning.message}`)),
    'Valid at this one state point only. Validate it in a simulation of your own before you rely on it.',
  ]
  return lines.filter((text) => text !== false).map((text) => text.replace(/\s+/g, ' ').trim())
}

function line(name: string, text: string | null | false): string | false {
  return text !== null && text !== false && `${name}: ${text}`
}

function statePoint({ temperature, statePoint: rest }: TableCommentInput): string {
  return `${formatNumber(temperature)} K${rest === null ? '' : `, ${rest}`}`
}

function unitSentence({ units }: TableCommentInput): string {
  const [length, energy] = [unitWord(units.coordinateUnit), unitWord(units.energyUnit)]
  return `coordinate in ${length}, energy in ${energy}, force = -dE/dcoordinate in ${energy} per ${length}`
}

function smoothingSentence({ smoothing, independentSamples }: TableCommentInput): string {
  const samples =
    independentSamples === null
      ? 'number of independent samples unknown'
      : `${formatNumber(independentSamples)} independent samples`
  if (smoothing.log10Lambda === null || smoothing.effectiveDimension === null) return `none; ${samples}`
  const choice =
    smoothing.criterion === null
      ? 'chosen by hand'
      : `chosen by ${smoothing.criterion === 'aic' ? 'AIC' : 'marginal likelihood'}`
  const dimension = formatNumber(Number(smoothing.effectiveDimension.toPrecision(3)))
  return `log10 lambda ${smoothing.log10Lambda.toFixed(2)}, ${choice}; effective dimension ${dimension}; ${samples}`
}

function formLines({ form = null, units }: TableCommentInput): (string | false)[] {
  if (form === null) return []
  return [
    line(
      'form',
      `${form.form}, ${plainLetters(form.formula)}; the rows are this form, not the smoothed curve`,
    ),
    line('parameters', parameterSentence(form, units)),
    line('form deviates', deviationSentence(form, units)),
  ]
}

function straightAngleSentence({ kind, settings, form = null }: TableCommentInput): string | null {
  return form === null && kind === 'angle' && settings.straightAngle === 'level'
    ? 'made to level off at 180 deg'
    : null
}

function tailSentence({ kind, settings, form = null }: TableCommentInput): string | null {
  if (kind === 'dihedral' || form !== null) return null
  return `quadratic, curvature at least ${formatNumber(settings.tails.stiffness)} kT / variance of the data`
}

function capSentence({ settings, units }: TableCommentInput): string | null {
  if (settings.table.cap === null) return null
  return `energies level off at ${formatNumber(settings.table.cap)} kJ/mol${
    units.energyUnit === 'kJ/mol' ? '' : ` (shown in ${unitWord(units.energyUnit)})`
  }`
}
