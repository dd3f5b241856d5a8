import { mount } from '@vue/test-utils'
import { describe, expect, it } from 'vitest'
import CorrelationBasins from '@/components/correlation/CorrelationBasins.vue'
import { mapModel } from '@/components/correlation/figure/map-model'
import { linearScale } from '@/components/figure/linear-scale'
import { correlationWithoutSampleSize, twoBasins } from '../../unit/src/components/correlation/correlations'

const units = { length: 'nm', angle: 'degree', energy: 'kJ/mol' } as const

describe('CorrelationBasins', () => {
  it('numbers the basins of the map where they are, and rings those of the product with dashes only', () => {
    const { basins, x, y } = mapModel(twoBasins(), units)
    const wrapper = mount(CorrelationBasins, {
      props: { basins, x: linearScale(x.window, [0, 300]), y: linearScale(y.window, [300, 0]) },
    })
    expect(wrapper.findAll('.number').map((number) => number.text())).toEqual(['1', '2'])
    expect(wrapper.findAll('.product')).toHaveLength(2)
    // Bells stand at bins 8 and 21: 0.334 and 0.386 nm, 107° and 133°, found to within a bin.
    const places = basins.map((basin) => [basin.x, basin.y])
    expect(Math.abs(places[0][0] - 0.334)).toBeLessThan(0.004)
    expect(Math.abs(places[0][1] - 107)).toBeLessThan(2)
    expect(Math.abs(places[1][0] - 0.386)).toBeLessThan(0.004)
    expect(Math.abs(places[1][1] - 133)).toBeLessThan(2)
  })

  it('draws nothing where the sample size is not stated', () => {
    expect(mapModel(correlationWithoutSampleSize(0.5), units).basins).toEqual([])
  })
})
