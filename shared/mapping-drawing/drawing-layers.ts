import type { Point, RepeatUnit } from '../chemistry'
import { BEAD_COLOURS, type MappingDocument } from '../mapping'
import { lightTokens, type Svg, svgElement, svgEscape, svgNumber, svgPath } from '../picture'
import { atomLetters, isLettered } from './atom-letters'
import { beadShapes } from './bead-shapes'
import { type BoardLayout, HALO_RADIUS } from './board-layout'
import { bondLines } from './bond-lines'
import { neighbourShapes } from './neighbour-shapes'
import { sharedAtoms } from './shared-atoms'
import { unitMarks } from './unit-marks'
import { BEAD_INKS } from './bead-inks'

const { ink, ink2, ground } = lightTokens
const FAINT_HALO = 0.42
const FAINT_LINES = 0.55

/** The drawing of a mapping with its neighbours, in the units of the board. */
export function drawingLayers(unit: RepeatUnit, board: BoardLayout, document: MappingDocument): Svg {
  const shapes = beadShapes(unit, board, document)
  return [
    ...neighbourShapes(unit, board, document).map(({ positions, shown, halos, stubs, links }) =>
      [
        ...halos.map(({ path, colour }) => svgElement('g', { opacity: FAINT_HALO }, halo(path, colour))),
        svgElement(
          'g',
          { opacity: FAINT_LINES },
          skeleton(unit, positions, (atom) => shown.has(atom)),
          ...links.map((line) => bond(line, ink2)),
          ...stubs.map((line) => bond(line, ink2, '1 4')),
        ),
      ].join(''),
    ),
    ...shapes.map(({ path, colour }) => halo(path, colour)),
    ...sharedAtoms(board, document).map(({ point, sectors }) =>
      svgElement(
        'g',
        { transform: `translate(${point.x} ${point.y})` },
        ...sectors.map(({ colour, path }) => {
          const inks = BEAD_INKS[BEAD_COLOURS[colour]]
          return svgElement('path', { d: path, fill: inks.halo, stroke: inks.edge, 'stroke-width': 1.5 })
        }),
      ),
    ),
    marks(unit, board),
    skeleton(unit, board.positions, () => true),
    ...shapes.map(({ name, colour, site, letter }) =>
      [site ? cross(site) : '', letter ? beadDisc(name, colour, letter) : ''].join(''),
    ),
  ].join('')
}

/** The disc of a bead with its letters. */
export function beadDisc(name: string, colour: number, { x, y }: Point, radius = 11.5): Svg {
  const { fill, edge, letter } = BEAD_INKS[BEAD_COLOURS[colour]]
  const size = Math.min(14, radius * (name.length > 1 ? 1 : 1.2))
  return [
    svgElement('circle', { cx: x, cy: y, r: radius, fill, stroke: edge }),
    svgElement(
      'text',
      {
        x,
        y: y + size * 0.355,
        'text-anchor': 'middle',
        'font-size': size,
        'font-weight': 500,
        fill: letter,
      },
      svgEscape(name),
    ),
  ].join('')
}

/** Where a bead sits. */
export function cross({ x, y }: Point): Svg {
  const d = `M${svgNumber(x - 5)} ${svgNumber(y)}h10M${svgNumber(x)} ${svgNumber(y - 5)}v10`
  return [
    svgPath(d, { stroke: ground, 'stroke-width': 3.4 }),
    svgPath(d, { stroke: ink, 'stroke-width': 1.2 }),
  ].join('')
}

function halo(path: string, colour: number): Svg {
  const inks = BEAD_INKS[BEAD_COLOURS[colour]]
  const round = { 'stroke-linecap': 'round', 'stroke-linejoin': 'round' }
  return [
    svgPath(path, { stroke: inks.edge, 'stroke-width': 2 * HALO_RADIUS + 2.5, ...round }),
    svgPath(path, { stroke: inks.halo, 'stroke-width': 2 * HALO_RADIUS, ...round }),
  ].join('')
}

function bond(
  { from, to }: { readonly from: Point; readonly to: Point },
  stroke: string,
  dashes: string | null = null,
): Svg {
  const ends = { x1: from.x, y1: from.y, x2: to.x, y2: to.y }
  const line = { stroke, 'stroke-width': 1.7, 'stroke-linecap': 'round', 'stroke-dasharray': dashes }
  return svgElement('line', { ...ends, ...line })
}

function skeleton(unit: RepeatUnit, positions: readonly Point[], isShown: (atom: number) => boolean): Svg {
  const lines = unit.bonds
    .filter(({ from, to }) => isShown(from) && isShown(to))
    .flatMap((each) => bondLines(each, positions, (atom) => isLettered(unit, atom)))
  const letters = atomLetters(unit, positions, isShown)
  return [
    ...lines.map((line) => bond(line, ink)),
    ...letters.map(({ element, charge, x, y }) =>
      svgElement(
        'text',
        { x, y: y + 5.2, 'text-anchor': 'middle', 'font-size': 15, 'font-weight': 500, fill: ink },
        svgEscape(element),
        ...(charge === '' ? [] : [svgElement('tspan', { 'font-size': 10, dy: -5 }, svgEscape(charge))]),
      ),
    ),
  ].join('')
}

function marks(unit: RepeatUnit, board: BoardLayout): Svg {
  const { path, n, links } = unitMarks(unit, board)
  const place = {
    x: n.x,
    y: n.y,
    'text-anchor': 'middle',
    'font-size': 15,
    'font-style': 'italic',
    fill: ink,
  }
  return [
    ...links.map(({ from, to }) =>
      bond({ from, to: { x: (from.x + to.x) / 2, y: (from.y + to.y) / 2 } }, ink),
    ),
    svgPath(path, { stroke: ink, 'stroke-width': 1.3 }),
    svgElement('text', place, 'n'),
  ].join('')
}
