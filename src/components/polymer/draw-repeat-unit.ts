const SVG = 'http://www.w3.org/2000/svg'
const BOND_LENGTH = 30
const FONT = "'Fira Sans', 'Fira Signs', sans-serif"

interface Point {
  x: number
  y: number
}

/** What is read of the drawing library's graph; it ships no types for it. */
interface DrawnVertex {
  id: number
  position: Point
  neighbours: number[]
  value: { element: string; isDrawn?: boolean }
}
interface Preprocessor {
  graph: { vertices: DrawnVertex[] }
  rings: { center: Point }[]
  processGraph: () => void
}

/** A drawn repeat unit: an SVG element of its own size, and how large it wants to be at one to one. */
export interface DrawnRepeatUnit {
  readonly svg: SVGSVGElement
  readonly width: number
  readonly height: number
}

const theme = Object.fromEntries(
  ['C', 'O', 'N', 'H', 'F', 'CL', 'BR', 'I', 'P', 'S', 'B', 'SI', 'FOREGROUND'].map((element) => [
    element,
    'var(--ink)',
  ]),
)

/**
 * Turns the unit so that the line from the first `*` to the second lies level and the side groups hang below it. A unit with
 * stereo centres is turned by half a turn instead of mirrored: its wedges are already decided.
 */
const layLevel = ({ graph: { vertices }, rings }: Preprocessor, chiral: boolean): void => {
  const [first, second] = vertices.filter(({ value }) => value.element === '*')
  if (!first || !second) return
  const origin = { ...first.position }
  const angle = Math.atan2(second.position.y - origin.y, second.position.x - origin.x)
  const [cos, sin] = [Math.cos(-angle), Math.sin(-angle)]
  const points = [...vertices.map(({ position }) => position), ...rings.map(({ center }) => center)]
  for (const point of points) {
    const [dx, dy] = [point.x - origin.x, point.y - origin.y]
    point.x = dx * cos - dy * sin
    point.y = dx * sin + dy * cos
  }
  const hanging = vertices.reduce((sum, { position }) => sum + position.y, 0)
  if (hanging >= 0) return
  for (const point of points) {
    point.y = -point.y
    if (chiral) point.x = -point.x
  }
}

const element = (name: string, attributes: Record<string, string | number>, text = ''): SVGElement => {
  const node = document.createElementNS(SVG, name)
  for (const [key, value] of Object.entries(attributes)) node.setAttribute(key, String(value))
  node.textContent = text
  return node
}

const extent = (vertices: readonly DrawnVertex[], padding: number) => {
  const xs = vertices.map(({ position }) => position.x)
  const ys = vertices.map(({ position }) => position.y)
  const [left, top] = [Math.min(...xs) - padding, Math.min(...ys) - padding]
  return { left, top, right: Math.max(...xs) + padding, bottom: Math.max(...ys) + padding }
}

/** Corner marks over the two bonds that leave the unit, and the n of a repeat unit. */
const brackets = (vertices: readonly DrawnVertex[]): SVGElement[] => {
  const ends = vertices.filter(({ value }) => value.element === '*')
  const half = BOND_LENGTH * 0.62
  return ends.flatMap((end, index) => {
    const anchor = vertices.find(({ id }) => id === end.neighbours[0])
    if (!anchor) return []
    const x = anchor.position.x + (end.position.x - anchor.position.x) * 0.58
    const y = anchor.position.y + (end.position.y - anchor.position.y) * 0.58
    const inward = anchor.position.x >= x ? 5 : -5
    const mark = element('path', {
      d: `M${x + inward} ${y - half}H${x}V${y + half}h${inward}`,
      fill: 'none',
      stroke: 'var(--ink2)',
      'stroke-width': 1,
    })
    if (index === 0) return [mark]
    const n = element(
      'text',
      {
        x: x - Math.sign(inward) * 5,
        y: y + half + 4,
        'font-size': 13,
        'font-style': 'italic',
        fill: 'var(--ink2)',
        'text-anchor': inward < 0 ? 'start' : 'end',
      },
      'n',
    )
    return [mark, n]
  })
}

/** The library's own style sheet would reach the whole page: its sizes move onto the letters instead. */
const ownStyle = (svg: SVGSVGElement): void => {
  svg.querySelectorAll('style').forEach((style) => style.remove())
  svg.querySelectorAll<SVGElement>('.element').forEach((text) => {
    text.removeAttribute('class')
    text.style.font = `15px ${FONT}`
  })
  svg.querySelectorAll<SVGElement>('.sub').forEach((text) => {
    text.removeAttribute('class')
    text.style.font = `11px ${FONT}`
  })
  svg.querySelectorAll('text').forEach((text) => {
    if (text.textContent.trim() === '*') text.remove()
  })
}

/**
 * Draws a repeat unit in the colours of the theme (they are CSS variables: nothing is drawn again when the theme changes),
 * laid level, with brackets over the bonds to its neighbours.
 *
 * @throws what the reader throws for a SMILES it cannot read
 */
export const drawRepeatUnit = async (smiles: string): Promise<DrawnRepeatUnit> => {
  const { default: SmilesDrawer } = await import('smiles-drawer')
  const drawer = new SmilesDrawer.SvgDrawer({
    bondLength: BOND_LENGTH,
    bondThickness: 1.5,
    bondSpacing: 5,
    shortBondLength: 0.8,
    fontSizeLarge: 11,
    fontSizeSmall: 8,
    fontFamily: FONT,
    padding: 24,
    compactDrawing: false,
    terminalCarbons: false,
    explicitHydrogens: false,
    isomeric: true,
    themes: { beadwright: { ...theme, '*': 'var(--ink3)', BACKGROUND: 'transparent' } },
  })
  const preprocessor = drawer.preprocessor as unknown as Preprocessor
  const process = preprocessor.processGraph.bind(preprocessor)
  preprocessor.processGraph = () => {
    process()
    layLevel(preprocessor, smiles.includes('@'))
  }
  const svg = document.createElementNS(SVG, 'svg')
  drawer.draw(SmilesDrawer.Parser.parse(smiles), svg, 'beadwright')
  ownStyle(svg)
  const { vertices } = preprocessor.graph
  svg.append(...brackets(vertices))
  const box = extent(vertices, 20)
  const [width, height] = [box.right - box.left, box.bottom - box.top]
  svg.removeAttribute('style')
  svg.setAttribute('viewBox', `${box.left} ${box.top} ${width} ${height}`)
  return { svg, width, height }
}
