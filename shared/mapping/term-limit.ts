import { atomLinks, type RepeatUnit } from '../chemistry'
import { InvalidInputError } from '../errors'
import { beadLinks, type BeadLink } from './bead-links'
import type { MappingDocument } from './mapping-document'
import type { MappingProblem } from './mapping-problem'

/**
 * Most places along the chain at which the terms of a mapping may stand: our limit. A backbone bead with 39 side beads,
 * the most branched mapping of 40 beads without shared atoms, has 2,460; forty beads that share all their atoms would
 * have millions, and nobody waits for those.
 */
export const MAX_TERM_PLACES = 5_000

/** Most pairs of beads that bonded atoms may connect: our limit. Without shared atoms each bond of the unit connects one. */
const MAX_BEAD_PAIRS = 10_000

/** Two to four beads in a row. */
const LONGEST_ROW = 4

/**
 * Whether the terms of a mapping stand at more places than we follow. Counting stops at the limit, so that the answer takes
 * milliseconds for any document.
 *
 * @param unit the repeat unit
 * @param document a mapping whose atoms all exist
 */
export function hasTooManyPlaces(unit: RepeatUnit, document: MappingDocument): boolean {
  return beadPairs(unit, document) > MAX_BEAD_PAIRS || exceedsPlaces(document, beadLinks(unit, document))
}

/** The same as something to see on the board: nothing, or one problem. */
export function tooManyPlaces(unit: RepeatUnit, document: MappingDocument): MappingProblem[] {
  if (!hasTooManyPlaces(unit, document)) return []
  return [
    {
      code: 'TERMS_TOO_MANY',
      severity: 'problem',
      title: `The terms would stand at more than ${MAX_TERM_PLACES} places`,
      detail: REMEDY,
      beads: [],
      atoms: [],
    },
  ]
}

/**
 * Refuses a mapping whose terms stand at more places than we follow.
 *
 * @throws {InvalidInputError} MAPPING_INVALID
 */
export function checkTermPlaces(unit: RepeatUnit, document: MappingDocument): void {
  if (!hasTooManyPlaces(unit, document)) return
  throw new InvalidInputError(
    'MAPPING_INVALID',
    `The terms of this mapping would stand at more than ${MAX_TERM_PLACES} places along the chain. ${REMEDY}`,
    { field: 'document' },
  )
}

const REMEDY =
  'Too many beads are bonded to one another: let fewer beads share atoms, and keep the atoms of each bead together.'

/** Pairs of beads that bonded atoms connect, one pair as often as bonds do. */
function beadPairs(unit: RepeatUnit, document: MappingDocument): number {
  const holders = new Float64Array(unit.atoms.length)
  for (const { atoms } of document.beads) for (const { atom } of atoms) holders[atom]++
  return atomLinks(unit).reduce((pairs, { from, to }) => pairs + holders[from] * holders[to], 0)
}

function exceedsPlaces(document: MappingDocument, links: readonly BeadLink[]): boolean {
  const linksFrom: BeadLink[][] = document.beads.map(() => [])
  for (const link of links) linksFrom[link.from].push(link)
  // A place is walked once from each end.
  let left = 2 * MAX_TERM_PLACES
  const walk = (row: readonly { bead: number; unit: number }[]): void => {
    const last = row[row.length - 1]
    for (const { to, shift } of linksFrom[last.bead]) {
      const next = { bead: to, unit: last.unit + shift }
      if (row.some(({ bead, unit }) => bead === next.bead && unit === next.unit)) continue
      if (--left < 0) return
      if (row.length + 1 < LONGEST_ROW) walk([...row, next])
    }
  }
  document.beads.forEach((_, bead) => walk([{ bead, unit: 0 }]))
  return left < 0
}
