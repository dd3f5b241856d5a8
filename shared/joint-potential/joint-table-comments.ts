import { coordinateSentence, formatNumber, jacobianSentence } from '../tables'
import { coordinateFromInternal, unitWord } from '../units'
import type { JointPotential } from './joint-potential'
import type { JointSurface } from './joint-surface'
import type { JointTableUnits } from './joint-table'

/** What the comment lines of a joint table state; null leaves a line out. All of it comes in as an argument. */
export interface JointTableCommentInput {
  /** True when the data are made up, as in the demo. */
  readonly invented: boolean
  readonly polymer: string | null
  readonly mapping: string | null
  /** Names of both terms, e.g. 'B–E' and 'B–E–H'; null when the file stands for none. */
  readonly terms: readonly [x: string, y: string] | null
  /** Beads in the order each coordinate is measured. */
  readonly beadOrders: readonly [x: string, y: string] | null
  /** Anything else that names the state point, e.g. '1 bar, pure melt'. */
  readonly statePoint: string | null
  readonly units: JointTableUnits
  /** Sentences on coordinates and units for a layout that counts or scales in its own way; left out for those of `units`. */
  readonly wording?: { readonly x: string; readonly y: string; readonly units: string }
  readonly potential: Pick<
    JointPotential,
    'kinds' | 'temperature' | 'settings' | 'smoothing' | 'independentSamples' | 'warnings'
  > & {
    /** Where samples were seen along each axis, nm or rad. */
    readonly surface: { readonly axes: readonly Pick<JointSurface['axes'][number], 'populated'>[] }
  }
  /** Name and SHA-256 of the file the joint distribution came from. */
  readonly input: { readonly name: string; readonly sha256: string } | null
  /** SHA-256 of the rows as `formatJointRows` gives them. */
  readonly rowsSha256: string
}

/**
 * Comment lines of a joint table: what it is, what it was made from and how, and what it may be used for. Pure: the same
 * arguments give the same lines.
 *
 * @returns lines without the leading '# ', in a fixed order, without line breaks
 */
export function jointTableComments(input: JointTableCommentInput): string[] {
  const { terms, beadOrders, potential } = input
  const { kinds, temperature, warnings } = potential
  const lines = [
    input.invented && 'INVENTED data: made up for demonstration, not for use',
    line('polymer', input.polymer),
    line('mapping', input.mapping),
    line(
      'joint potential',
      terms && `${terms[0]} (x) with ${terms[1]} (y); it takes the place of both terms`,
    ),
    line('x', input.wording?.x ?? coordinateSentence(kinds[0])),
    line('y', input.wording?.y ?? coordinateSentence(kinds[1])),
    line('bead order', beadOrders && `x ${beadOrders[0]}; y ${beadOrders[1]}`),
    line(
      'state point',
      `${formatNumber(temperature)} K${input.statePoint === null ? '' : `, ${input.statePoint}`}`,
    ),
    line('units', input.wording?.units ?? unitSentence(input.units)),
    line('Jacobian', jacobians(potential)),
    line('smoothing', smoothingSentence(potential)),
    line('measured', measuredSentence(input)),
    line('input', input.input && `${input.input.name}, SHA-256 ${input.input.sha256}`),
    line('rows', `SHA-256 ${input.rowsSha256}, blank lines included`),
    ...warnings.map((warning) => line('warning', `${warning.code}: ${warning.message}`)),
    'Valid at this one state point only. Validate it in a simulation of your own before you rely on it.',
  ]
  return lines.filter((text) => text !== false).map((text) => text.replace(/\s+/g, ' ').trim())
}

function line(name: string, text: string | null | false): string | false {
  return text !== null && text !== false && `${name}: ${text}`
}

function unitSentence({ coordinateUnits, energyUnit }: JointTableUnits): string {
  const [x, y] = coordinateUnits.map(unitWord)
  const energy = unitWord(energyUnit)
  return `x in ${x}, y in ${y}, energy in ${energy}, xforce = -dE/dx in ${energy} per ${x}, yforce = -dE/dy in ${energy} per ${y}`
}

function jacobians({ settings, kinds }: JointTableCommentInput['potential']): string {
  if (!settings.jacobian) return 'off: cells divided by their area only'
  return `x ${jacobianSentence(kinds[0])}; y ${jacobianSentence(kinds[1])}`
}

function smoothingSentence({ smoothing, independentSamples }: JointTableCommentInput['potential']): string {
  const { criterion, log10Lambdas, effectiveDimension } = smoothing
  const choice =
    criterion === null ? 'chosen by hand' : `chosen by ${criterion === 'aic' ? 'AIC' : 'marginal likelihood'}`
  const [x, y] = log10Lambdas.map((value) => value.toFixed(2))
  const dimension = formatNumber(Number(effectiveDimension.toPrecision(3)))
  return `log10 lambda ${x} along x and ${y} along y, ${choice}; effective dimension ${dimension}; ${formatNumber(independentSamples)} independent samples`
}

function measuredSentence({ potential: { surface }, units }: JointTableCommentInput): string {
  const ranges = surface.axes.map(({ populated }, axis) => {
    const unit = units.coordinateUnits[axis]
    const [low, high] = populated.map((value) => formatNumber(coordinateFromInternal(value, unit)))
    return `${axis === 0 ? 'x' : 'y'} from ${low} to ${high} ${unitWord(unit)}`
  })
  return `${ranges.join(', ')}; beyond, and where no samples were seen, the surface is continued`
}
