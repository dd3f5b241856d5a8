import { describe, expect, it } from 'vitest'
import { potentialEnergy } from '@shared/inversion'
import { benchCsv } from '@/components/bench/figure/bench-csv'
import { figureModel } from '@/components/bench/figure/figure-model'
import type { DisplayUnits } from '@/components/figure/coordinate-names'
import { angleCounts, bondCounts, dihedralCounts, inverted, withoutSampleSize } from '../distributions'

const units: DisplayUnits = { length: 'nm', angle: 'degree', energy: 'kJ/mol' }
const caption = {
  polymer: 'polyethylene',
  mapping: '2-to-1',
  terms: 'angle A–A–A',
  statePoint: '400 K',
  remarks: [],
  invented: false,
}

/** The table of a file, cell by cell; no cell of it holds a comma. */
const read = (histogram = angleCounts(), content: 'count' | 'density' = 'count') => {
  const inversion = inverted(histogram)
  const model = figureModel(inversion, units)
  const lines = benchCsv(model, content, true, caption).trimEnd().split('\r\n')
  const [header, ...rows] = lines.filter((line) => !/^"?#/.test(line)).map((line) => line.split(','))
  const column = (name: string) => {
    const at = header.indexOf(name)
    if (at < 0) throw new Error(`There is no column ${name} in ${header.join(', ')}.`)
    return rows.map((row) => row[at])
  }
  return { inversion, model, lines, header, rows, column }
}

describe('benchCsv', () => {
  it('names every quantity with its unit in one row of headers', () => {
    expect(read().header).toEqual([
      'theta low (deg)',
      'theta high (deg)',
      'count',
      'p measured (%/deg)',
      'p regenerated (%/deg)',
      'residual (sigma)',
      'theta centroid (deg)',
      'U bin by bin (kJ/mol)',
      'theta (deg)',
      'U (kJ/mol)',
      'range',
      'U band low (kJ/mol)',
      'U band high (kJ/mol)',
      'U without sin theta (kJ/mol)',
    ])
    expect(read(bondCounts()).header).toContain('U without r^2 (kJ/mol)')
    expect(read(dihedralCounts()).header.join()).not.toContain('without')
  })

  it('says in front what it shows and how to read it', () => {
    const { lines } = read()
    expect(lines[0]).toBe('"# polyethylene, 2-to-1: angle A–A–A at 400 K."')
    expect(lines.filter((line) => /^"?#/.test(line)).join(' ')).toContain('half-open')
  })

  it('gives the counts of the bins, and distributions that hold 100 % each', () => {
    const { column, model } = read()
    const bins = model.bins.weights.length
    const numbers = (name: string) => column(name).slice(0, bins).map(Number)
    expect(numbers('count')).toEqual([...angleCounts().weights])
    for (const name of ['p measured (%/deg)', 'p regenerated (%/deg)']) {
      // Bins are 2° wide; seven digits each.
      expect(2 * numbers(name).reduce((sum, p) => sum + p, 0)).toBeCloseTo(100, 4)
    }
    expect(column('count').slice(bins).join('')).toBe('')
  })

  it('gives the potential at ascending coordinates from end to end of the axis, with its tails marked', () => {
    const { column, model, inversion } = read(bondCounts())
    const coordinates = column('r (nm)').map(Number)
    expect(coordinates.every((value, index) => index === 0 || value > coordinates[index - 1])).toBe(true)
    expect([coordinates[0], coordinates.at(-1)]).toEqual([...model.domain])
    const energies = column('U (kJ/mol)').map(Number)
    const at = column('range').indexOf('data') + 50
    expect(energies[at]).toBeCloseTo(potentialEnergy(inversion.potential, coordinates[at]), 3)
    expect(column('range')[0]).toBe('tail')
    expect(column('U band low (kJ/mol)')[0]).toBe('')
  })

  it('puts the energy in the middle of its band', () => {
    const { column } = read()
    const row = column('range').indexOf('data') + 100
    const [low, energy, high] = ['U band low (kJ/mol)', 'U (kJ/mol)', 'U band high (kJ/mol)'].map((name) =>
      Number(column(name)[row]),
    )
    expect(high).toBeGreaterThan(low)
    expect((low + high) / 2).toBeCloseTo(energy, 5)
  })

  it('writes no more than seven significant digits', () => {
    const digits = read()
      .rows.flat()
      .filter((cell) => cell !== '' && !Number.isNaN(Number(cell)))
      .map((cell) => cell.replace(/e.*$/, '').replace(/[-.]/g, '').replace(/^0+/, '').length)
    expect(Math.max(...digits)).toBeLessThanOrEqual(7)
  })

  it('gives shares instead of counts, and leaves residual and band empty, without a sample size', () => {
    const { column, model } = read(withoutSampleSize(angleCounts()), 'density')
    const shares = column('share').slice(0, model.bins.weights.length).map(Number)
    expect(shares.reduce((sum, share) => sum + share, 0)).toBeCloseTo(1, 5)
    expect(column('residual (sigma)').join('')).toBe('')
    expect(column('U band high (kJ/mol)').join('')).toBe('')
  })
})
