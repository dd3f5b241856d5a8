import { describe, expect, it } from 'vitest'
import { parseRepeatUnit, type RepeatUnit } from '@shared/chemistry'
import type { MappingDocument } from '@shared/mapping'
import { chainLayout, chainScale, type ChainLayout } from '@/components/mapping/chain/chain-layout'
import { chainSentence } from '@/components/mapping/chain/chain-sentence'
import { countCollisions } from '@/components/mapping/chain/count-collisions'
import {
  bead,
  FIVE_TO_ONE,
  HEXYL_ACRYLATE,
  mapping,
  THREE_TO_ONE,
} from '../../../../shared/mapping/hexyl-acrylate'

const desk = { width: 680, height: 134 }
const phone = { width: 358, height: 420 }
const acrylate = await parseRepeatUnit(HEXYL_ACRYLATE)
const styrene = await parseRepeatUnit('*CC(*)c1ccccc1')
const phenylene = await parseRepeatUnit('*c1ccc(*)cc1')
const longSide = await parseRepeatUnit('*CC(*)C(=O)OCCCCCCCCCCCCCCCCCCCC')

const STYRENE = mapping(bead('B', [0, 1]), bead('R1', [2, 3]), bead('R2', [4, 5]), bead('R3', [6, 7]))
const PHENYLENE = mapping(...[0, 1, 2, 3, 4, 5].map((atom) => bead(`P${atom}`, [atom])))
const TWELVE = mapping(
  bead('B', [0, 1]),
  bead('E', [2, 3, 4]),
  ...Array.from({ length: 10 }, (_, step) => bead(`S${step}`, [5 + 2 * step, 6 + 2 * step])),
)

const collisions = ({ beads, bonds }: ChainLayout): number =>
  countCollisions({
    beads,
    bonds: bonds.map(({ from, to }) => ({ from: beads.indexOf(from), to: beads.indexOf(to) })),
  })

describe('chainLayout', () => {
  const cases: [string, RepeatUnit, MappingDocument][] = [
    ['a 3-to-1 mapping', acrylate, THREE_TO_ONE],
    ['a 5-to-1 mapping', acrylate, FIVE_TO_ONE],
    ['a ring that hangs from the backbone', styrene, STYRENE],
    ['a ring in the backbone', phenylene, PHENYLENE],
    ['twelve beads, ten of them in one side chain', longSide, TWELVE],
  ]
  it.each(cases)('keeps beads and bonds of %s apart at both widths', (_, unit, document) => {
    expect(collisions(chainLayout(unit, document, desk))).toBe(0)
    expect(collisions(chainLayout(unit, document, phone))).toBe(0)
  })

  it.each(cases)('draws three units of %s at full size on a desk', (_, unit, document) => {
    const layout = chainLayout(unit, document, desk)
    expect(chainScale(layout, desk)).toBe(1)
    expect(layout.beads).toHaveLength(3 * document.beads.length)
  })

  it.each(cases)('keeps every bead of %s inside its frame', (_, unit, document) => {
    const { beads, width, height } = chainLayout(unit, document, phone)
    for (const { x, y } of beads) {
      expect(x).toBeGreaterThanOrEqual(11)
      expect(x).toBeLessThanOrEqual(width - 11)
      expect(y).toBeGreaterThanOrEqual(11)
      expect(y).toBeLessThanOrEqual(height - 11)
    }
  })

  it('repeats one unit along the chain', () => {
    const { beads, unitWidth } = chainLayout(acrylate, FIVE_TO_ONE, desk)
    const [first, second] = [0, 1].map((at) => beads.filter(({ unit }) => unit === at))
    first.forEach((each, index) => {
      expect(second[index].x - each.x).toBeCloseTo(unitWidth, 9)
      expect(second[index].y).toBe(each.y)
    })
  })

  it('keeps the way from unit to unit level and hangs the rest below it', () => {
    const { beads } = chainLayout(phenylene, PHENYLENE, desk)
    const heights = new Map(beads.map(({ bead: id, y }) => [id, y]))
    expect(heights.get('p1')).toBe(heights.get('p0'))
    expect(heights.get('p3')).toBe(heights.get('p0'))
    expect(heights.get('p4')).toBeGreaterThan(heights.get('p0') as number)
  })

  it('leaves beads without atoms out and stands still for a mapping without beads', () => {
    const started = mapping(bead('B', [0, 1]), bead('E', []))
    expect(chainLayout(acrylate, started, desk).beads).toHaveLength(3)
    expect(chainLayout(acrylate, mapping(), desk)).toMatchObject({ beads: [], bonds: [], ends: null })
  })

  it('shows parts that nothing links yet, without a thread to the next unit', () => {
    const started = mapping(bead('E', [2, 3, 4]), bead('H', [9, 10]))
    const layout = chainLayout(acrylate, started, desk)
    expect(layout.ends).toBeNull()
    expect(layout.bonds).toEqual([])
    expect(layout.beads).toHaveLength(6)
    expect(collisions(layout)).toBe(0)
  })
})

describe('chainSentence', () => {
  it('names the beads and bonds of a unit and the bond to the next one', () => {
    expect(chainSentence(chainLayout(acrylate, THREE_TO_ONE, desk), THREE_TO_ONE)).toBe(
      'Chain of 3 units. Beads of a unit: B, E, H. Bonds: B–E, E–H, B–B to the next unit.',
    )
  })

  it('says when nothing is bonded', () => {
    const alone = mapping(bead('H', [9, 10]))
    expect(chainSentence(chainLayout(acrylate, alone, desk), alone)).toContain('Nothing is bonded yet.')
  })
})

describe('countCollisions', () => {
  const [a, b] = [
    { x: 0, y: 0 },
    { x: 100, y: 0 },
  ]
  it('counts beads on one another and bonds through strange beads, not those that end in a bead', () => {
    expect(countCollisions({ beads: [a, b], bonds: [{ from: 0, to: 1 }] })).toBe(0)
    expect(countCollisions({ beads: [a, b, { x: 50, y: 5 }], bonds: [{ from: 0, to: 1 }] })).toBe(1)
    expect(countCollisions({ beads: [a, b, { x: 50, y: 20 }], bonds: [{ from: 0, to: 1 }] })).toBe(0)
    expect(countCollisions({ beads: [a, b, { x: 10, y: 0 }], bonds: [] })).toBe(1)
  })
})
