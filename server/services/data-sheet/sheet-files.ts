import type { FrozenHandOver } from '../../../shared/contracts/hand-over'
import { makeDataSheet } from '../../../shared/data-sheet'
import type { HandOverContent } from '../hand-over/content'
import type { ListedFile } from '../hand-over/manifest'
import type { WrittenTable } from '../hand-over/written-table'
import { type DrawnUnit, sheetSourceOf } from './sheet-source-of'
import { writeSheetPdf } from './write-sheet-pdf'

export const SHEET_PDF_PATH = 'data-sheet.pdf'
export const SHEET_JSON_PATH = 'data-sheet.json'

/**
 * The data sheet of a release as files: to print and attach, and for programs and pages. The same release gives the same bytes.
 *
 * @throws {InvalidInputError} as the inversions of its tables
 */
export async function sheetFiles(
  frozen: FrozenHandOver,
  tables: readonly WrittenTable[],
  content: HandOverContent,
  drawn: DrawnUnit,
): Promise<ListedFile[]> {
  const sheet = makeDataSheet(sheetSourceOf(frozen, tables, content, drawn))
  return [
    { path: SHEET_PDF_PATH, mediaType: 'application/pdf', bytes: await writeSheetPdf(sheet) },
    {
      path: SHEET_JSON_PATH,
      mediaType: 'application/json',
      bytes: Buffer.from(`${JSON.stringify(sheet)}\n`),
    },
  ]
}
