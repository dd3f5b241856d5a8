import { readFileSync } from 'node:fs'
import type { DataSheet } from '../../../shared/contracts/data-sheet'
import { leanFont } from './lean-font'
import { sheetDocument } from './sheet-document'
import { LEAN_FONTS, SHEET_FONT_FILES, SHEET_FONTS } from './sheet-fonts'

/** Where pdfmake looks for a file before it looks on disk; its types leave it out. */
interface WithFiles {
  readonly virtualfs: {
    existsSync(path: string): boolean
    writeFileSync(path: string, content: Buffer): void
  }
}

/** The data sheet as a PDF with its fonts embedded. The same sheet gives the same bytes. */
export async function writeSheetPdf(sheet: DataSheet): Promise<Buffer> {
  // Loaded when the first sheet is made: a server that starts has no need of it.
  const { default: pdfmake } = await import('pdfmake')
  const { virtualfs } = pdfmake as typeof pdfmake & WithFiles
  for (const { path, without } of LEAN_FONTS) {
    if (!virtualfs.existsSync(path)) virtualfs.writeFileSync(path, leanFont(readFileSync(path), without))
  }
  pdfmake.setFonts(SHEET_FONTS)
  pdfmake.setUrlAccessPolicy(() => false)
  pdfmake.setLocalAccessPolicy((path) => SHEET_FONT_FILES.has(path))
  return pdfmake.createPdf(sheetDocument(sheet)).getBuffer()
}
