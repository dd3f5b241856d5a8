import type { RepeatUnit } from '../../../shared/chemistry'
import type { FrozenHandOver } from '../../../shared/contracts/hand-over'
import type { SheetSource, SourcePair, SourceTable, SourceWarning } from '../../../shared/data-sheet'
import { derivePotential } from '../../../shared/forms'
import { DEFAULT_JOINT_SETTINGS, jointPotential } from '../../../shared/joint-potential'
import { type BoardLayout, drawingLayers } from '../../../shared/mapping-drawing'
import { svgElement } from '../../../shared/picture'
import { sha256 } from '../hashes'
import { jointHistogramOf } from '../histograms'
import type { ContentPair, HandOverContent } from '../hand-over/content'
import { writeSums } from '../hand-over/manifest'
import { type AnsweredWarning, warningsOfPair, warningsOfTerm } from '../hand-over/table-evidence'
import { pairName, type WrittenTable } from '../hand-over/written-table'

/** A repeat unit with the places of its atoms. */
export interface DrawnUnit {
  readonly unit: RepeatUnit
  readonly board: BoardLayout
}

/** Gathers what the data sheet of a release is made from, of the content that is being released. */
export function sheetSourceOf(
  frozen: FrozenHandOver,
  tables: readonly WrittenTable[],
  content: HandOverContent,
  { unit, board }: DrawnUnit,
): SheetSource {
  const { x, y, width, height } = board.box
  const files = tables.map(({ path, text }) => ({ path, bytes: Buffer.from(text) }))
  return {
    frozen,
    unit,
    drawing: svgElement(
      'svg',
      {
        xmlns: 'http://www.w3.org/2000/svg',
        width: Math.round(width),
        height: Math.round(height),
        viewBox: `${x} ${y} ${width} ${height}`,
        role: 'img',
        'font-family': "'Fira Sans', 'Fira Signs', sans-serif",
        'aria-label': `${frozen.mapping.name}: the beads on the repeat unit ${frozen.polymer.formula}`,
      },
      drawingLayers(unit, board, frozen.mapping.document),
    ),
    tables: tables.map((table) => tableOf(table, content)),
    pairs: content.pairs.map(pairOf),
    tablesSha256: sha256(writeSums(files)),
  }
}

function tableOf(table: WrittenTable, content: HandOverContent): SourceTable {
  const { name, kinds, path, text, coordinates, secondCoordinates, energies, silhouette, meta } = table
  const bytes = Buffer.from(text)
  return {
    name,
    kinds,
    types: meta.types,
    path,
    text,
    size: bytes.length,
    sha256: sha256(bytes),
    coordinates,
    secondCoordinates,
    energies,
    lowestAt: meta.lowestAt,
    silhouette,
    basins: meta.basins,
    input: meta.input,
    ...evidenceOf(table, content),
  }
}

/** What the table rests on, worked out again from the same data and settings. */
function evidenceOf(
  { name }: WrittenTable,
  content: HandOverContent,
): Pick<SourceTable, 'single' | 'joint' | 'warnings'> {
  const { temperature } = content.statePoint
  const pair = content.pairs.find((each) => each.together && pairName(each) === name)
  if (pair) {
    const histogram = jointHistogramOf(pair.joint)
    const potential = jointPotential(histogram, temperature, DEFAULT_JOINT_SETTINGS)
    const warnings = warningsOfPair(pair, content).map(warningOf)
    return { single: null, joint: { histogram, potential }, warnings }
  }
  const term = content.terms.find((each) => each.name === name)
  if (!term?.input || !term.settings) throw new Error(`There is no inversion behind the table ${name}.`)
  return {
    single: derivePotential(term.input.histogram, temperature, term.settings),
    joint: null,
    warnings: warningsOfTerm(term, content).map(warningOf),
  }
}

function warningOf({ message, answer }: AnsweredWarning): SourceWarning {
  if (answer === null) return { message, answer }
  const { reason, answeredBy, answeredAt } = answer
  return { message, answer: { reason, by: answeredBy?.name ?? null, at: answeredAt.toISOString() } }
}

function pairOf({ terms: [first, second], joint, decision, apart }: ContentPair): SourcePair {
  return {
    name: `${first.name}, ${second.name}`,
    numbers: joint.numbers,
    decision: decision && {
      choice: decision.choice,
      reason: decision.reason,
      by: decision.decidedBy?.name ?? null,
      at: decision.decidedAt.toISOString(),
    },
    apart,
  }
}
