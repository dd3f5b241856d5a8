import { describe, expect, it } from 'vitest'
import type { Place } from '@shared/mapping'
import { bondAnglePairs } from '../../../../server/services/bond-angle-pairs'

/** A place as in 'b e+1': bead e of the next unit. */
const place = (text: string): Place =>
  text.split(' ').map((bead) => {
    const [name, unit = '0'] = bead.split('+')
    return { bead: name, unit: Number(unit) }
  })

const bond = (name: string, ...places: string[]) => ({
  name,
  kind: 'bond' as const,
  places: places.map(place),
})
const angle = (name: string, ...places: string[]) => ({
  name,
  kind: 'angle' as const,
  places: places.map(place),
})

const names = (
  terms: Parameters<typeof bondAnglePairs<ReturnType<typeof bond> | ReturnType<typeof angle>>>[0],
) =>
  bondAnglePairs(terms).map((pair) => `${pair.bond.name} ${pair.angle.name} ${pair.side ? 'side' : 'bead'}`)

describe('bondAnglePairs', () => {
  it('lists the sides of each angle before bonds that only touch it', () => {
    const terms = [
      bond('BB', 'b b+1'),
      bond('BE', 'b e'),
      angle('BBB', 'b b+1 b+2'),
      angle('BBE', 'b b+1 e+1', 'b+1 b e'),
    ]
    expect(names(terms)).toEqual(['BB BBB side', 'BB BBE side', 'BE BBE side', 'BE BBB bead'])
  })

  it('takes a bond in either direction and anywhere along the chain', () => {
    expect(names([bond('EB', 'e b'), angle('BEH', 'b+3 e+3 h+3')])).toEqual(['EB BEH side'])
  })

  it('does not take a bond within a unit for one across its border', () => {
    // b–e within a unit, while the angle runs from b to the e of the next unit.
    expect(names([bond('BE', 'b e'), angle('BEB', 'b e+1 b+2')])).toEqual(['BE BEB bead'])
  })

  it('leaves out pairs that share no bead, and terms that are neither', () => {
    expect(names([bond('XY', 'x y'), angle('BEH', 'b e h')])).toEqual([])
    const dihedral = { name: 'D', kind: 'dihedral' as const, places: [place('b e h t')] }
    expect(bondAnglePairs([bond('BE', 'b e'), dihedral])).toEqual([])
  })
})
