import { chemicalNameParts } from '@shared/chemistry/chemical-name'
import { brokenLines, italic, lightTokens, type Svg, svgElement, svgEscape } from '@shared/picture'

/** What a picture or a file of numbers must say so that a year later it is still known what it shows. */
export interface FigureCaption {
  readonly polymer: string
  readonly mapping: string
  /** The terms with their kinds, as in "angle B–E–H". */
  readonly terms: string
  readonly statePoint: string
  /** What else belongs to it, as the number of samples; may be empty. */
  readonly remarks: readonly string[]
  /** Of the demonstration. */
  readonly invented: boolean
}

/** The caption in one sentence each: what, where it comes from, and whether it is invented. */
export function captionSentences({
  polymer,
  mapping,
  terms,
  statePoint,
  remarks,
  invented,
}: FigureCaption): string[] {
  return [
    `${polymer}, ${mapping}: ${terms} at ${statePoint}.`,
    ...remarks.map((remark) => `${remark}.`),
    ...(invented ? ['Invented data (demonstration).'] : []),
  ]
}

const SIZE = 12
const LINE_HEIGHT = 17

/** The caption as lines of text, and the height they take. */
export function captionText(
  caption: FigureCaption,
  left: number,
  top: number,
  width: number,
): { body: Svg; height: number } {
  const lines = brokenLines(captionSentences(caption).join(' '), width, SIZE)
  const body = lines.map((line, index) =>
    svgElement(
      'text',
      { x: left, y: top + SIZE + index * LINE_HEIGHT, 'font-size': SIZE, fill: lightTokens.ink2 },
      ...chemicalNameParts(line).map((part) => (part.italic ? italic(part.text) : svgEscape(part.text))),
    ),
  )
  return { body: body.join(''), height: lines.length * LINE_HEIGHT }
}
