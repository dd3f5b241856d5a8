import { curveBasins } from '../../../shared/basins'
import { InvalidInputError } from '../../../shared/errors'
import { derivePotential } from '../../../shared/forms'
import { MAPPING_CHANGED } from '../../../shared/hand-over'
import {
  DEFAULT_JOINT_SETTINGS,
  DEFAULT_JOINT_TABLE,
  jointPotential,
  jointTable,
} from '../../../shared/joint-potential'
import { straightAngleWarnings, type Warning } from '../../../shared/inversion'
import { anglesOf } from '../../../shared/mapping'
import { makeTable } from '../../../shared/tables'
import type { StatePoint } from '../../entities/state-point.entity'
import type { WarningAnswer } from '../../entities/warning-answer.entity'
import { jointHistogramOf } from '../histograms'
import type { ContentPair, ContentTerm, HandOverContent } from './content'
import { jointBasis } from './content-hash'
import { remembered } from './remembered'
import { curveSilhouette, gridSilhouette } from './table-silhouette'

/** A doubt about a table, and why it is kept if somebody said so. */
export interface AnsweredWarning {
  readonly code: string
  readonly message: string
  readonly action: string
  readonly answer: WarningAnswer | null
}

/** What a reviewer looks at of a table, small enough to be kept: nothing in it is needed to write the file. */
export interface TableEvidence {
  /** Why the core makes no table; null where it does. All else is empty then. */
  readonly refused: string | null
  /** Ascending bounds of the table, for each axis; nm or rad. */
  readonly domain: readonly (readonly [number, number])[]
  /** For each axis. */
  readonly rows: readonly number[]
  readonly lowestAt: readonly number[]
  readonly silhouette: readonly number[]
  readonly independentSamples: number | null
  readonly inefficiency: number | null
  /** Number of basins; null where nobody can count them without a number of samples. */
  readonly basins: number | null
  /** The form in the table and its largest distance from the smooth curve in kT; null without one. */
  readonly form: { readonly name: string; readonly deviation: number | null } | null
  readonly warnings: readonly Omit<AnsweredWarning, 'answer'>[]
}

const REFUSED: Omit<TableEvidence, 'refused'> = {
  domain: [],
  rows: [],
  lowestAt: [],
  silhouette: [],
  independentSamples: null,
  inefficiency: null,
  basins: null,
  form: null,
  warnings: [],
}

type Derivable = Pick<ContentTerm, 'input' | 'settings'>

const ofTerm = remembered(({ term, statePoint }: { term: Derivable; statePoint: StatePoint }) =>
  orRefused(() => termEvidence(term, statePoint)),
)
const ofPair = remembered(({ pair, statePoint }: { pair: ContentPair; statePoint: StatePoint }) =>
  orRefused(() => pairEvidence(pair, statePoint)),
)

/** The evidence of a term's table; null when none is saved, or its data have changed since. */
export function evidenceOfTerm(term: ContentTerm, { statePoint }: HandOverContent): TableEvidence | null {
  if (term.basis === null || term.stale || term.input === null) return null
  return ofTerm(term.basis, { term, statePoint })
}

/** The evidence of the joint table of two terms. */
export function evidenceOfPair(pair: ContentPair, { statePoint }: HandOverContent): TableEvidence {
  return ofPair(`${jointBasis(pair.joint)} ${statePoint.temperature}`, { pair, statePoint })
}

/** Warnings of a term's table with their answers, among them that its data do not fit the mapping. */
export function warningsOfTerm(term: ContentTerm, content: HandOverContent): AnsweredWarning[] {
  const evidence = evidenceOfTerm(term, content)
  const own = evidence?.warnings ?? []
  return answered([...own, ...nearStraight(term, content), ...unfitData(term)], term.answers)
}

/** A dihedral is in doubt where the angles it is made of are often straight, whether they are handed over or not. */
function nearStraight({ term }: ContentTerm, { terms }: HandOverContent): Warning[] {
  const angles = anglesOf(
    term,
    terms.map((each) => each.term),
  )
  return straightAngleWarnings(
    terms.flatMap(({ term: other, input }) => (input && angles.includes(other) ? [input.histogram] : [])),
  )
}

/** Warnings of a joint table with their answers. */
export function warningsOfPair(pair: ContentPair, content: HandOverContent): AnsweredWarning[] {
  const { warnings } = evidenceOfPair(pair, content)
  return answered([...warnings, ...unfitData(pair)], pair.answers)
}

function answered(
  warnings: readonly Omit<AnsweredWarning, 'answer'>[],
  answers: readonly WarningAnswer[],
): AnsweredWarning[] {
  return warnings.map((warning) => ({
    ...warning,
    answer: answers.find(({ code }) => code === warning.code) ?? null,
  }))
}

function unfitData({ unfit }: Pick<ContentTerm, 'unfit'>): Omit<AnsweredWarning, 'answer'>[] {
  if (unfit === null) return []
  return [
    {
      code: MAPPING_CHANGED,
      message: `${unfit} The data belong to beads as they are no more.`,
      action: 'Bring in data measured on the mapping as it is, or say why these still fit.',
    },
  ]
}

function termEvidence({ input, settings }: Derivable, { temperature }: StatePoint): TableEvidence {
  if (input === null || settings === null) throw new Error('A term without data or settings has no evidence.')
  const { inversion, form } = derivePotential(input.histogram, temperature, settings)
  const { potential, independentSamples } = inversion
  const table = makeTable(potential, settings.table)
  const last = table.coordinates.length - 1
  return {
    refused: null,
    domain: [[table.coordinates[0], table.coordinates[last]]],
    rows: [last + 1],
    lowestAt: [inversion.minimum.coordinate],
    silhouette: curveSilhouette(table),
    independentSamples,
    inefficiency: inversion.inefficiency?.value ?? null,
    basins: independentSamples === null ? null : curveBasins(potential).basins.length,
    form: form && { name: form.form, deviation: form.largestDeviation?.value ?? null },
    warnings: inversion.warnings,
  }
}

function pairEvidence({ joint }: ContentPair, { temperature }: StatePoint): TableEvidence {
  const potential = jointPotential(jointHistogramOf(joint), temperature, DEFAULT_JOINT_SETTINGS)
  const table = jointTable(potential.surface, DEFAULT_JOINT_TABLE)
  const ends = (axis: Float64Array): [number, number] => [axis[0], axis[axis.length - 1]]
  return {
    ...REFUSED,
    refused: null,
    domain: [ends(table.x), ends(table.y)],
    rows: [table.x.length, table.y.length],
    lowestAt: [potential.minimum.x, potential.minimum.y],
    silhouette: gridSilhouette(table),
    independentSamples: potential.independentSamples,
    warnings: potential.warnings,
  }
}

function orRefused(derive: () => TableEvidence): TableEvidence {
  try {
    return derive()
  } catch (error) {
    if (!(error instanceof InvalidInputError)) throw error
    return { ...REFUSED, refused: error.message }
  }
}
