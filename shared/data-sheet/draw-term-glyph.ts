import type { SheetGlyphBead } from '../contracts/data-sheet'
import { beadDisc } from '../mapping-drawing'
import { lightTokens, type Svg, svgElement, svgEscape, svgNumber, svgPath } from '../picture'
import { sheetSvg } from './sheet-svg'

const RADIUS = 7.5
const HALF = RADIUS + 1
const FAINT = 0.5
/** Step along and half the rise of the zigzag, in bead radii, for one to four beads. */
const SHAPES: Readonly<Record<number, { step: number; rise: number }>> = {
  1: { step: 0, rise: 0 },
  2: { step: 2.7, rise: 0 },
  3: { step: 2.4, rise: 0.75 },
  4: { step: 2.7, rise: 0.67 },
}

interface Placed {
  readonly x: number
  readonly y: number
}

/**
 * The beads of a term on their thread, or a bead alone; of a joint table those of the longer term, with the shorter one's thread thickened where
 * it takes part.
 *
 * @param rows one or two rows of beads
 * @param faint for a term that has no table
 */
export function drawTermGlyph(
  rows: readonly (readonly SheetGlyphBead[])[],
  name: string,
  faint = false,
): Svg {
  const [beads, other = null] = [...rows].sort((one, two) => two.length - one.length)
  const { step, rise } = SHAPES[beads.length]
  const [width, height] = [2 * HALF + (beads.length - 1) * step * RADIUS, 2 * (HALF + rise * RADIUS)]
  const points = beads.map((_, index): Placed => ({
    x: HALF + index * step * RADIUS,
    y: height / 2 + (index % 2 === 0 ? 1 : -1) * rise * RADIUS,
  }))
  const thread = { stroke: lightTokens.ink2, 'stroke-linecap': 'round', 'stroke-linejoin': 'round' }
  const shared = other === null ? [] : sharedPart(beads, other).map((index) => points[index])
  const parts = [
    svgPath(through(points), { ...thread, 'stroke-width': 1.2 }),
    ...(shared.length > 1 ? [svgPath(through(shared), { ...thread, 'stroke-width': 3.6 })] : []),
    ...(beads.length === 4 ? [collar(points[1], points[2])] : []),
    ...beads.map((bead, index) => disc(bead, points[index])),
  ]
  return sheetSvg(
    round(width),
    round(height),
    name,
    ...(faint ? [svgElement('g', { opacity: FAINT }, ...parts)] : parts),
  )
}

/** Where the shorter sequence lies in the longer one, in either direction; empty where it does not. */
function sharedPart(beads: readonly SheetGlyphBead[], other: readonly SheetGlyphBead[]): number[] {
  const names = other.map((bead) => bead.name)
  for (let start = 0; start + names.length <= beads.length; start++) {
    const here = beads.slice(start, start + names.length).map((bead) => bead.name)
    if ([names, [...names].reverse()].some((each) => each.every((name, at) => name === here[at]))) {
      return names.map((_, at) => start + at)
    }
  }
  return []
}

function disc({ name, colour }: SheetGlyphBead, { x, y }: Placed): Svg {
  if (colour !== null) return beadDisc(name, colour, { x, y }, RADIUS)
  const { ink3, surface, ink } = lightTokens
  return [
    svgElement('circle', {
      cx: x,
      cy: y,
      r: RADIUS,
      fill: surface,
      stroke: ink3,
      'stroke-dasharray': '2 1.5',
    }),
    svgElement('text', { x, y: y + 2.8, 'text-anchor': 'middle', fill: ink }, svgEscape(name)),
  ].join('')
}

/** The collar on the bond that a dihedral turns about. */
function collar(from: Placed, to: Placed): Svg {
  const [x, y] = [(from.x + to.x) / 2, (from.y + to.y) / 2]
  const tilt = (Math.atan2(to.y - from.y, to.x - from.x) * 180) / Math.PI
  return svgElement('ellipse', {
    cx: x,
    cy: y,
    rx: 0.21 * RADIUS,
    ry: 0.72 * RADIUS,
    transform: `rotate(${svgNumber(tilt)} ${svgNumber(x)} ${svgNumber(y)})`,
    fill: '#FFFFFF',
    stroke: lightTokens.ink2,
    'stroke-width': 0.9,
  })
}

const through = (points: readonly Placed[]): string =>
  `M${points.map(({ x, y }) => `${svgNumber(x)} ${svgNumber(y)}`).join('L')}`
const round = (value: number): number => Math.round(value * 10) / 10
