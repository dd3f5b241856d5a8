import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { atomLinks, matchChains, parseRepeatUnit, type RepeatUnit, smilesOrder } from '@shared/chemistry'
import { POLYMERS } from '../mapping/polymers'

/** Whether a match carries every bond of one chain onto a bond of the other. */
function expectMatch(from: RepeatUnit, to: RepeatUnit): void {
  const match = matchChains(from, to)
  if (!match) throw new Error(`${from.smiles} and ${to.smiles} are the same chain`)
  const { atoms, direction } = match
  expect(new Set(atoms.map(({ atom }) => atom)).size).toBe(to.atoms.length)
  from.atoms.forEach(({ element, hydrogens }, index) => {
    expect(to.atoms[atoms[index].atom]).toMatchObject({ element, hydrogens })
  })
  const bonds = new Set(
    atomLinks(to).flatMap(({ from: one, to: other, shift, label }) => [
      `${one} ${other} ${shift} ${label}`,
      `${other} ${one} ${0 - shift} ${label}`,
    ]),
  )
  for (const { from: one, to: other, shift, label } of atomLinks(from)) {
    const [start, end] = [atoms[one], atoms[other]]
    expect(bonds).toContain(
      `${start.atom} ${end.atom} ${direction * shift + end.shift - start.shift} ${label}`,
    )
  }
}

describe('matching chains', () => {
  it.each([
    ['in another order', '*CC(*)C(=O)OCCCCCC', 'CCCCCCOC(=O)C(*)C*'],
    ['from the other end', '*CC(*)c1ccccc1', '*C(c1ccccc1)C*'],
    ['parted at another bond', '*NC(=O)CCCCC*', '*C(=O)CCCCCN*'],
    ['parted inside a group', '*OC(=O)c1ccc(cc1)C(=O)OCC*', '*C(=O)c1ccc(cc1)C(=O)OCCO*'],
    ['with its rings written without aromatic letters', '*CC(*)c1ccccc1', '*CC(*)C1=CC=CC=C1'],
    ['with two bonds between the same atoms of the unit', '*CC*', 'C(*)C*'],
    ['with explicit hydrogens', '*CC*', '*C([H])([H])C*'],
  ])('finds a chain again that is written %s', async (_, one, other) => {
    expectMatch(await parseRepeatUnit(one), await parseRepeatUnit(other))
    expectMatch(await parseRepeatUnit(other), await parseRepeatUnit(one))
  })

  it('leaves a unit matched with itself as it is', async () => {
    for (const smiles of Object.values(POLYMERS)) {
      const unit = await parseRepeatUnit(smiles)
      const identity = unit.atoms.map(({ index }) => ({ atom: index, shift: 0 }))
      expect(matchChains(unit, unit)).toEqual({ atoms: identity, direction: 1 })
    }
  })

  it.each([
    ['*CC(*)C(=O)OC', '*CC(*)OC(C)=O'],
    ['*CC(*)c1ccccc1', '*CCc1ccc(*)cc1'],
    ['*OC(C)C(*)=O', '*OCCC(*)=O'],
    ['*CC*', '*CCCC*'],
    // Head to tail and head to head are different chains of the same atoms.
    ['*CC(C)CC(C)*', '*CC(C)C(C)C*'],
  ])('tells %s and %s apart', async (one, other) => {
    expect(matchChains(await parseRepeatUnit(one), await parseRepeatUnit(other))).toBeNull()
  })

  it('does not depend on the numbering of the atoms', async () => {
    const units = await Promise.all(Object.values(POLYMERS).map(parseRepeatUnit))
    fc.assert(
      fc.property(
        fc.constantFrom(...units),
        fc.infiniteStream(fc.nat()),
        fc.boolean(),
        (unit, keys, turn) => {
          const weights = unit.atoms.map(() => keys.next().value as number)
          const order = unit.atoms.map(({ index }) => index).sort((a, b) => weights[a] - weights[b] || a - b)
          expectMatch(unit, renumbered(unit, order, turn))
        },
      ),
      { numRuns: 60 },
    )
  })
})

it('names heavy atoms and attachment points in the order of the SMILES', async () => {
  expect(smilesOrder(await parseRepeatUnit('*CC(*)C'))).toEqual([null, 0, 1, null, 2])
  expect(smilesOrder(await parseRepeatUnit('C([H])(*)C*'))).toEqual([0, null, 1, null])
})

/** The same chain with its atoms in another order, from the other end if wanted. */
function renumbered(unit: RepeatUnit, order: readonly number[], turn: boolean): RepeatUnit {
  const place = (atom: number): number => order.indexOf(atom)
  const [head, tail] = unit.attachments
  return {
    ...unit,
    atoms: order.map((atom, index) => ({ ...unit.atoms[atom], index })),
    bonds: unit.bonds.map((bond) => ({ ...bond, from: place(bond.from), to: place(bond.to) })),
    attachments: turn ? [place(tail), place(head)] : [place(head), place(tail)],
  }
}
