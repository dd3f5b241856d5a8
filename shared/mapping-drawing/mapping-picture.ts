import { compositionMass, formulaText, type RepeatUnit } from '../chemistry'
import { beadComposition, type MappingDocument } from '../mapping'
import {
  brokenLines,
  italic,
  lightTokens,
  type Picture,
  type Svg,
  svgElement,
  svgEscape,
  svgFormula,
} from '../picture'
import { chemicalNameParts } from '../chemistry/chemical-name'
import type { BoardLayout } from './board-layout'
import { beadDisc, cross, drawingLayers } from './drawing-layers'

/** What the picture of a mapping says besides what it shows. */
export interface MappingCaption {
  readonly polymer: string
  readonly mapping: string
  /** Of the demonstration. */
  readonly invented: boolean
}

const MARGIN = 20
const LEAST_WIDTH = 420
const ROW = 28
const SIZE = 13
const LINE_HEIGHT = 18

/** The drawing of a mapping with a legend of its beads and a caption, as a picture that stands alone. */
export function mappingPicture(
  unit: RepeatUnit,
  board: BoardLayout,
  document: MappingDocument,
  caption: MappingCaption,
): Picture {
  const { box } = board
  const width = Math.max(LEAST_WIDTH, Math.ceil(box.width) + 2 * MARGIN)
  const left = (width - box.width) / 2 - box.x
  const legendTop = MARGIN + box.height + ROW / 2
  const captionTop = legendTop + (document.beads.length + 1) * ROW
  const lines = brokenLines(captionText(unit, document, caption), width - 2 * MARGIN, SIZE)
  const asFormula = (line: string): Svg => textWithFormula(line, unit.formula)
  return {
    width,
    height: Math.ceil(captionTop + lines.length * LINE_HEIGHT + MARGIN),
    title: `${caption.polymer}, mapping ${caption.mapping}`,
    body: [
      svgElement(
        'g',
        { transform: `translate(${left} ${MARGIN - box.y})` },
        drawingLayers(unit, board, document),
      ),
      legend(unit, document, legendTop),
      ...lines.map((line, index) => textLine(asFormula(line), captionTop + SIZE + index * LINE_HEIGHT)),
    ].join(''),
  }
}

/** A row for each bead (letters, type, word, formula, mass), and what the cross means. */
function legend(unit: RepeatUnit, { beads }: MappingDocument, top: number): Svg {
  const words = (row: number, ...parts: readonly Svg[]): Svg =>
    svgElement(
      'text',
      { x: MARGIN + 34, y: top + row * ROW + 4.5, 'font-size': SIZE, fill: lightTokens.ink },
      ...parts,
    )
  const middle = (row: number) => ({ x: MARGIN + 12, y: top + row * ROW })
  return [
    ...beads.map((bead, row) => {
      const counts = beadComposition(unit, bead)
      const named = [bead.type, bead.label].filter((word) => word !== '').join(', ')
      const holds = bead.atoms.length === 0 ? 'no atoms' : svgFormula(formulaText(counts), SIZE)
      const mass = `${compositionMass(counts).toFixed(3)} g/mol`
      return (
        beadDisc(bead.name, bead.colour, middle(row)) +
        words(row, svgEscape(`${named}: `), holds, svgEscape(`, ${mass}`))
      )
    }),
    cross(middle(beads.length)),
    words(beads.length, 'site of the bead'),
  ].join('')
}

function captionText(unit: RepeatUnit, { beads }: MappingDocument, caption: MappingCaption): string {
  const unitWords = `repeat unit ${unit.formula}, ${unit.mass.toFixed(3)} g/mol, ${unit.smiles}`
  const count = `${beads.length} bead${beads.length === 1 ? '' : 's'} for one ${unitWords}`
  const invented = caption.invented ? ' Invented (demonstration).' : ''
  return `${caption.polymer}, mapping ${caption.mapping}: ${count}.${invented}`
}

function textLine(line: Svg, y: number): Svg {
  return svgElement('text', { x: MARGIN, y, 'font-size': SIZE, fill: lightTokens.ink2 }, line)
}

/** A line of the caption, names in their type and the formula of the unit with its subscripts. */
function textWithFormula(line: string, formula: string): Svg {
  return chemicalNameParts(line)
    .map(({ text, italic: slanted }) =>
      slanted
        ? italic(text)
        : text
            .split(new RegExp(`\\b(${formula})(?=,)`))
            .map((part) => (part === formula ? svgFormula(part, SIZE) : svgEscape(part)))
            .join(''),
    )
    .join('')
}
