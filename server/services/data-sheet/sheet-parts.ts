import type { Column, Content, ContentTable, TableCell } from 'pdfmake/interfaces'
import type { DataSheet, SheetLine, SheetTable } from '../../../shared/contracts/data-sheet'
import {
  drawCurveFigure,
  drawMapFigure,
  drawSilhouette,
  drawTermGlyph,
  FIGURE,
  formulaRuns,
  sizeWords,
} from '../../../shared/data-sheet'
import { lightTokens } from '../../../shared/picture'
import {
  columnHead,
  figures,
  headedTable,
  heading,
  mono,
  PAGE,
  ruledTable,
  sentence,
  set,
  SIZE,
} from './pdf-parts'
import { printable } from './sheet-fonts'

const { ink2 } = lightTokens
/** Letters of a checksum that a list shows. */
const SHORT_SUM = 8
const DRAWING = { width: 196, height: 172 } as const

/** A drawing in letters that the fonts have; medium letters are what the PDF calls bold. */
function drawn(svg: string, options: object = {}): Content {
  return { svg: printable(svg).replaceAll('font-weight="500"', 'font-weight="bold"'), ...options }
}

/** Three facts a row. */
export function factPart(facts: readonly SheetLine[]): ContentTable {
  const cell = ({ title, text }: SheetLine): TableCell => ({
    stack: [{ text: title, color: ink2, fontSize: SIZE.small }, { text: printable(text) }],
  })
  const rows: TableCell[][] = []
  for (let start = 0; start < facts.length; start += 3) {
    const row = facts.slice(start, start + 3).map(cell)
    rows.push([...row, ...Array<TableCell>(3 - row.length).fill('')])
  }
  return ruledTable(['*', '*', '*'], rows)
}

/** The drawn repeat unit beside its beads. */
export function beadPart({ beads }: DataSheet): Content {
  const { rows, unit, drawing } = beads
  const right = { alignment: 'right' } as const
  const heads = [columnHead('bead'), '', columnHead('formula'), columnHead('mass, g/mol', right)]
  const body: TableCell[][] = [
    ...rows.map(({ name, colour, label, formula, mass }): TableCell[] => [
      drawn(drawTermGlyph([[{ name, colour }]], name), { width: 17 }),
      { text: printable(label), margin: [0, 2.5, 0, 0] },
      set(formulaRuns(formula), { margin: [0, 2.5, 0, 0] }),
      figures(mass, { margin: [0, 2.5, 0, 0] }),
    ]),
    ['', { text: 'unit', color: ink2 }, set(formulaRuns(unit.formula)), figures(unit.mass)],
  ]
  const columns: Content = {
    columns: [
      drawn(drawing, { fit: [DRAWING.width, DRAWING.height], width: DRAWING.width + 22 }),
      {
        width: '*',
        stack: [
          headedTable(null, [24, '*', 70, 64], heads, body, 3.6),
          {
            text: ['Repeat unit ', ...mono(unit.smiles).text],
            color: ink2,
            fontSize: SIZE.small,
            margin: [0, 5, 0, 0],
          },
        ],
      },
    ],
  }
  return { unbreakable: true, stack: [heading('Beads'), columns] }
}

/** The list of tables, then of the terms without one. */
export function tablePart({ tables, leftOut }: DataSheet): Content {
  const heads = [
    'term',
    '',
    'potential,\nto 25 kJ/mol',
    'domain',
    'lowest at',
    'file, size,\nstart of sha-256',
  ]
  const rows = tables.map((table): TableCell[] => [
    drawn(drawTermGlyph(table.beads, table.name)),
    { stack: [nameOf(table), { text: kindWords(table), color: ink2, fontSize: SIZE.small }] },
    drawn(drawSilhouette(table.silhouette, table.kinds.length === 2, table.name), { margin: [0, 2, 0, 0] }),
    { stack: [...table.domain, table.rows].map((text) => ({ text })), fontSize: SIZE.small },
    { text: table.lowest, fontSize: SIZE.small },
    {
      stack: [
        { text: breakable(table.path) },
        { text: [`${sizeWords(table.size)}  `, ...mono(table.sha256.slice(0, SHORT_SUM)).text], color: ink2 },
      ],
      fontSize: SIZE.small,
    },
  ])
  const gone = leftOut.map((term): TableCell[] => [
    drawn(drawTermGlyph([term.beads], term.name, true)),
    { stack: [{ text: printable(term.name) }, { text: term.kind, color: ink2, fontSize: SIZE.small }] },
    {
      ...sentence(`Left out on record: ${term.reason} No file.`),
      colSpan: 4,
      color: ink2,
      fontSize: SIZE.small,
    },
    '',
    '',
    '',
  ])
  return headedTable(
    'Tables',
    [84, 58, 74, 72, 58, '*'],
    heads.map((text) => columnHead(text)),
    [...rows, ...gone],
    3,
  )
}

/** The figures, two a row. */
export function figurePart(tables: readonly SheetTable[]): Content[] {
  const gap = PAGE.width - 2 * FIGURE.width
  const cells = tables.map((table): Column => ({
    width: FIGURE.width,
    stack: [
      {
        text: [
          { text: printable(table.name.replace(' · ', ' with ')), bold: true },
          { text: `  ${kindWords(table)}`, color: ink2 },
        ],
      },
      ...(table.curve ? [drawn(drawCurveFigure(table.curve, table.name))] : []),
      ...(table.map ? [drawn(drawMapFigure(table.map, table.name))] : []),
      sentence(table.caption, { fontSize: SIZE.note, color: ink2, margin: [0, 2, 0, 0] }),
    ],
  }))
  const rows: Content[] = []
  for (let start = 0; start < cells.length; start += 2) {
    rows.push({
      unbreakable: true,
      columns: [
        ...cells.slice(start, start + 2),
        ...(start + 1 < cells.length ? [] : [{ text: '', width: FIGURE.width }]),
      ],
      columnGap: gap,
      margin: [0, start === 0 ? 4 : 10, 0, 0],
    })
  }
  const [first, ...rest] = rows
  return [
    { unbreakable: true, stack: [heading('Distributions and potentials'), figureKey(tables), first] },
    ...rest,
  ]
}

/** What the lines of the figures are, in drawing order. */
function figureKey(tables: readonly SheetTable[]): Content {
  const curves = tables.flatMap(({ curve }) => (curve === null ? [] : [curve]))
  const unbanded = curves.filter(({ band }) => band === null).length
  const band =
    unbanded === 0
      ? 'pale, its 95 % band'
      : unbanded === curves.length
        ? 'no band: sample sizes not stated'
        : 'pale, its 95 % band where a sample size is stated'
  const text = `Grey, measured; blue, what the table gives back. Below, the potential (dots beyond the data), ${band}; rings, the inversion bin by bin.`
  return sentence(text, { fontSize: SIZE.small, color: ink2, margin: [0, 0, 0, 3] })
}

function nameOf({ name }: SheetTable): Content {
  return { text: printable(name).replace(' · ', ' with\n'), bold: true }
}

function kindWords({ kinds }: SheetTable): string {
  return kinds.length === 2 ? 'joint potential' : kinds[0]
}

/** A file name that may break after each of its joints. */
function breakable(path: string): string {
  return printable(path).replace(/([_-])/g, '$1\u200b')
}
