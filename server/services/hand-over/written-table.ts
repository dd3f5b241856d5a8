import type { FrozenTableMeta, HandOverLayout } from '../../../shared/contracts/hand-over'
import { curveBasins } from '../../../shared/basins'
import { derivePotential, parametersInUnits, type FormFit } from '../../../shared/forms'
import {
  DEFAULT_JOINT_SETTINGS,
  DEFAULT_JOINT_TABLE,
  jointPotential,
  jointTable,
} from '../../../shared/joint-potential'
import type { Layout } from '../../../shared/layouts'
import { formatNumber, makeTable } from '../../../shared/tables'
import type { CoordinateKind } from '../../../shared/units'
import { jointHistogramOf } from '../histograms'
import { writeJointTableFile } from '../joint-table-file'
import { beadOrder, writeTableFile } from '../table-file'
import { jointTableFileName, nameInLayout, tableFileName } from '../table-names'
import { type ContentPair, type ContentTerm, type HandOverContent, joinedTerms } from './content'
import { warningsOfPair, warningsOfTerm } from './table-evidence'
import { curveSilhouette, gridSilhouette } from './table-silhouette'

/** A table of a hand-over with its file, as a release freezes it; internal units. */
export interface WrittenTable {
  readonly name: string
  /** Of the file; two tables may have asked for one name. */
  readonly path: string
  readonly text: string
  readonly kinds: readonly CoordinateKind[]
  readonly temperature: number
  readonly coordinates: Float64Array
  readonly secondCoordinates: Float64Array | null
  readonly energies: Float64Array
  readonly forces: Float64Array
  readonly secondForces: Float64Array | null
  readonly meta: FrozenTableMeta
  readonly silhouette: readonly number[]
}

/** How the tables are written: the layout, and the units that forms are stated in beside them. */
export interface WritingOptions extends Pick<HandOverLayout, 'length' | 'angle' | 'energy'> {
  readonly document: Layout
}

/** The names of all tables that a hand-over holds now, single ones in the order of terms, then joint ones. */
export function tableNames(content: HandOverContent): string[] {
  const { terms, pairs } = outgoing(content)
  return [...terms.map(({ name }) => name), ...pairs.map(pairName)]
}

/**
 * One table of a hand-over, by its name.
 *
 * @returns null when there is no table of that name
 * @throws {InvalidInputError} when the core refuses it
 */
export function writeTableNamed(
  content: HandOverContent,
  options: WritingOptions,
  name: string,
): WrittenTable | null {
  const { terms, pairs } = outgoing(content)
  const term = terms.find((each) => each.name === name)
  if (term) return writeTerm(term, content, options)
  const pair = pairs.find((each) => pairName(each) === name)
  return pair ? writePair(pair, content, options) : null
}

/** Two terms in the name of their joint table. */
export function pairName({ terms: [first, second] }: Pick<ContentPair, 'terms'>): string {
  return `${first.name} · ${second.name}`
}

/** What has a table of its own: terms with a saved potential that no joint table replaces, and pairs decided for one. */
function outgoing(content: HandOverContent): {
  terms: readonly ContentTerm[]
  pairs: readonly ContentPair[]
} {
  const joined = joinedTerms(content)
  return {
    terms: content.terms.filter(
      ({ term, leftOut, basis, stale }) =>
        leftOut === null && basis !== null && !stale && !joined.has(term.id),
    ),
    pairs: content.pairs.filter(({ together }) => together),
  }
}

function writeTerm(each: ContentTerm, content: HandOverContent, options: WritingOptions): WrittenTable {
  const { term, input, potential, settings } = each
  if (input === null || potential === null || settings === null)
    throw new Error('A table needs a saved potential.')
  const { polymer, mapping, statePoint, invented } = content
  const { savedAt } = potential
  const { placeNumber } = each
  const source = { polymer, mapping, statePoint, invented, term, placeNumber, input, settings, savedAt }
  const { text } = writeTableFile(source, options, options.document)
  const { inversion, form } = derivePotential(input.histogram, statePoint.temperature, settings)
  const table = makeTable(inversion.potential, settings.table)
  const { independentSamples } = inversion
  const { savedBy } = potential
  return {
    name: each.name,
    path: nameInLayout(
      tableFileName({ ...term, temperature: statePoint.temperature, placeNumber }),
      options.document,
    ),
    text,
    kinds: [term.kind],
    temperature: statePoint.temperature,
    coordinates: table.coordinates,
    secondCoordinates: null,
    energies: table.energies,
    forces: table.forces,
    secondForces: null,
    silhouette: curveSilhouette(table),
    meta: {
      version: 1,
      types: [term.types],
      beadOrders: [beadOrder(mapping, term)],
      settings,
      lowestAt: [inversion.minimum.coordinate],
      independentSamples,
      inefficiency: inversion.inefficiency?.value ?? null,
      basins: independentSamples === null ? null : curveBasins(inversion.potential).basins.length,
      form: form && formWords(form, term.kind, options),
      warnings: warningsOfTerm(each, content).map(frozenWarning),
      input: { name: input.file.name, sha256: input.file.sha256 },
      comments: commentLines(text),
      commentInput: {
        settings,
        smoothing: inversion.smoothing,
        form: form && { ...form, covariance: null },
        independentSamples,
        inefficiency: inversion.inefficiency,
      },
      savedBy: savedBy?.name ?? null,
      savedOn: savedAt.toISOString().slice(0, 10),
      reason: null,
    },
  }
}

function writePair(pair: ContentPair, content: HandOverContent, options: WritingOptions): WrittenTable {
  const { joint, file, decision } = pair
  const { polymer, mapping, statePoint, invented } = content
  const [x, y] = pair.terms.map(({ term }) => term)
  const placeNumbers = [pair.terms[0].placeNumber, pair.terms[1].placeNumber] as const
  const source = { polymer, mapping, statePoint, invented, terms: [x, y] as const, placeNumbers, joint, file }
  const { text } = writeJointTableFile(source, options, options.document)
  const potential = jointPotential(jointHistogramOf(joint), statePoint.temperature, DEFAULT_JOINT_SETTINGS)
  const table = jointTable(potential.surface, DEFAULT_JOINT_TABLE)
  return {
    name: pairName(pair),
    path: nameInLayout(
      jointTableFileName({ types: [x.types, y.types], temperature: statePoint.temperature, placeNumbers }),
      options.document,
    ),
    text,
    kinds: [x.kind, y.kind],
    temperature: statePoint.temperature,
    coordinates: table.x,
    secondCoordinates: table.y,
    energies: table.energies,
    forces: table.xForces,
    secondForces: table.yForces,
    silhouette: gridSilhouette(table),
    meta: {
      version: 1,
      types: [x.types, y.types],
      beadOrders: [beadOrder(mapping, x), beadOrder(mapping, y)],
      settings: null,
      lowestAt: [potential.minimum.x, potential.minimum.y],
      independentSamples: potential.independentSamples,
      inefficiency: null,
      basins: null,
      form: null,
      warnings: warningsOfPair(pair, content).map(frozenWarning),
      input: { name: file.name, sha256: file.sha256 },
      comments: commentLines(text),
      commentInput: {
        settings: potential.settings,
        smoothing: potential.smoothing,
        independentSamples: potential.independentSamples,
        populated: potential.surface.axes.map(({ populated }) => populated),
      },
      savedBy: decision?.decidedBy?.name ?? null,
      savedOn: joint.uploadedAt.toISOString().slice(0, 10),
      reason: decision?.reason ?? null,
    },
  }
}

function frozenWarning({ code, message, answer }: ReturnType<typeof warningsOfTerm>[number]) {
  return { code, message, answer: answer?.reason ?? null }
}

/** The parameters of a form in the units of the files, with their errors as k = 39 300(700) would be too short to be read back. */
function formWords(form: FormFit, kind: CoordinateKind, { length, angle, energy }: WritingOptions) {
  const parameters = parametersInUnits(form, kind === 'bond' ? length : angle, energy)
    .map(({ name, value, standardError, unit }) => {
      const error = standardError === null ? '' : ` ± ${Number((1.96 * standardError).toPrecision(2))}`
      return `${name} = ${formatNumber(Number(value.toPrecision(6)))}${error} ${unit}`.trim()
    })
    .join(', ')
  return { name: form.form, formula: form.formula, parameters }
}

function commentLines(text: string): string[] {
  return text
    .split('\n')
    .filter((line) => line.startsWith('#'))
    .map((line) => line.replace(/^# ?/, ''))
}
