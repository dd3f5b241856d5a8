import type { Content, ContentTable, ContentText, CustomTableLayout, TableCell } from 'pdfmake/interfaces'
import type { SheetLine } from '../../../shared/contracts/data-sheet'
import { sentenceRuns, type TextRun } from '../../../shared/data-sheet'
import { lightTokens } from '../../../shared/picture'
import { MONO_LETTERS, printable } from './sheet-fonts'

const { ink2, rule, edge } = lightTokens
/** Width of the column that a line is found by, pt. */
export const TITLE_WIDTH = 108
const MILLIMETRE = 72 / 25.4
/** Side and top margins and the width that is left between them, pt. */
export const PAGE = { side: 15 * MILLIMETRE, top: 16 * MILLIMETRE, width: 180 * MILLIMETRE } as const

/** Sizes of type, pt. */
export const SIZE = { title: 25, lead: 12, section: 12.5, body: 9.6, small: 8.4, note: 7.8 } as const

/** Text of several pieces. */
export type SetText = Omit<ContentText, 'text'> & { readonly text: ContentText[] }
type TextStyle = Omit<Partial<ContentText>, 'text'>

/** Text with its symbols and indices as they are set in print. */
export function set(runs: readonly TextRun[], style: TextStyle = {}): SetText {
  return {
    text: runs.map(({ text, style: each }): ContentText => ({
      text: printable(text),
      ...(each === 'italic' ? { italics: true } : {}),
      ...(each === 'lowered' ? { sub: true } : {}),
    })),
    ...style,
  }
}

/** A sentence, its symbols in italics. */
export function sentence(text: string, style: TextStyle = {}): SetText {
  return set(sentenceRuns(text), style)
}

/** Text of a file: what Fira Mono lacks stands in Fira Sans. */
export function mono(text: string, style: TextStyle = {}): SetText {
  const shown = printable(text)
  const parts: ContentText[] = []
  let end = 0
  for (const match of shown.matchAll(MONO_LETTERS)) {
    if (match.index > end) parts.push({ text: shown.slice(end, match.index) })
    parts.push({ text: match[0], font: 'Fira Mono' })
    end = match.index + match[0].length
  }
  if (end < shown.length) parts.push({ text: shown.slice(end) })
  return { text: parts, preserveLeadingSpaces: true, ...style }
}

/** The head of a section. */
export function heading(text: string): SetText {
  return sentence(text, { fontSize: SIZE.section, bold: true, margin: [0, 15, 0, 5] })
}

/** Lines with a word each to find them by, parted by rules. */
export function lineTable(lines: readonly SheetLine[], { open = true } = {}): ContentTable {
  return ruledTable(
    [TITLE_WIDTH, '*'],
    lines.map(({ title, text }) => [sentence(title, { color: ink2 }), sentence(text)]),
    { open },
  )
}

/** A section of such lines, its head together with the first; nothing without lines. */
export function lineSection(title: string, lines: readonly SheetLine[]): Content[] {
  const [first, ...rest] = lines
  if (first === undefined) return []
  return [
    { unbreakable: true, stack: [heading(title), lineTable([first])] },
    ...(rest.length === 0 ? [] : [lineTable(rest, { open: false })]),
  ]
}

/** A table with rules between its rows, and above them if it is open there. */
export function ruledTable(
  widths: Widths,
  rows: TableCell[][],
  { open = true, padding = 3.6 }: { readonly open?: boolean; readonly padding?: number } = {},
): ContentTable {
  return {
    table: { widths, body: rows, dontBreakRows: true },
    layout: { ...ruled(padding), hLineWidth: (line) => (line === 0 && !open ? 0 : LINE) },
  }
}

/** A table with a title and heads of its columns, which stand on each page that it runs over. */
export function headedTable(
  title: string | null,
  widths: Widths,
  heads: TableCell[],
  rows: TableCell[][],
  padding: number,
): ContentTable {
  const titles =
    title === null ? [] : [[{ ...heading(title), colSpan: heads.length }, ...heads.slice(1).map(() => '')]]
  const headRows = titles.length + 1
  return {
    table: {
      widths,
      body: [...titles, heads, ...rows],
      headerRows: headRows,
      dontBreakRows: true,
      keepWithHeaderRows: 1,
    },
    layout: {
      ...ruled(padding),
      hLineWidth: (line) => (line < headRows ? 0 : LINE),
      hLineColor: (line) => (line === headRows ? edge : rule),
      paddingTop: (row) => (row < headRows ? 0 : padding),
      paddingBottom: (row) => (row < headRows - 1 ? 0 : padding),
    },
  }
}

type Widths = (number | '*' | 'auto')[]
const LINE = 0.6

/** The head of a column. */
export function columnHead(text: string, style: TextStyle = {}): TableCell {
  return { ...sentence(text), color: ink2, fontSize: SIZE.small, alignment: 'left', ...style }
}

/** A number in a column: figures of one width. */
export function figures(text: string, style: TextStyle = {}): SetText {
  return { text: [{ text, fontFeatures: ['tnum', 'lnum'] }], alignment: 'right', ...style }
}

function ruled(padding: number): CustomTableLayout {
  return {
    vLineWidth: () => 0,
    hLineColor: (line) => (line === 0 ? edge : rule),
    paddingLeft: () => 0,
    paddingRight: (column, node) => (column === (node.table.widths?.length ?? 0) - 1 ? 0 : 9),
    paddingTop: () => padding,
    paddingBottom: () => padding,
  }
}
