import { coordinateSentence } from '../tables'
import type { CoordinateKind } from '../units'
import { unitWords } from './column-names'
import type { Layout } from './layout'

/** How a layout counts a coordinate and in what units, in the letters of a text file. */
export interface LayoutWording {
  readonly coordinate: string
  readonly units: string
}

/** The sentences of the comment lines that depend on the layout (`tableComments`). */
export function layoutWording(layout: Layout, kind: CoordinateKind): LayoutWording {
  const { coordinate, energy, force } = unitWords(layout, kind)
  const hasDerivative = layout.writing === 'template' || layout.columns.includes('derivative')
  const hasForce = layout.writing === 'template' || layout.columns.includes('force')
  const per = force.split('/').at(-1)
  const ofForce = `${force.slice(0, force.lastIndexOf('/'))} per ${per}`
  const parts = [
    `coordinate in ${coordinate}`,
    `energy in ${energy}`,
    hasForce && `force = -dE/dcoordinate in ${ofForce}`,
    hasDerivative && `derivative = dE/dcoordinate in ${ofForce}`,
  ]
  return {
    coordinate: readingSentence(layout, kind),
    units: parts.filter((part) => part !== false).join(', '),
  }
}

/** As `layoutWording`, for the two coordinates of a joint table. */
export interface JointLayoutWording {
  readonly x: string
  readonly y: string
  readonly units: string
}

/** The sentences of the comment lines of a joint table that depend on the layout (`jointTableComments`). */
export function jointLayoutWording(
  layout: Layout,
  kinds: readonly [CoordinateKind, CoordinateKind],
): JointLayoutWording {
  const [x, y] = kinds.map((kind) => unitWords(layout, kind))
  const units = [
    `x in ${x.coordinate}`,
    `y in ${y.coordinate}`,
    `energy in ${x.energy}`,
    `xforce = -dE/dx in ${x.force}`,
    `yforce = -dE/dy in ${y.force}`,
  ]
  return {
    x: readingSentence(layout, kinds[0]),
    y: readingSentence(layout, kinds[1]),
    units: `${units.join(', ')}; a derivative is minus a force`,
  }
}

/** What a coordinate is and how the layout counts it. */
export function readingSentence({ angle, dihedral }: Layout, kind: CoordinateKind): string {
  if (kind === 'angle' && angle.reading === 'supplement') {
    return 'bond angle: supplement of the internal angle at the middle bead, 0 is straight; formulas below count the internal angle'
  }
  if (kind !== 'dihedral' || (dihedral.zero === 'cis' && dihedral.range === '-180..180')) {
    return coordinateSentence(kind)
  }
  const formulas = dihedral.zero === 'trans' ? '; formulas below count from cis' : ''
  const [zero, half] = dihedral.zero === 'cis' ? ['cis', 'trans'] : ['trans', 'cis']
  const turn = dihedral.range === '0..360' ? ', counted from 0 to 360 deg' : ''
  return `dihedral: 0 is ${zero}, 180 deg is ${half}, sign by the right-hand rule (IUPAC)${turn}${formulas}`
}
