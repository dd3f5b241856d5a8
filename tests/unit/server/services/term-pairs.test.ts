import { describe, expect, it } from 'vitest'
import type { Place } from '@shared/mapping'
import { termPairs } from '../../../../server/services/term-pairs'

/** A place as in 'b e+1': bead e of the next unit. */
const place = (text: string): Place =>
  text.split(' ').map((bead) => {
    const [name, unit = '0'] = bead.split('+')
    return { bead: name, unit: Number(unit) }
  })

const termOf =
  (kind: 'bond' | 'angle' | 'dihedral') =>
  (name: string, ...places: string[]) => ({ name, kind, places: places.map(place) })
const [bond, angle, dihedral] = [termOf('bond'), termOf('angle'), termOf('dihedral')]

const names = (terms: ReturnType<typeof bond>[]) =>
  termPairs(terms).map(({ first, second, sharedBeads }) => `${first.name} ${second.name} ${sharedBeads}`)

describe('termPairs', () => {
  it('lists the sides of each angle before bonds that only touch it, and both before other kinds', () => {
    const terms = [
      bond('BB', 'b b+1'),
      bond('BE', 'b e'),
      angle('BBB', 'b b+1 b+2'),
      angle('BBE', 'b b+1 e+1', 'b+1 b e'),
    ]
    expect(names(terms)).toEqual(['BB BBB 2', 'BB BBE 2', 'BE BBE 2', 'BE BBB 1', 'BB BE 1', 'BBB BBE 2'])
  })

  it('lists every combination of kinds, the shorter term first', () => {
    const terms = [
      dihedral('D1', 'a b c d'),
      dihedral('D2', 'b c d e'),
      angle('A', 'a b c'),
      bond('B', 'a b'),
    ]
    expect(names(terms)).toEqual(['B A 2', 'A D1 3', 'A D2 2', 'D1 D2 3', 'B D1 2', 'B D2 1'])
  })

  it('takes a bond in either direction and anywhere along the chain', () => {
    expect(names([bond('EB', 'e b'), angle('BEH', 'b+3 e+3 h+3')])).toEqual(['EB BEH 2'])
  })

  it('does not take a bond within a unit for one across its border', () => {
    // b–e within a unit, while the angle runs from b to the e of the next unit.
    expect(names([bond('BE', 'b e'), angle('BEB', 'b e+1 b+2')])).toEqual(['BE BEB 1'])
  })

  it('leaves out pairs that share no bead, and no term is its own partner', () => {
    expect(names([bond('XY', 'x y'), angle('BEH', 'b e h'), dihedral('D', 'p q r s')])).toEqual([])
    expect(names([bond('BB', 'b b+1')])).toEqual([])
  })
})
