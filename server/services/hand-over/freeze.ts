import { layoutRepeatUnit, parseRepeatUnit } from '../../../shared/chemistry'
import type { FrozenHandOver } from '../../../shared/contracts/hand-over'
import { writeMappingFile } from '../../../shared/documents'
import { builtInKeySchema } from '../../../shared/contracts/layout'
import { pointsBeforeRunning } from '../../../shared/hand-over'
import { layoutSentences } from '../../../shared/layouts'
import { boardLayout, mappingPicture } from '../../../shared/mapping-drawing'
import { svgDocument } from '../../../shared/picture'
import type { HandOver } from '../../entities/hand-over.entity'
import { sheetFiles } from '../data-sheet/sheet-files'
import { namesInOneFolder } from '../table-names'
import type { HandOverContent } from './content'
import { type ListedFile, MANIFEST_PATH, SUMS_PATH, writeManifest, writeSums } from './manifest'
import { writeReleaseReadme } from './release-readme'
import { tableNames, type WritingOptions, type WrittenTable, writeTableNamed } from './written-table'

export const MAPPING_PATH = 'mapping.json'
export const PICTURE_PATH = 'mapping.svg'

/** What a release is beside its content: its number, and who stands for it. */
export interface ReleaseFacts extends Pick<
  FrozenHandOver,
  'number' | 'madeBy' | 'signedOffBy' | 'signedOffAt' | 'releasedAt' | 'replaces'
> {
  readonly layout: FrozenHandOver['layout'] & Pick<WritingOptions, 'document'>
}

/** Writes all tables of the content; the names of their files differ even on systems that ignore capitals. */
export function writeTables(content: HandOverContent, layout: WritingOptions): WrittenTable[] {
  const written = tableNames(content).flatMap((name) => writeTableNamed(content, layout, name) ?? [])
  const paths = namesInOneFolder(written.map(({ path }) => path))
  return written.map((table, index) => ({ ...table, path: paths[index] }))
}

/** Everything that pages and data sheets of a release say, by value; without the differences, which compare two of them. */
export function freezeHead(
  { title, notes }: HandOver,
  content: HandOverContent,
  facts: ReleaseFacts,
  tables: readonly WrittenTable[],
): Omit<FrozenHandOver, 'differences'> {
  const { group, invented, polymer, mapping, statePoint, terms, sha256 } = content
  const { temperature, pressure, phase, composition } = statePoint
  return {
    version: 1,
    title,
    notes,
    group: group.name,
    invented,
    ...facts,
    polymer: { name: polymer.name, smiles: polymer.smiles, formula: polymer.formula, mass: polymer.mass },
    mapping: { name: mapping.name, revision: mapping.revision, document: mapping.document },
    statePoint: { temperature, pressure, phase, composition },
    leftOut: terms.flatMap(({ term, name, leftOut }) =>
      leftOut === null ? [] : [{ kind: term.kind, name, types: term.types, reason: leftOut.reason }],
    ),
    points: pointsBeforeRunning({
      layout: facts.layout,
      temperature,
      readings: readingsOf(facts.layout, tables),
      tables: tables.map(({ name, kinds, meta }) => ({ name, kinds, form: meta.form })),
    }),
    contentSha256: sha256,
  }
}

/**
 * All files of a release in the order in which they are listed: README, tables, mapping file and picture, data sheet, manifest,
 * checksums.
 *
 * @throws {InvalidInputError} for a repeat unit that cannot be read
 */
export async function freezeFiles(
  frozen: FrozenHandOver,
  tables: readonly WrittenTable[],
  content: HandOverContent,
): Promise<ListedFile[]> {
  const { polymer, mapping, invented } = frozen
  const unit = await parseRepeatUnit(polymer.smiles)
  const board = boardLayout(unit, await layoutRepeatUnit(polymer.smiles))
  const caption = { polymer: polymer.name, mapping: mapping.name, invented }
  const picture = svgDocument(mappingPicture(unit, board, mapping.document, caption))
  const files: ListedFile[] = [
    textFile('README.txt', 'text/plain; charset=utf-8', writeReleaseReadme(frozen, tables)),
    ...tables.map(({ path, text }) => textFile(path, mediaTypeOf(path), text)),
    textFile(MAPPING_PATH, 'application/json', writeMappingFile(unit, mapping.document, mapping.name)),
    textFile(PICTURE_PATH, 'image/svg+xml', `${picture}\n`),
    ...(await sheetFiles(frozen, tables, content, { unit, board })),
  ]
  const manifest = textFile(MANIFEST_PATH, 'application/json', writeManifest(frozen, tables, files, null))
  const sums = textFile(SUMS_PATH, 'text/plain; charset=utf-8', writeSums([...files, manifest]))
  return [...files, manifest, sums]
}

/** What a layout of the group, or one without forces, writes: its conventions are its own. */
function readingsOf(
  { layoutId, document }: FrozenHandOver['layout'] & Pick<WritingOptions, 'document'>,
  tables: readonly WrittenTable[],
): string[] | null {
  const house = layoutId === null || builtInKeySchema.safeParse(layoutId).success
  if (house && document.columns.includes('force')) return null
  return layoutSentences(document, [...new Set(tables.flatMap(({ kinds }) => kinds))])
}

function mediaTypeOf(path: string): string {
  return path.endsWith('.json') ? 'application/json' : 'text/plain; charset=utf-8'
}

/** A text as a file in UTF-8. */
export function textFile(path: string, mediaType: string, text: string): ListedFile {
  return { path, mediaType, bytes: Buffer.from(text) }
}
