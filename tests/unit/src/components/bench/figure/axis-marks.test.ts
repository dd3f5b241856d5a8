import { describe, expect, it } from 'vitest'
import type { DisplayUnits } from '@/components/figure/coordinate-names'
import { axisMarks } from '@/components/bench/figure/axis-marks'
import { emptyAxes } from '@/components/bench/figure/empty-axes'
import { figureFrame } from '@/components/bench/figure/figure-frame'

const units: DisplayUnits = { length: 'nm', angle: 'degree', energy: 'kJ/mol' }
const axes = emptyAxes('angle', units, 400)

describe('axisMarks', () => {
  it('spans the shared axis from edge to edge of the panels', () => {
    const frame = figureFrame(652, 526)
    const { spine } = axisMarks(frame, axes)
    expect(spine.major[0]).toEqual({ at: frame.distribution.left, label: '0' })
    expect(spine.major.at(-1)).toEqual({
      at: frame.distribution.left + frame.distribution.width,
      label: '180',
    })
  })

  it('keeps the head of every axis free for its quantity and unit', () => {
    const frame = figureFrame(652, 526)
    const { densityTicks, energyTicks } = axisMarks(frame, axes)
    for (const { at } of densityTicks) expect(at - frame.distribution.top).toBeGreaterThanOrEqual(33)
    for (const { at } of energyTicks) expect(at - frame.potential.top).toBeGreaterThanOrEqual(33)
  })

  it('labels the zero of the potential, not the base line of the distribution', () => {
    const { densityTicks, energyTicks, secondTicks } = axisMarks(figureFrame(652, 526), axes)
    expect(densityTicks[0].label).toBeNull()
    expect(energyTicks[0].label).toBe('0')
    expect(secondTicks[0]).toEqual({ at: energyTicks[0].at, label: '0' })
  })

  it('leaves the left end of a narrow spine to the name of the coordinate', () => {
    const { spine } = axisMarks(figureFrame(358, 392), axes)
    expect(spine.major[0].label).toBeNull()
    expect(spine.major.at(-1)?.label).toBe('180')
  })
})
