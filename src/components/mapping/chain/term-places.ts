import type { Point, RepeatUnit } from '@shared/chemistry'
import { beadLinks, type BeadLink, type DerivedTerm, type MappingDocument, type Place } from '@shared/mapping'
import { BEAD_RADIUS, CHAIN_UNITS, type ChainLayout } from './chain-layout'

/** What a bond of a place says about itself: the end of the bead it is reached by, such as CH2. */
export interface PlaceNote extends Point {
  readonly text: string
}

/** The places of a term on the drawn chain. */
export interface TermPlaces {
  /** One row of points per place. */
  readonly rows: readonly (readonly Point[])[]
  /** At the bonds by which places that differ can be told apart. */
  readonly notes: readonly PlaceNote[]
}

/** Room that a note needs between two discs, px. */
const NOTE_ROOM = 66

/** Where a term stands on the drawn chain: each place about the middle unit, moved where that brings it whole onto the drawing. */
export function termPlaces(
  term: DerivedTerm,
  layout: ChainLayout,
  unit: RepeatUnit,
  document: MappingDocument,
): TermPlaces {
  const first = new Map(layout.beads.filter((bead) => bead.unit === 0).map((bead) => [bead.bead, bead]))
  const rowOf = (place: Place): Point[] => {
    const shift = placeShift(place)
    return place.flatMap(({ bead, unit: at }) => {
      const point = first.get(bead)
      return point ? [{ x: point.x + (at + shift) * layout.unitWidth, y: point.y }] : []
    })
  }
  const rows = term.places.map(rowOf)
  return { rows, notes: placeNotes(term, rows, unit, document) }
}

function placeShift(place: Place): number {
  const last = Math.max(...place.map(({ unit }) => unit))
  const middle = Math.floor(CHAIN_UNITS / 2) - place[Math.floor((place.length - 1) / 2)].unit
  return Math.max(0, Math.min(CHAIN_UNITS - 1 - last, middle))
}

/** Notes at the bonds whose atoms differ from class to class of the places; none where there is no room. */
function placeNotes(
  term: DerivedTerm,
  rows: readonly (readonly Point[])[],
  unit: RepeatUnit,
  document: MappingDocument,
): PlaceNote[] {
  const classes = [...new Set(term.placeClasses)]
  if (classes.length < 2) return []
  const index = new Map(document.beads.map(({ id }, bead) => [id, bead]))
  const all = beadLinks(unit, document)
  const examples = classes.map((each) => term.placeClasses.indexOf(each))
  const texts = examples.map((example) => {
    const place = term.places[example]
    return place.slice(1).map((next, step) => {
      const here = place[step]
      const link = all.find(
        ({ from, to, shift }) =>
          from === index.get(here.bead) && to === index.get(next.bead) && shift === next.unit - here.unit,
      )
      return link ? reachedBy(link, unit, step, place.length) : ''
    })
  })
  return examples.flatMap((example, each) =>
    texts[each].flatMap((text, step) => {
      const [from, to] = [rows[example][step], rows[example][step + 1]]
      const room = Math.hypot(to.x - from.x, to.y - from.y) - 2 * BEAD_RADIUS
      const same = texts.every((other) => other[step] === texts[0][step])
      if (text === '' || same || room < NOTE_ROOM) return []
      return [{ text, x: (from.x + to.x) / 2, y: (from.y + to.y) / 2 }]
    }),
  )
}

/** The atom of the bead nearer to the middle of the row; both where they are equally near. */
function reachedBy({ atomBonds }: BeadLink, unit: RepeatUnit, step: number, length: number): string {
  if (atomBonds.length !== 1) return ''
  const [{ from, to }] = atomBonds
  const group = (atom: number): string => {
    const { element, hydrogens } = unit.atoms[atom]
    return `${element}${hydrogens > 0 ? 'H' : ''}${hydrogens > 1 ? hydrogens : ''}`
  }
  const middle = (length - 1) / 2
  const nearer = Math.abs(step - middle) - Math.abs(step + 1 - middle)
  if (nearer === 0) return `${group(from)} to ${group(to)}`
  return `by its ${group(nearer < 0 ? from : to)}`
}
