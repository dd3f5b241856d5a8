import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { inverse, layoutRepeatUnit, moved, parseRepeatUnit } from '@shared/chemistry'
import { motion } from '@shared/chemistry/isometry'

const UNITS = [
  '*CC(*)C(=O)OCCCCCC',
  '*c1ccc(*)cc1',
  '*OCCOC(=O)c1ccc(cc1)C(*)=O',
  '*C*',
  '*CC(*)(C)C(=O)OC',
  '*[Si](C)(C)O*',
]

describe('the layout of a repeat unit', () => {
  it.each(UNITS)(
    '%s: bonds are about 1 long, and the neighbour follows where the tail points',
    async (smiles) => {
      const unit = await parseRepeatUnit(smiles)
      const { positions, ends, next } = await layoutRepeatUnit(smiles)
      expect(positions).toHaveLength(unit.atoms.length)
      for (const { from, to } of unit.bonds) {
        const length = Math.hypot(positions[from].x - positions[to].x, positions[from].y - positions[to].y)
        expect(length).toBeGreaterThan(0.7)
        expect(length).toBeLessThan(1.4)
      }
      const [head] = unit.attachments
      const nextHead = moved(next, positions[head])
      expect(nextHead.x).toBeCloseTo(ends[1].x, 6)
      expect(nextHead.y).toBeCloseTo(ends[1].y, 6)
      expect(ends[1].x).toBeGreaterThan(ends[0].x)
    },
  )

  it('hangs side groups below the backbone', async () => {
    const { positions } = await layoutRepeatUnit('*CC(*)C(=O)OCCCCCC')
    expect(positions.slice(2).every(({ y }) => y > Math.max(positions[0].y, positions[1].y))).toBe(true)
  })
})

describe('motions of the plane', () => {
  it('are taken back by their inverse', () => {
    const number = fc.double({ min: -5, max: 5, noNaN: true })
    const point = fc.record({ x: number, y: number })
    fc.assert(
      fc.property(number, fc.boolean(), point, point, point, (angle, mirrored, from, to, other) => {
        const there = motion(angle, mirrored, from, to)
        expect(moved(there, from).x).toBeCloseTo(to.x, 9)
        const back = moved(inverse(there), moved(there, other))
        expect(back.x).toBeCloseTo(other.x, 9)
        expect(back.y).toBeCloseTo(other.y, 9)
      }),
    )
  })
})
