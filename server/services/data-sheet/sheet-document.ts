import type { Content, TDocumentDefinitions } from 'pdfmake/interfaces'
import type { DataSheet } from '../../../shared/contracts/data-sheet'
import { dayWords, nameRuns } from '../../../shared/data-sheet'
import { lightTokens } from '../../../shared/picture'
import { evidenceParts } from './evidence-parts'
import {
  heading,
  lineSection,
  lineTable,
  mono,
  PAGE,
  ruledTable,
  sentence,
  set,
  SIZE,
  TITLE_WIDTH,
} from './pdf-parts'
import { printable } from './sheet-fonts'
import { beadPart, factPart, figurePart, tablePart } from './sheet-parts'
import { hatch, mark } from './sheet-signs'

const { ink, ink2, edge } = lightTokens
/** Letters of a checksum that the foot shows. */
const SHORT_SUM = 16

/** The data sheet as pdfmake lays it out: A4, figures as vectors, dates and ids of the release only. */
export function sheetDocument(sheet: DataSheet): TDocumentDefinitions {
  const { number, title, polymer, subtitle, invented, group, releasedAt } = sheet
  const name = `Hand-over ${number}: ${title}`
  return {
    pageSize: 'A4',
    pageMargins: [PAGE.side, PAGE.top, PAGE.side, PAGE.top + 12],
    version: '1.7',
    language: 'en',
    info: {
      title: printable(`${name}. Data sheet`),
      author: printable(group),
      subject: printable(`${polymer}, ${subtitle}${invented ? '. INVENTED DATA' : ''}`),
      keywords: 'coarse-graining, bonded potentials, Boltzmann inversion',
      creator: 'Beadwright',
      producer: 'Beadwright',
      creationDate: new Date(releasedAt),
      modDate: new Date(releasedAt),
    },
    displayTitle: true,
    defaultStyle: {
      font: 'Fira Sans',
      fontSize: SIZE.body,
      lineHeight: 1.18,
      color: ink,
    },
    footer: (page, pages) => foot(sheet, page, pages),
    content: [...head(sheet), ...body(sheet)],
  }
}

function head({ number, title, polymer, subtitle, invented, facts }: DataSheet): Content[] {
  return [
    {
      columns: [
        { svg: mark(), width: 20 },
        { text: 'Beadwright', bold: true, margin: [4, 1.5, 0, 0] },
        { text: 'Data sheet', alignment: 'right', color: ink2, margin: [0, 1.5, 0, 0] },
      ],
    },
    ruleLine(),
    { text: `Hand-over ${number}`, font: 'Fira Sans Light', fontSize: SIZE.title, margin: [0, 6, 0, 0] },
    { text: printable(title), fontSize: SIZE.lead, margin: [0, 0, 0, 1] },
    set([...nameRuns(polymer), { text: `, ${subtitle}`, style: 'plain' }], {
      fontSize: SIZE.lead,
      color: ink2,
    }),
    ...(invented ? [inventedLine('Invented data, demonstration group: not for simulation')] : []),
    { ...factPart(facts), margin: [0, 9, 0, 0] },
  ]
}

function body(sheet: DataSheet): Content[] {
  const { firstLines, notes, changed, references } = sheet
  return [
    beadPart(sheet),
    ...lineSection('Before you run', sheet.beforeYouRun),
    ...lineSection('Notes', notes === '' ? [] : [{ title: 'From the author', text: notes }]),
    tablePart(sheet),
    ...figurePart(sheet.tables),
    ...(firstLines === null ? [] : [firstLinesPart(firstLines)]),
    ...lineSection('How far these tables carry', sheet.carry),
    ...evidenceParts(sheet),
    ...(changed === null ? [] : lineSection(`Changed since hand-over ${changed.since}`, changed.lines)),
    ...lineSection('How the tables were made', sheet.methods),
    ...(references.length === 0 ? [] : [referencePart(references)]),
    ...signOffPart(sheet),
  ]
}

function firstLinesPart({ path, lines }: NonNullable<DataSheet['firstLines']>): Content {
  const text = lines.map((line) => mono(line, { fontSize: SIZE.note, lineHeight: 1.25 }))
  return {
    unbreakable: true,
    stack: [heading(`First lines of ${path}`), ruledTable(['*'], [[{ stack: text, margin: [9, 2, 0, 2] }]])],
  }
}

function referencePart(references: readonly string[]): Content {
  const list = references.map((text, index): Content => ({
    columns: [
      { text: `[${index + 1}]`, width: 22, color: ink2 },
      { text: printable(text), width: '*' },
    ],
    fontSize: SIZE.small,
    margin: [0, 0, 0, 1.5],
  }))
  return { unbreakable: true, stack: [heading('References'), ...list] }
}

function signOffPart(sheet: DataSheet): Content[] {
  const { signOff, invented, tablesSha256 } = sheet
  const sums = {
    stack: [
      mono(tablesSha256, { fontSize: SIZE.note }),
      sentence('of the lines of SHA256SUMS that name the tables; manifest.json lists every file', {
        color: ink2,
        fontSize: SIZE.small,
      }),
    ],
  }
  return [
    {
      unbreakable: true,
      stack: [
        heading('Sign-off'),
        lineTable(signOff),
        ruledTable([TITLE_WIDTH, '*'], [[{ text: 'Tables sha-256', color: ink2 }, sums]], { open: false }),
        ...(lacksSigns(sheet)
          ? [
              sentence('Signs that the fonts of this page lack stand as ?; data-sheet.json has them.', {
                color: ink2,
                fontSize: SIZE.small,
                margin: [0, 5, 0, 0],
              }),
            ]
          : []),
        ...(invented ? [inventedLine('Invented data, demonstration group: not for simulation')] : []),
      ],
    },
  ]
}

/** Whether some of its text cannot be printed as it is. */
function lacksSigns(sheet: DataSheet): boolean {
  const text = JSON.stringify({ ...sheet, beads: sheet.beads.rows })
  return text.split('?').length !== printable(text).split('?').length
}

function inventedLine(text: string): Content {
  return {
    columns: [
      { svg: hatch(), width: 18, margin: [0, 3, 0, 0] },
      { text, color: ink2, fontSize: SIZE.small, margin: [5, 1, 0, 0] },
    ],
    margin: [0, 6, 0, 0],
  }
}

function ruleLine(): Content {
  return {
    canvas: [{ type: 'line', x1: 0, y1: 0, x2: PAGE.width, y2: 0, lineWidth: 0.7, lineColor: edge }],
    margin: [0, 5, 0, 0],
  }
}

function foot(
  { number, invented, tablesSha256, releasedAt }: DataSheet,
  page: number,
  pages: number,
): Content {
  const sum = tablesSha256.slice(0, SHORT_SUM)
  return {
    columns: [
      {
        text: `Hand-over ${number}, ${dayWords(releasedAt)}${invented ? ', INVENTED DATA' : ''}, tables sha-256 ${sum}`,
      },
      { text: `${page} of ${pages}`, alignment: 'right', width: 60 },
    ],
    fontSize: SIZE.note,
    color: ink2,
    margin: [PAGE.side, 14, PAGE.side, 0],
  }
}
