import { describe, expect, it } from 'vitest'
import { correlate } from '@shared/correlation'
import { mapCsv } from '@/components/correlation/figure/map-csv'
import { mapModel } from '@/components/correlation/figure/map-model'
import { correlationWithoutSampleSize, jointHistogram } from '../correlations'

const units = { length: 'nm', angle: 'degree', energy: 'kJ/mol' } as const
const caption = {
  polymer: 'polyethylene',
  mapping: '3-to-1',
  terms: 'bond A–B with angle A–B–C',
  statePoint: '400 K',
  remarks: [],
  invented: false,
}
const joint = jointHistogram(0.7)
const correlation = correlate(joint)

/** The table of a file, cell by cell; no cell of it holds a comma. */
const read = (from = correlation) => {
  const text = mapCsv(from, mapModel(from, units), joint.weights, ['A–B', 'A–B–C'], caption)
  const [header, ...rows] = text
    .trimEnd()
    .split('\r\n')
    .filter((line) => !/^"?#/.test(line))
    .map((line) => line.split(','))
  const column = (name: string) => {
    const at = header.indexOf(name)
    if (at < 0) throw new Error(`There is no column ${name} in ${header.join(', ')}.`)
    return rows.map((row) => row[at])
  }
  return { header, rows, column }
}

describe('mapCsv', () => {
  it('names every quantity with its unit in one row of headers', () => {
    expect(read().header).toEqual([
      'r(A-B) low (nm)',
      'r(A-B) high (nm)',
      'theta(A-B-C) low (deg)',
      'theta(A-B-C) high (deg)',
      'count',
      'density (nm^-3)',
      'density averaged (nm^-3)',
      'coupling (kT)',
      'coupling sigma (kT)',
      'r(A-B) (nm)',
      'mean theta(A-B-C) (deg)',
      'mean theta(A-B-C) 95 % half width (deg)',
      'r(A-B) alone low (nm)',
      'r(A-B) alone high (nm)',
      'r(A-B) alone share',
      'theta(A-B-C) alone low (deg)',
      'theta(A-B-C) alone high (deg)',
      'theta(A-B-C) alone share',
    ])
  })

  it('gives every cell of the file with its count, the second coordinate running first', () => {
    const { column, rows } = read()
    expect(rows).toHaveLength(900)
    expect(column('count').map(Number)).toEqual([...joint.weights])
    const second = rows[31]
    expect(second.slice(0, 4).map(Number)).toEqual([0.304, 0.308, 92, 94])
  })

  it('gives densities that make the counts again with the exact volumes of the cells', () => {
    const { column } = read()
    const [low, high] = ['low', 'high'].map((end) => column(`r(A-B) ${end} (nm)`).map(Number))
    const [from, to] = ['low', 'high'].map((end) =>
      column(`theta(A-B-C) ${end} (deg)`).map((cell) => (Number(cell) * Math.PI) / 180),
    )
    const density = column('density (nm^-3)').map(Number)
    const total = joint.weights.reduce((sum, weight) => sum + weight, 0)
    const index = 15 * 30 + 15
    const volume = ((high[index] ** 3 - low[index] ** 3) / 3) * (Math.cos(from[index]) - Math.cos(to[index]))
    // Analytic volumes; seven digits of each number, and a difference of cubes: five are left.
    expect((density[index] * volume * total) / joint.weights[index]).toBeCloseTo(1, 4)
  })

  it('leaves the coupling empty where it is too thin to judge', () => {
    const coupling = read().column('coupling (kT)')
    expect(coupling[0]).toBe('')
    expect(coupling.filter((cell) => cell !== '').length).toBeGreaterThan(100)
  })

  it('gives shares that sum to one where the file held no counts, and no half widths', () => {
    const { column } = read(correlationWithoutSampleSize(0.7))
    const sum = column('share').reduce((total, share) => total + Number(share), 0)
    expect(sum).toBeCloseTo(1, 4)
    expect(column('mean theta(A-B-C) 95 % half width (deg)').join('')).toBe('')
  })
})
