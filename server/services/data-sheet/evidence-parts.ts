import type { Content, TableCell } from 'pdfmake/interfaces'
import type { DataSheet, SheetTable } from '../../../shared/contracts/data-sheet'
import { countWords, dimensionWords, lambdaWords, listed, numberWords } from '../../../shared/data-sheet'
import { lightTokens } from '../../../shared/picture'
import { columnHead, figures, headedTable, lineSection, mono, sentence, SIZE } from './pdf-parts'
import { printable } from './sheet-fonts'

const right = { alignment: 'right' } as const
const SHORT_SUM = 8

/** What the tables rest on: numbers, forms, verdicts, warnings with their answers. */
export function evidenceParts({ tables, forms, verdicts, warnings }: DataSheet): Content[] {
  return [
    numberPart(tables),
    ...lineSection('Analytic forms', forms),
    ...(verdicts.length === 0 ? [] : [verdictPart(verdicts)]),
    ...(warnings.length === 0 ? [] : [warningPart(warnings)]),
  ]
}

function numberPart(tables: readonly SheetTable[]): Content {
  const heads = [
    columnHead('table'),
    columnHead('samples, N', right),
    columnHead('g', right),
    columnHead('log λ', right),
    columnHead('effective dimension', right),
    columnHead('basins', right),
    columnHead('input, start of its sha-256'),
  ]
  const rows = tables.map(({ name, numbers }): TableCell[] => {
    const { samples, inefficiency, log10Lambda, effectiveDimension, basins, input } = numbers
    return [
      { text: printable(listed(name)) },
      figures(samples === null ? 'not stated' : countWords(samples)),
      figures(inefficiency === null ? '–' : numberWords(inefficiency, 3)),
      figures(lambdaWords(log10Lambda)),
      figures(dimensionWords(effectiveDimension)),
      figures(basins === null ? '–' : String(basins)),
      {
        text: [
          `${printable(input.name).replace(/([_-])/g, '$1\u200b')}  `,
          ...mono(input.sha256.slice(0, SHORT_SUM)).text,
        ],
        color: lightTokens.ink2,
      },
    ]
  })
  return {
    ...headedTable('What the tables rest on', [78, 54, 30, 54, 50, 34, '*'], heads, rows, 2.6),
    fontSize: SIZE.small,
  }
}

function verdictPart(verdicts: DataSheet['verdicts']): Content {
  const heads = [
    columnHead('pair'),
    columnHead('information, nats', right),
    columnHead('p', right),
    columnHead('samples, N', right),
    columnHead('verdict'),
    columnHead('decision on record'),
  ]
  const rows = verdicts.map((each): TableCell[] => [
    { text: printable(each.name) },
    figures(each.information),
    figures(each.pValue),
    figures(each.samples),
    { text: each.verdict },
    sentence(each.decision),
  ])
  return {
    ...headedTable('Verdicts and decisions', [78, 54, 36, 54, 70, '*'], heads, rows, 2.6),
    fontSize: SIZE.small,
  }
}

function warningPart(warnings: DataSheet['warnings']): Content {
  const heads = [columnHead('table'), columnHead('warning'), columnHead('answer')]
  const rows = warnings.map(({ about, message, answer }): TableCell[] => [
    { text: printable(about) },
    sentence(message),
    sentence(answer),
  ])
  return {
    ...headedTable('Warnings and their answers', [72, '*', 196], heads, rows, 2.6),
    fontSize: SIZE.small,
  }
}
