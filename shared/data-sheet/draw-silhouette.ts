import { lightTokens, type Svg, svgNumber, svgPath } from '../picture'
import { curveLine, type FigurePoint } from './figure-lines'
import { mapInk } from './map-inks'
import { sheetSvg } from './sheet-svg'

const WIDTH = 72
const HEIGHT = 24
const FLOOR = HEIGHT - 2.5
/** The grid of the small picture of a joint table. */
const GRID = { columns: 21, rows: 12 } as const
const DENSITY_POWER = 0.6

/** The small picture of a table: the potential to 25 kJ/mol, or where two coordinates are together. */
export function drawSilhouette(silhouette: readonly number[], joint: boolean, name: string): Svg {
  return sheetSvg(WIDTH, HEIGHT, `Shape of ${name}`, ...(joint ? cells(silhouette) : curve(silhouette)))
}

function curve(silhouette: readonly number[]): Svg[] {
  const step = WIDTH / (silhouette.length - 1)
  const points = silhouette.map((energy, index): FigurePoint => [index * step, energy])
  const line = curveLine(points, { limit: 0.999, place: ([x, energy]) => [x, FLOOR - energy * (FLOOR - 1)] })
  return [
    svgPath(`M0 ${HEIGHT - 0.5}H${WIDTH}`, { stroke: lightTokens.edge, 'stroke-width': 0.6 }),
    svgPath(line, { stroke: lightTokens.model, 'stroke-width': 1.2, 'stroke-linejoin': 'round' }),
  ]
}

function cells(silhouette: readonly number[]): Svg[] {
  const [width, height] = [WIDTH / GRID.columns, HEIGHT / GRID.rows]
  const inks = new Map<string, string>()
  silhouette.forEach((weight, cell) => {
    if (weight < 0.005) return
    const ink = mapInk(weight ** DENSITY_POWER)
    const x = Math.floor(cell / GRID.rows) * width
    const y = HEIGHT - ((cell % GRID.rows) + 1) * height
    const square = `M${svgNumber(x)} ${svgNumber(y)}h${svgNumber(width + 0.1)}v${svgNumber(height + 0.1)}h${svgNumber(-width - 0.1)}z`
    inks.set(ink, (inks.get(ink) ?? '') + square)
  })
  return [...inks].map(([fill, d]) => svgPath(d, { fill }))
}
