import { describe, expect, it } from 'vitest'
import { type JointIntakeSettings, previewJointDistribution, readJointHistogram } from '@shared/intake'

const GRID: JointIntakeSettings = {
  version: 1,
  kinds: ['bond', 'angle'],
  units: ['nm', 'degree'],
  layout: 'grid',
  value: 'count',
  columns: { x: 0, y: 1, value: 2 },
  independentSamples: null,
}
const cells = [0, 1, 2, 3, 4].flatMap((i) =>
  [0, 1, 2, 3, 4].map((j) => [0.3 + i / 100, 90 + 4 * j, 5 * i + j + 1]),
)
const text = (rows: readonly (readonly number[])[]) => rows.map((row) => row.join(' ')).join('\n')

describe('a grid in long form', () => {
  it('is read row-major, whatever the order of its lines', () => {
    const shuffled = [...cells].sort((one, other) => ((one[2] * 7) % 13) - ((other[2] * 7) % 13))
    for (const rows of [cells, shuffled]) {
      const { histogram } = readJointHistogram(text(rows), GRID)
      expect([...histogram.weights]).toEqual(cells.map(([, , count]) => count))
      expect(histogram.xEdges).toHaveLength(6)
      expect(histogram.yEdges[0]).toBeCloseTo((88 * Math.PI) / 180, 12)
    }
  })

  it('takes cells that are left out as empty', () => {
    const { histogram } = readJointHistogram(text(cells.filter((_, index) => index !== 7)), GRID)
    expect(histogram.weights[7]).toBe(0)
  })

  it('names the line of a count that is negative', () => {
    const rows = cells.map((row, index) => (index === 3 ? [row[0], row[1], -1] : row))
    expect(() => readJointHistogram(text(rows), GRID)).toThrow(
      expect.objectContaining({
        code: 'COUNT_NEGATIVE',
        place: expect.objectContaining({ line: 4, column: 3 }) as unknown,
      }),
    )
  })
})

describe('paired samples', () => {
  it('are put into bins of both coordinates', () => {
    const pairs = Array.from({ length: 400 }, (_, index) => [
      0.3 + 0.0001 * index,
      90 + 0.1 * ((index * 37) % 400),
    ])
    const { histogram } = readJointHistogram(text(pairs), {
      ...GRID,
      layout: 'samples',
      columns: { x: 0, y: 1, value: 1 },
    })
    expect(histogram.weights.reduce((sum, weight) => sum + weight, 0)).toBe(400)
  })
})

describe('the preview of a two-dimensional file', () => {
  it('guesses a grid from three columns and samples from two, and reports what is wrong', () => {
    expect(previewJointDistribution(text(cells), ['bond', 'angle'], null).settings?.layout).toBe('grid')
    const two = previewJointDistribution('0.3 90\n0.31 95\n', ['bond', 'angle'], null)
    expect(two.settings?.layout).toBe('samples')
    expect(previewJointDistribution('nonsense', ['bond', 'angle'], null).error).not.toBeNull()
  })
})
