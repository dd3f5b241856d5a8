import { expect, it } from 'vitest'
import { parseRepeatUnit } from '@shared/chemistry'
import { beadGraph } from '@shared/mapping'
import { bead, HEXYL_ACRYLATE, mapping, THREE_TO_ONE } from './hexyl-acrylate'

const acrylate = await parseRepeatUnit(HEXYL_ACRYLATE)

it('joins the beads of each unit and the backbones of neighbours', () => {
  const { beads, bonds } = beadGraph(acrylate, THREE_TO_ONE, 3)
  expect(beads).toHaveLength(9)
  const name = (index: number): string => `${beads[index].bead}${beads[index].unit}`
  expect(bonds.map(({ from, to }) => `${name(from)} ${name(to)}`).sort()).toEqual(
    ['b0 e0', 'e0 h0', 'b1 e1', 'e1 h1', 'b2 e2', 'e2 h2', 'b0 b1', 'b1 b2'].sort(),
  )
})

it('joins units that are two apart when a bead reaches over the border', async () => {
  const unit = await parseRepeatUnit('*CC*')
  const long = bead('A', [], {
    atoms: [
      { atom: 0, weight: 0.5, unit: 0 },
      { atom: 1, weight: 1, unit: 0 },
      { atom: 0, weight: 0.5, unit: 1 },
    ],
  })
  const { bonds } = beadGraph(unit, mapping(long), 3)
  expect(bonds).toEqual([
    { from: 0, to: 1 },
    { from: 1, to: 2 },
  ])
})

it('has no bonds without neighbours', () => {
  expect(beadGraph(acrylate, mapping(bead('B', [0, 1])), 1)).toEqual({
    beads: [{ bead: 'b', unit: 0 }],
    bonds: [],
  })
  expect(() => beadGraph(acrylate, THREE_TO_ONE, 0)).toThrow(
    expect.objectContaining({ code: 'SETTING_INVALID' }),
  )
})
