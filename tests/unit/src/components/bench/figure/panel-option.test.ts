import { init } from 'echarts/core'
import { describe, expect, it } from 'vitest'
import type { DisplayUnits } from '@/components/figure/coordinate-names'
import { figureFrame } from '@/components/bench/figure/figure-frame'
import { figureModel } from '@/components/bench/figure/figure-model'
import { CURVES, panelOption, type VisibleCurves } from '@/components/bench/figure/panel-option'
import { ringPath } from '@/components/bench/figure/ring-path'
import { silhouetteArea, silhouetteLine } from '@/components/bench/figure/silhouette-path'
import '@/plugins/echarts'
import { angleCounts, inverted } from '../distributions'

const units: DisplayUnits = { length: 'nm', angle: 'degree', energy: 'kJ/mol' }
const frame = figureFrame(652, 526)
const model = figureModel(inverted(angleCounts()), units)
const all = Object.fromEntries(CURVES.map((curve) => [curve, true])) as Record<keyof VisibleCurves, boolean>

const drawn = (visible: VisibleCurves): string => {
  const chart = init(null, null, { renderer: 'svg', ssr: true, width: frame.width, height: frame.height })
  chart.setOption(panelOption(frame, model, model, visible))
  const svg = chart.renderToSVGString()
  chart.dispose()
  return svg
}

describe('panelOption', () => {
  it('draws every curve in the tokens of the page, so that a change of theme needs no redraw', () => {
    const svg = drawn(all)
    for (const token of ['data', 'dataEdge', 'model', 'band', 'plain', 'raw'])
      expect(svg).toContain(`var(--${token})`)
    expect(svg).toContain('stroke-dasharray="5,3.5"')
  })

  it('puts the outline of the histogram on the pixels of the panel', () => {
    const svg = drawn(all)
    const { left, top, width, height } = frame.distribution
    const [first] = model.measured
    const x = left + ((first[0] - model.domain[0]) / (model.domain[1] - model.domain[0])) * width
    const outline = /<polygon points="([\d.]+) ([\d.]+) /.exec(svg)
    expect(Number(outline?.[1])).toBeCloseTo(x, 1)
    expect(Number(outline?.[2])).toBe(top + height)
  })

  it('leaves out what the key has switched off', () => {
    const without = drawn({ ...all, comparison: false, potential: false })
    expect(without).not.toContain('var(--plain)')
    expect(without).not.toContain('var(--band)')
    expect(without).toContain('var(--raw)')
  })

  it('keeps the panels without a model', () => {
    expect(panelOption(frame, model, null, all).series).toEqual([])
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
