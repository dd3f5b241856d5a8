import type { Point } from '../chemistry'
import type { MappingDocument } from '../mapping'
import { type BoardLayout, HALO_RADIUS } from './board-layout'

/** The part of a shared atom that one bead holds. */
export interface AtomSector {
  readonly bead: string
  readonly colour: number
  /** A sector of the atom's disc, as large as the share. */
  readonly path: string
}

/** An atom of the drawn unit that several beads hold. */
export interface SharedAtom {
  readonly atom: number
  readonly point: Point
  readonly sectors: readonly AtomSector[]
}

/** The shared atoms with a sector for each bead, from the top and clockwise in the order of the beads. */
export function sharedAtoms({ positions }: BoardLayout, { beads }: MappingDocument): SharedAtom[] {
  return positions.flatMap((point, atom) => {
    const holders = beads.flatMap(({ id, colour, atoms }) =>
      atoms
        .filter((held) => held.atom === atom && held.unit === 0)
        .map(({ weight }) => ({ id, colour, weight })),
    )
    if (holders.length < 2) return []
    const whole = holders.reduce((sum, { weight }) => sum + weight, 0)
    let done = 0
    const sectors = holders.map(({ id, colour, weight }): AtomSector => {
      const from = done / whole
      done += weight
      return { bead: id, colour, path: sectorPath(from, done / whole) }
    })
    return [{ atom, point, sectors }]
  })
}

/** From one part of a turn to another, about the origin. */
function sectorPath(from: number, to: number): string {
  const rim = (part: number): string => {
    const angle = 2 * Math.PI * part - Math.PI / 2
    return `${(HALO_RADIUS * Math.cos(angle)).toFixed(2)} ${(HALO_RADIUS * Math.sin(angle)).toFixed(2)}`
  }
  return `M0 0L${rim(from)}A${HALO_RADIUS} ${HALO_RADIUS} 0 ${to - from > 0.5 ? 1 : 0} 1 ${rim(to)}Z`
}
