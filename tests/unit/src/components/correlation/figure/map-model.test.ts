import { describe, expect, it } from 'vitest'
import { binAt, readCell } from '@/components/correlation/figure/cell-reading'
import { coordinateAt } from '@/components/correlation/figure/coordinate-at'
import { couplingCells, densityCells } from '@/components/correlation/figure/map-cells'
import { mapFrame } from '@/components/correlation/figure/map-frame'
import { mapModel } from '@/components/correlation/figure/map-model'
import { correlationOf, correlationWithoutSampleSize, jointHistogram } from '../correlations'

const units = { length: 'nm', angle: 'degree', energy: 'kJ/mol' } as const
const correlation = correlationOf(0.7)
const model = mapModel(correlation, units)

describe('mapModel', () => {
  it('puts both coordinates in the units shown', () => {
    expect(model.y.edges[0]).toBeCloseTo(90, 9)
    expect(model.x.edges[0]).toBeCloseTo(0.3, 12)
    const inAngstrom = mapModel(correlation, { ...units, length: 'angstrom', angle: 'radian' })
    expect(inAngstrom.x.edges[0]).toBeCloseTo(3, 12)
    expect(inAngstrom.y.edges[0]).toBeCloseTo(Math.PI / 2, 12)
    expect(inAngstrom.mean[0].x).toBeCloseTo(10 * model.mean[0].x, 9)
  })

  it('lets the mean of the angle follow the bond, within its bars', () => {
    // Both coordinates have the same spread in bins: the mean moves 0.7 bins of 2° per bin of 0.004 nm.
    const slope = (0.7 * 2) / 0.004
    const middle = 90 + 2 * 15
    const inside = model.mean.filter(({ x, mean, half }) => {
      return Math.abs(mean - (middle + slope * (x - 0.36))) < half! + 0.3
    })
    expect(inside.length / model.mean.length).toBeGreaterThan(0.9)
  })

  it('finds the densest cell in the middle and closes contours about it', () => {
    expect(Math.abs(model.highest.x - 0.36)).toBeLessThan(0.009)
    expect(Math.abs(model.highest.y - 120)).toBeLessThan(5)
    expect(model.contours.length).toBeGreaterThanOrEqual(3)
  })

  it('shows no bars where nobody stated how many samples are independent', () => {
    const without = mapModel(correlationWithoutSampleSize(0.7), units)
    expect(without.mean.length).toBeGreaterThan(10)
    expect(without.mean.every(({ half }) => half === null)).toBe(true)
    expect(without.averaged).toBe(false)
  })
})

describe('the cells', () => {
  it('of the density cover what holds counts and nothing else', () => {
    const covered = densityCells(model, 64).reduce((sum, { y }) => sum + Math.round((y[1] - y[0]) / 2), 0)
    expect(covered).toBe(correlation.density.filter((value) => value > 0).length)
  })

  it('of the coupling are rarer off the diagonal and more frequent on it', () => {
    const cells = couplingCells(correlation, model, 65)
    const at = (x: number, y: number) =>
      cells.find((cell) => cell.x[0] <= x && x < cell.x[1] && cell.y[0] <= y && y < cell.y[1])?.step
    expect(at(0.338, 134)).toBeLessThan(32)
    expect(at(0.382, 106)).toBeLessThan(32)
    expect(at(0.38, 133)).toBeGreaterThan(32)
    expect(at(0.34, 107)).toBeGreaterThan(32)
    expect(at(0.302, 149)).toBeUndefined()
  })
})

describe('readCell', () => {
  it('names the cell by its middle and says what is in it', () => {
    const joint = jointHistogram(0.7)
    const reading = readCell(correlation, model, joint.weights, { ix: 15, iy: 15 })
    expect(reading.x).toBe('0.362\u00a0nm')
    expect(reading.y).toBe('121°')
    expect(reading.amount).toBe(`${joint.weights[15 * 30 + 15]} counts`)
    expect(reading.coupling).toMatch(/^coupling \+0\.\d\d ± 0\.\d\d kT$/)
  })

  it('says where a cell is too thin for a coupling', () => {
    const values = correlation.coupling.values.map(() => NaN)
    const thin = { ...correlation, coupling: { ...correlation.coupling, values } }
    const reading = readCell(thin, model, jointHistogram(0.7).weights, { ix: 0, iy: 29 })
    expect(reading.coupling).toBe('too thin to judge a coupling')
  })
})

describe('binAt', () => {
  it('takes half-open bins with the last one closed, and nothing outside', () => {
    expect([binAt([0, 1, 2], 0), binAt([0, 1, 2], 1), binAt([0, 1, 2], 2)]).toEqual([0, 1, 1])
    expect([binAt([0, 1, 2], -0.1), binAt([0, 1, 2], 2.1), binAt([0, 1, 2], NaN)]).toEqual([null, null, null])
  })
})

describe('coordinateAt', () => {
  it('writes the middles of the bins out', () => {
    expect(coordinateAt(model.x, 0.302)).toBe('0.302\u00a0nm')
    expect(coordinateAt(model.y, (91 * Math.PI) / 180)).toBe('91°')
  })
})

describe('mapFrame', () => {
  it('shares its axes between the map and what stands beside it', () => {
    const frame = mapFrame(652, 560)
    expect([frame.above.left, frame.above.width]).toEqual([frame.map.left, frame.map.width])
    expect([frame.right.top, frame.right.height]).toEqual([frame.map.top, frame.map.height])
    expect(frame.right.left + frame.right.width).toBeLessThanOrEqual(652)
    expect(frame.height).toBeLessThanOrEqual(560)
  })

  it('is as high as wide on a phone and never lower than 260 px on a desk', () => {
    const phone = mapFrame(358, 600)
    expect(phone.map.height).toBe(Math.round(phone.map.width))
    expect(mapFrame(652, 100).map.height).toBe(260)
  })
})
