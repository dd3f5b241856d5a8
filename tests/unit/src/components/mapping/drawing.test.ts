import { describe, expect, it } from 'vitest'
import { layoutRepeatUnit, parseRepeatUnit } from '@shared/chemistry'
import { addBead, giveAtoms } from '@shared/mapping'
import { atomName, atomWords } from '@/components/mapping/atom-words'
import { atomTowards } from '@/components/mapping/drawing/atom-towards'
import {
  atomPoint,
  backboneAtoms,
  beadPath,
  beadShapes,
  boardLayout,
  bondLines,
  HALO_RADIUS,
  haloPath,
  letterPlace,
  notePlace,
  sitePoint,
} from '@shared/mapping-drawing'

const ACRYLATE = '*CC(*)C(=O)OCCCCCC'
const unit = await parseRepeatUnit(ACRYLATE)
const board = boardLayout(unit, await layoutRepeatUnit(ACRYLATE))
const empty = addBead(addBead(addBead({ version: 1, beads: [] }, 'b'), 'e'), 'h')
const mapping = giveAtoms(giveAtoms(giveAtoms(empty, 'b', [0, 1]), 'e', [2, 3, 4]), 'h', [5, 6, 7, 8, 9, 10])

describe('the board', () => {
  it('frames the unit and the backbones of its neighbours', () => {
    const { box, positions } = board
    expect(
      positions.every(
        ({ x, y }) => x > box.x && x < box.x + box.width && y > box.y && y < box.y + box.height,
      ),
    ).toBe(true)
    expect([...board.backbone].sort()).toEqual([0, 1])
  })

  it('counts rings on the way among the backbone', async () => {
    const ring = await parseRepeatUnit('*c1ccc(*)cc1')
    expect(backboneAtoms(ring).size).toBe(6)
  })

  it('draws two lines for a double bond, shortened at letters', () => {
    const double = unit.bonds.find(({ order }) => order === 2)
    if (double === undefined) throw new Error('The ester has a double bond.')
    const lettered = (atom: number) => unit.atoms[atom].element === 'O'
    const lines = bondLines(double, board.positions, lettered)
    expect(lines).toHaveLength(2)
    const length = Math.hypot(lines[0].to.x - lines[0].from.x, lines[0].to.y - lines[0].from.y)
    expect(length).toBeCloseTo(50 - 12, 0)
  })
})

describe('a halo', () => {
  it('follows the bonds of its bead and dots an atom that none reaches', () => {
    expect(haloPath(unit, board.positions, [0, 1]).match(/M/g)).toHaveLength(1)
    expect(haloPath(unit, board.positions, [0, 10]).match(/l\.01 0/g)).toHaveLength(2)
    expect(haloPath(unit, board.positions, [])).toBe('')
  })

  it('has its site where the rule says', () => {
    const [bead] = mapping.beads
    const middle = sitePoint(unit, board, { ...bead, site: { rule: 'geometry' } })
    expect(middle?.x).toBeCloseTo((board.positions[0].x + board.positions[1].x) / 2, 9)
    const mass = sitePoint(unit, board, bead)
    // CH2 is heavier than CH: the site leans towards it.
    expect(Math.abs((mass?.x ?? 0) - board.positions[0].x)).toBeLessThan(
      Math.abs((middle?.x ?? 0) - board.positions[0].x),
    )
    expect(sitePoint(unit, board, { ...bead, site: { rule: 'atom', atom: 1 } })).toEqual(board.positions[1])
    expect(sitePoint(unit, board, { ...bead, atoms: [] })).toBeNull()
  })

  it('reaches over the border where its bead holds atoms of the next unit', () => {
    const across = [
      { atom: 1, weight: 1, unit: 0 },
      { atom: 0, weight: 1, unit: 1 },
    ]
    // A dot for each atom, and the bond between the units.
    expect(beadPath(unit, board, across).match(/M/g)).toHaveLength(3)
    const reaching = { ...mapping.beads[0], atoms: across, site: { rule: 'geometry' as const } }
    const { x } = sitePoint(unit, board, reaching) ?? { x: 0 }
    expect(x).toBeCloseTo((board.positions[1].x + atomPoint(board, 0, 1).x) / 2, 9)
    expect(x).toBeGreaterThan(board.positions[1].x)
    const [shape] = beadShapes(unit, board, { version: 1, beads: [reaching] })
    const rims = across.map(({ atom, unit: at }) => {
      const point = atomPoint(board, atom, at)
      return Math.hypot(point.x - (shape.letter?.x ?? 0), point.y - (shape.letter?.y ?? 0))
    })
    expect(Math.min(...rims)).toBeCloseTo(HALO_RADIUS + 2, 6)
  })

  it('has its letter on the rim, off every atom', () => {
    for (const bead of mapping.beads) {
      const held = bead.atoms.map(({ atom }) => atom)
      const place = letterPlace(held, board.positions, unit.bonds, [])
      const nearest = Math.min(...board.positions.map(({ x, y }) => Math.hypot(x - place.x, y - place.y)))
      expect(nearest).toBeGreaterThanOrEqual(HALO_RADIUS)
    }
  })

  it('leaves room for a note inside the frame and off the atoms', () => {
    const size = { width: 200, height: 100 }
    const frame = { x: -300, y: -100, width: 900, height: 600 }
    const { x, y } = notePlace(board.positions[10], size, frame, board.positions)
    expect(x).toBeGreaterThanOrEqual(frame.x)
    expect(y + size.height).toBeLessThanOrEqual(frame.y + frame.height)
    const covered = board.positions.some(
      (atom) => atom.x > x && atom.x < x + size.width && atom.y > y && atom.y < y + size.height,
    )
    expect(covered).toBe(false)
  })
})

describe('arrows', () => {
  it('go to the nearest atom in their direction and stay where there is none', () => {
    expect(atomTowards(board.positions, 0, 'ArrowRight')).toBe(1)
    expect(atomTowards(board.positions, 1, 'ArrowDown')).toBe(2)
    expect(atomTowards(board.positions, 10, 'ArrowDown')).toBe(10)
  })
})

describe('words', () => {
  it('draw runs of atoms together', () => {
    expect(mapping.beads.map((bead) => atomWords(unit, bead))).toEqual(['C1, C2', 'C3, O1, O2', 'C4–C9'])
  })

  it('say shares and neighbouring units', () => {
    const bead = { ...mapping.beads[0], atoms: [{ atom: 0, weight: 0.5, unit: 1 }] }
    expect(atomWords(unit, bead)).toBe('C1 × 0.5 of the next unit')
  })

  it('name an atom with the bead it is in', () => {
    expect(atomName(unit, mapping, 3)).toBe('O1, in bead B')
    expect(atomName(unit, empty, 3)).toBe('O1, in no bead')
  })
})
