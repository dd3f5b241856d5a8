import { createHash } from 'node:crypto'
import { layoutRepeatUnit, parseRepeatUnit } from '@shared/chemistry'
import type { FrozenHandOver } from '@shared/contracts/hand-over'
import type { SheetSource, SourceTable } from '@shared/data-sheet'
import { curveBasins } from '@shared/basins'
import { derivePotential } from '@shared/forms'
import { pointsBeforeRunning } from '@shared/hand-over'
import { createHistogram, type Histogram, jacobian, type JointHistogram } from '@shared/histogram'
import { DEFAULT_INVERSION_SETTINGS, type InversionSettings } from '@shared/inversion'
import {
  DEFAULT_JOINT_SETTINGS,
  DEFAULT_JOINT_TABLE,
  jointPotential,
  jointTable,
} from '@shared/joint-potential'
import { type DerivedTerm, deriveTerms, type MappingDocument } from '@shared/mapping'
import { boardLayout, drawingLayers } from '@shared/mapping-drawing'
import { createRandom } from '@shared/numeric'
import { svgElement } from '@shared/picture'
import { formatNumber, makeTable } from '@shared/tables'
import type { CoordinateKind } from '@shared/units'
import { curveSilhouette, gridSilhouette } from '../../server/services/hand-over/table-silhouette'

/** K */
const TEMPERATURE = 400
const SAMPLES = 20_000

/** Energies in kT that the counts of a kind are drawn from, and the bins they fall into. */
const SHAPES: Readonly<
  Record<CoordinateKind, { low: number; high: number; bins: number; energy: (at: number) => number }>
> = {
  bond: { low: 0.2, high: 0.4, bins: 60, energy: (r) => ((r - 0.3) / 0.02) ** 2 / 2 },
  angle: {
    low: 0,
    high: Math.PI,
    bins: 90,
    energy: (theta) => ((theta - 2.1) / 0.25) ** 2 / 2 + 0.6 * Math.sin(6 * theta),
  },
  dihedral: {
    low: -Math.PI,
    high: Math.PI,
    bins: 72,
    energy: (phi) => 1.2 * Math.cos(3 * phi) + 0.8 * Math.cos(phi),
  },
}

/** Poisson counts of a kind, seeded. */
export function sampledHistogram(kind: CoordinateKind, seed = 1, samples = SAMPLES): Histogram {
  const { low, high, bins, energy } = SHAPES[kind]
  const edges = Array.from({ length: bins + 1 }, (_, edge) => low + ((high - low) * edge) / bins)
  const middles = edges.slice(1).map((edge, bin) => (edge + edges[bin]) / 2)
  const masses = middles.map((middle) => jacobian(kind, middle) * Math.exp(-energy(middle)))
  const total = masses.reduce((sum, mass) => sum + mass, 0)
  const random = createRandom(seed)
  const weights = masses.map((mass) => random.poisson((samples * mass) / total))
  return createHistogram({ kind, edges, weights, content: 'count' })
}

/** What a built source differs in from the usual one. */
export interface SheetOptions {
  readonly smiles: string
  readonly document: MappingDocument
  readonly histogramOf?: (term: DerivedTerm) => Histogram
  readonly settingsOf?: (term: DerivedTerm) => Partial<InversionSettings>
  /** Names of two terms with their histogram; they come as one joint table. */
  readonly joint?: { readonly names: readonly [string, string]; readonly histogram: JointHistogram }
  /** Names of terms that are left out. */
  readonly leftOut?: readonly string[]
  readonly frozen?: Partial<FrozenHandOver>
  readonly warningsOf?: (name: string) => SourceTable['warnings']
  readonly pairs?: SheetSource['pairs']
}

const sum = (text: string): string => createHash('sha256').update(text).digest('hex')

/** Everything a data sheet is made from, of one table for each term of a mapping. */
export async function buildSheetSource(options: SheetOptions): Promise<SheetSource> {
  const { smiles, document, joint, leftOut = [] } = options
  const unit = await parseRepeatUnit(smiles)
  const board = boardLayout(unit, await layoutRepeatUnit(smiles))
  const { x, y, width, height } = board.box
  const terms = deriveTerms(unit, document)
  const gone = new Set([...leftOut, ...(joint?.names ?? [])])
  const tables = [
    ...terms.filter(({ name }) => !gone.has(name)).map((term) => singleTable(term, options)),
    ...(joint ? [jointTableOf(joint, terms)] : []),
  ]
  const layout = { layoutId: null, length: 'nm', angle: 'degree', energy: 'kJ/mol' } as const
  const formOf = ({ single }: SourceTable) =>
    single?.form
      ? { name: single.form.form, formula: single.form.formula, parameters: 'k = 1 kJ/mol/nm²' }
      : null
  const frozen = {
    version: 1,
    number: 2,
    title: 'Melt tables',
    notes: '',
    group: 'Adhesives',
    invented: true,
    polymer: { name: 'poly(n-hexyl acrylate)', smiles, formula: unit.formula, mass: unit.mass },
    mapping: { name: `${document.beads.length}-to-1`, revision: 3, document },
    statePoint: { temperature: TEMPERATURE, pressure: 1, phase: 'melt', composition: '' },
    layout: { ...layout, name: 'Three columns', document: null },
    madeBy: 'Milo Ferrante',
    signedOffBy: 'Renate Okafor',
    signedOffAt: '2026-06-11T09:30:00.000Z',
    releasedAt: '2026-06-12T10:00:00.000Z',
    replaces: null,
    leftOut: terms
      .filter(({ name }) => leftOut.includes(name))
      .map(({ kind, name, types }) => ({ kind, name, types, reason: 'Flat within 0.14 kT.' })),
    points: pointsBeforeRunning({
      layout,
      temperature: TEMPERATURE,
      readings: null,
      tables: tables.map((table) => ({ name: table.name, kinds: table.kinds, form: formOf(table) })),
    }),
    differences: [],
    contentSha256: sum('content'),
    ...options.frozen,
  } as unknown as FrozenHandOver
  return {
    frozen,
    unit,
    drawing: svgElement(
      'svg',
      { xmlns: 'http://www.w3.org/2000/svg', width, height, viewBox: `${x} ${y} ${width} ${height}` },
      drawingLayers(unit, board, document),
    ),
    tables,
    pairs: options.pairs ?? [],
    tablesSha256: sum(tables.map((table) => table.sha256).join('\n')),
  }
}

function singleTable(term: DerivedTerm, options: SheetOptions): SourceTable {
  const { kind, name, types } = term
  const histogram = (options.histogramOf ?? (({ kind: each }) => sampledHistogram(each)))(term)
  const settings = { ...DEFAULT_INVERSION_SETTINGS, ...options.settingsOf?.(term) }
  const single = derivePotential(histogram, TEMPERATURE, settings)
  const { potential, minimum, independentSamples, warnings } = single.inversion
  const table = makeTable(potential, settings.table)
  const rows = Array.from(table.coordinates, (at, row) =>
    [at, table.energies[row], table.forces[row]].map(formatNumber).join(' '),
  )
  const text = `# INVENTED data: made up for demonstration, not for use\n# term: ${name}\n# q U F\n${rows.join('\n')}\n`
  return {
    ...fileOf(`${kind}_${types.join('-')}_400K.txt`, text),
    name,
    kinds: [kind],
    types: [types],
    coordinates: table.coordinates,
    secondCoordinates: null,
    energies: table.energies,
    lowestAt: [minimum.coordinate],
    silhouette: curveSilhouette(table),
    basins: independentSamples === null ? null : curveBasins(potential).basins.length,
    input: { name: `${types.join('-')}.txt`, sha256: sum(name) },
    warnings:
      options.warningsOf?.(name) ??
      warnings.map(({ message }) => ({
        message,
        answer: { reason: 'Looked at', by: 'Milo Ferrante', at: '2026-06-10T08:00:00.000Z' },
      })),
    single,
    joint: null,
  }
}

function jointTableOf(
  { names, histogram }: NonNullable<SheetOptions['joint']>,
  terms: readonly DerivedTerm[],
): SourceTable {
  const [first, second] = names.map((name) => terms.find((term) => term.name === name)!)
  const potential = jointPotential(histogram, TEMPERATURE, DEFAULT_JOINT_SETTINGS)
  const table = jointTable(potential.surface, DEFAULT_JOINT_TABLE)
  return {
    ...fileOf('joint_400K.txt', '# joint\n0 0 0 0 0\n'),
    name: names.join(' · '),
    kinds: [first.kind, second.kind],
    types: [first.types, second.types],
    coordinates: table.x,
    secondCoordinates: table.y,
    energies: table.energies,
    lowestAt: [potential.minimum.x, potential.minimum.y],
    silhouette: gridSilhouette(table),
    basins: null,
    input: { name: 'pairs.txt', sha256: sum('pairs') },
    warnings: [],
    single: null,
    joint: { histogram, potential },
  }
}

function fileOf(path: string, text: string): Pick<SourceTable, 'path' | 'text' | 'size' | 'sha256'> {
  return { path, text, size: text.length, sha256: sum(text) }
}
