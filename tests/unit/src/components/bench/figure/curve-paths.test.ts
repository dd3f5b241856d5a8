import { describe, expect, it } from 'vitest'
import type { DisplayUnits } from '@/components/figure/coordinate-names'
import { axisMarks } from '@/components/bench/figure/axis-marks'
import { curvePaths } from '@/components/bench/figure/curve-paths'
import { figureFrame } from '@/components/bench/figure/figure-frame'
import { figureModel } from '@/components/bench/figure/figure-model'
import { ringPath } from '@/components/bench/figure/ring-path'
import { silhouetteArea, silhouetteLine } from '@/components/bench/figure/silhouette-path'
import { CURVES, type VisibleCurves } from '@/components/bench/figure/visible-curves'
import { angleCounts, inverted } from '../distributions'

const units: DisplayUnits = { length: 'nm', angle: 'degree', energy: 'kJ/mol' }
const frame = figureFrame(652, 526, true)
const model = figureModel(inverted(angleCounts()), units)
const marks = axisMarks(frame, model)
const all = Object.fromEntries(CURVES.map((curve) => [curve, true])) as Record<keyof VisibleCurves, boolean>
const keys = (visible: VisibleCurves): string[] => {
  const { distribution, residual, potential } = curvePaths(model, marks, visible)
  return [...distribution, ...residual, ...potential].map(({ key }) => key)
}

describe('curvePaths', () => {
  it('draws measured below derived, the band below everything of the potential', () => {
    const { distribution, residual, potential } = curvePaths(model, marks, all)
    expect(distribution.map(({ key }) => key)).toEqual(['measured', 'outline', 'regenerated'])
    expect(residual.map(({ key }) => key)).toEqual(['stems'])
    expect(potential.map(({ key }) => key)).toEqual([
      'band 0',
      'comparison',
      'rings',
      'potential',
      'tail 0',
      'tail 1',
    ])
    expect(potential.find(({ key }) => key === 'comparison')).toMatchObject({
      stroke: 'plain',
      dash: '5 3.5',
    })
  })

  it('puts the outline of the histogram on the pixels of the panel', () => {
    const { left, top, width, height } = frame.distribution
    const [first] = model.measured
    const x = left + ((first[0] - model.domain[0]) / (model.domain[1] - model.domain[0])) * width
    const [outline] = curvePaths(model, marks, all).distribution
    const [, across, up] = /^M([\d.]+) ([\d.]+)/.exec(outline.d) ?? []
    expect(Number(across)).toBeCloseTo(x, 1)
    expect(Number(up)).toBe(top + height)
  })

  it('leaves out what the key has switched off', () => {
    expect(keys({ ...all, comparison: false, potential: false, residual: false })).toEqual([
      'measured',
      'outline',
      'regenerated',
      'rings',
    ])
    expect(keys({ ...all, measured: false, regenerated: false, rings: false })).not.toContain('rings')
  })
})

describe('ringPath', () => {
  it('closes one circle for each centre', () => {
    const path = ringPath(
      [
        [10, 20],
        [30.456, 40],
      ],
      2.1,
    )
    expect(path.match(/z/g)).toHaveLength(2)
    expect(path).toContain('M7.9 20a2.1 2.1 0 1 0 4.2 0')
    expect(path).toContain('M28.36 40')
  })
})

describe('silhouettes', () => {
  it('reach from edge to edge, two pixels below the top, and close on the base line', () => {
    expect(silhouetteLine([0, 1, 0])).toBe('M0.5 22.5L31 2L61.5 22.5')
    expect(silhouetteArea([0, 1, 0])).toBe('M0.5 22.5L31 2L61.5 22.5V23.5H0.5z')
  })

  it('draw nothing from less than two values', () => {
    expect(silhouetteLine([1])).toBe('')
    expect(silhouetteArea([])).toBe('')
  })
})
