import { expect, it } from 'vitest'
import { backboneAtoms, parseRepeatUnit, rankClasses, refineClasses } from '@shared/chemistry'

it.each([
  ['*CC(*)C(=O)OCCCCCC', [0, 1]],
  ['*c1ccc(*)cc1', [0, 1, 2, 3, 4, 5]],
  // Both sides of the thiophene ring, nothing of the side chain.
  ['*c1cc(CCCCCC)c(*)s1', [0, 1, 2, 9, 10]],
  ['*C(C)(C)*', [0]],
  ['*NC(=O)CC*', [0, 1, 3, 4]],
  // A ring that hangs on one atom is off the backbone, a spiro ring as well.
  ['*CC1(CCCC1)C*', [0, 1, 6]],
])('the backbone of %s is the atoms between its ends', async (smiles, atoms) => {
  expect(backboneAtoms(await parseRepeatUnit(smiles))).toEqual(atoms)
})

it('ranks classes the same however vertices are numbered', () => {
  const labels = ['O', 'C', 'C', 'N']
  const edges = [
    { from: 0, to: 1 },
    { from: 1, to: 2 },
    { from: 2, to: 3 },
  ]
  const turned = rankClasses(
    labels.toReversed(),
    edges.map(({ from, to }) => ({ from: 3 - from, to: 3 - to })),
  )
  expect(turned.toReversed()).toEqual(rankClasses(labels, edges))
  expect(refineClasses(labels, edges)).toEqual([0, 1, 2, 3])
})
