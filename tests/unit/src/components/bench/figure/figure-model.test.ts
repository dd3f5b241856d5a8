import { describe, expect, it } from 'vitest'
import { potentialEnergy } from '@shared/inversion'
import { thermalEnergy } from '@shared/units'
import type { DisplayUnits } from '@/components/figure/coordinate-names'
import { emptyAxes } from '@/components/bench/figure/empty-axes'
import { figureModel } from '@/components/bench/figure/figure-model'
import { figureRows, figureSummary } from '@/components/bench/figure/figure-summary'
import type { Point } from '@/components/figure/stepped-outline'
import {
  angleCounts,
  bondCounts,
  dihedralCounts,
  inverted,
  TEMPERATURE,
  withoutSampleSize,
} from '../distributions'

const units: DisplayUnits = { length: 'nm', angle: 'degree', energy: 'kJ/mol' }
const area = (points: readonly Point[]): number =>
  points
    .slice(1)
    .reduce((sum, [x, y], index) => sum + ((x - points[index][0]) * (y + points[index][1])) / 2, 0)
const least = (points: readonly Point[]): number => Math.min(...points.map(([, y]) => y))

describe('figureModel', () => {
  it('draws measured and regenerated distributions that both hold 100 %, per degree', () => {
    const model = figureModel(inverted(angleCounts()), units)
    expect(area(model.measured)).toBeCloseTo(100, 6)
    // Trapezoids on 400 points, and the part of the curve outside the populated bins: below 0.1 %.
    expect(area(model.regenerated)).toBeGreaterThan(99.8)
    expect(area(model.regenerated)).toBeLessThan(100.1)
  })

  it('holds the same area per nanometre for a bond and per radian for an angle', () => {
    expect(area(figureModel(inverted(bondCounts()), units).measured)).toBeCloseTo(1, 9)
    expect(area(figureModel(inverted(angleCounts()), { ...units, angle: 'radian' }).measured)).toBeCloseTo(
      1,
      9,
    )
  })

  it('draws the potential’s own energies, in the unit asked for', () => {
    const inversion = inverted(angleCounts())
    const kT = thermalEnergy(TEMPERATURE)
    const [angle, energy] = figureModel(inversion, { ...units, energy: 'kT' }).potential[150]
    expect(energy).toBeCloseTo(potentialEnergy(inversion.potential, (angle * Math.PI) / 180) / kT, 9)
  })

  it('continues the curve by tails to both ends of the shown axis, without a step', () => {
    const model = figureModel(inverted(bondCounts()), units)
    const [left, right] = model.tails
    expect(left[0][0]).toBeCloseTo(model.domain[0], 12)
    expect(left.at(-1)).toEqual(model.potential[0])
    expect(right[0]).toEqual(model.potential.at(-1))
    expect(right.at(-1)?.[0]).toBeCloseTo(model.domain[1], 12)
  })

  it('needs no tails and no comparison for a dihedral measured all around', () => {
    const model = figureModel(inverted(dihedralCounts()), units)
    expect(model.tails).toEqual([])
    expect(model.comparison).toBeNull()
    expect(model.domain).toEqual([-180, 180])
    expect(model.potential[0][0]).toBeCloseTo(-180, 9)
    expect(model.potential.at(-1)?.[0]).toBeCloseTo(180, 9)
  })

  it('compares with U + kT ln sin θ of the other choice, each with least value 0', () => {
    const corrected = figureModel(inverted(angleCounts()), units)
    const plain = figureModel(inverted(angleCounts(), { jacobian: false }), units)
    expect(least(corrected.comparison!)).toBe(0)
    const at = (points: readonly Point[], angle: number): number =>
      points.reduce((best, point) =>
        Math.abs(point[0] - angle) < Math.abs(best[0] - angle) ? point : best,
      )[1]
    // Two smooth fits to the same counts differ by their smoothing only.
    for (const angle of [90, 110, 130])
      expect(at(corrected.comparison!, angle)).toBeCloseTo(at(plain.potential, angle), 0)
  })

  it('lays a ring for every bin with counts about the curve', () => {
    const histogram = angleCounts()
    const inversion = inverted(histogram)
    const model = figureModel(inversion, units)
    expect(model.rings).toHaveLength(histogram.weights.filter((weight) => weight > 0).length)
    const near = model.rings.filter(([angle]) => angle > 95 && angle < 125)
    for (const [angle, energy] of near) {
      expect(energy).toBeCloseTo(potentialEnergy(inversion.potential, (angle * Math.PI) / 180), 1)
    }
  })

  it('has no band without a sample size', () => {
    expect(figureModel(inverted(angleCounts()), units).band).not.toBeNull()
    expect(figureModel(inverted(withoutSampleSize(angleCounts())), units).band).toBeNull()
  })

  it('keeps its axes while the smoothing changes', () => {
    const smooth = (log10Lambda: number) =>
      figureModel(inverted(angleCounts(), { smoothing: { mode: 'manual', log10Lambda } }), units)
    expect(smooth(1).domain).toEqual(smooth(7).domain)
    expect(smooth(1).densityTop).toBe(smooth(7).densityTop)
  })

  it('puts kT on the right axis beside a molar unit, and kJ/mol beside kT', () => {
    const inversion = inverted(bondCounts())
    const kT = thermalEnergy(TEMPERATURE)
    expect(figureModel(inversion, units).secondEnergy).toEqual({ unit: 'kT', perUnit: 1 / kT })
    expect(figureModel(inversion, { ...units, energy: 'kT' }).secondEnergy).toEqual({
      unit: 'kJ/mol',
      perUnit: kT,
    })
  })
})

describe('emptyAxes', () => {
  it('shows the real axes of a term without data', () => {
    expect(emptyAxes('dihedral', units, TEMPERATURE).domain).toEqual([-180, 180])
    expect(emptyAxes('bond', { ...units, length: 'angstrom' }, TEMPERATURE).domain).toEqual([2, 6])
  })
})

describe('figureSummary', () => {
  it('says where the data are and where the potential is lowest', () => {
    const sentence = figureSummary('B–E–H', figureModel(inverted(angleCounts()), units))
    expect(sentence).toMatch(
      /^Distribution of the angle B–E–H and its potential\. Data from \d+\.0° to \d+\.0°/,
    )
    expect(sentence).toMatch(/lowest at 1(09|10)\.\d°/)
  })

  it('lists points from end to end', () => {
    const model = figureModel(inverted(bondCounts()), units)
    const rows = figureRows(model)
    expect(rows).toHaveLength(37)
    expect(rows[0].coordinate).toBe(model.potential[0][0].toFixed(3))
  })
})
