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

/** What a coordinate is and how the layout counts it. */
export function readingSentence({ angle, dihedral }: Layout, kind: CoordinateKind): string {
  if (kind === 'angle' && angle.reading === 'supplement') {
    return 'bond angle: supplement of the internal angle at the middle bead, 0 is straight'
  }
  if (kind !== 'dihedral' || (dihedral.zero === 'cis' && dihedral.range === '-180..180')) {
    return coordinateSentence(kind)
  }
  const [zero, half] = dihedral.zero === 'cis' ? ['cis', 'trans'] : ['trans', 'cis']
  const turn = dihedral.range === '0..360' ? ', counted from 0 to 360 deg' : ''
  return `dihedral: 0 is ${zero}, 180 deg is ${half}, sign by the right-hand rule (IUPAC)${turn}`
}
