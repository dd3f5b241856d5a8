import { describe, expect, it } from 'vitest'
import {
  type ComparedHandOver,
  type ComparedTable,
  compareHandOvers,
  changedSettings,
  largestEnergyChange,
} from '@shared/hand-over'
import { DEFAULT_INVERSION_SETTINGS } from '@shared/inversion'
import { thermalEnergy } from '@shared/units'

const TEMPERATURE = 400
const kT = thermalEnergy(TEMPERATURE)
const ROWS = Array.from({ length: 11 }, (_, row) => 0.2 + 0.02 * row)

const table = (name: string, changes: Partial<ComparedTable> = {}): ComparedTable => ({
  name,
  kinds: ['bond'],
  coordinates: ROWS,
  secondCoordinates: null,
  energies: ROWS.map((r) => 1000 * (r - 0.3) ** 2),
  settings: DEFAULT_INVERSION_SETTINGS,
  numbersSha256: 'numbers',
  fileSha256: 'file',
  reason: null,
  ...changes,
})
const handOver = (tables: ComparedTable[], changes: Partial<ComparedHandOver> = {}): ComparedHandOver => ({
  mapping: { name: 'm', revision: 1, document: { version: 1, beads: [] } },
  statePoint: { temperature: TEMPERATURE, pressure: null, phase: '', composition: '' },
  layout: {
    layoutId: null,
    length: 'nm',
    angle: 'degree',
    energy: 'kJ/mol',
    name: 'Three columns',
    document: null,
  },
  leftOut: [],
  tables,
  ...changes,
})
const kinds = (before: ComparedHandOver, after: ComparedHandOver) =>
  compareHandOvers(before, after).map(({ about, change }) => [about, change])

describe('compareHandOvers', () => {
  it('finds nothing different about the same files', () => {
    const same = handOver([table('A–B'), table('B–B')])
    expect(kinds(same, same)).toEqual([['All tables', 'same']])
  })

  it('tells what came, what went and what stayed', () => {
    const before = handOver([table('A–B'), table('B–B')])
    const after = handOver([table('A–B'), table('A–C')])
    expect(kinds(before, after)).toEqual([
      ['A–C', 'added'],
      ['B–B', 'removed'],
      ['All others', 'same'],
    ])
  })

  it('gives the reason of a term that was left out', () => {
    const leftOut = [{ kind: 'bond' as const, name: 'B–B', types: ['B', 'B'], reason: 'Not needed.' }]
    const [line] = compareHandOvers(handOver([table('B–B')]), handOver([], { leftOut }))
    expect(line).toMatchObject({ about: 'B–B', change: 'removed' })
    expect(line.text).toContain('Not needed.')
  })

  it('tells of two tables that became one joint potential once, with the reason on record', () => {
    const joint = table('A–B · A–B–C', {
      kinds: ['bond', 'angle'],
      secondCoordinates: [1, 2],
      energies: ROWS.flatMap(() => [0, 1]),
      settings: null,
      reason: 'Two conformers.',
    })
    const lines = compareHandOvers(handOver([table('A–B'), table('A–B–C')]), handOver([joint]))
    expect(lines).toHaveLength(1)
    expect(lines[0]).toMatchObject({ about: 'A–B, A–B–C', change: 'added' })
    expect(lines[0].text).toContain('Two conformers.')
  })

  it('measures a changed table in kT, says where, and names the settings that differ', () => {
    const energies = ROWS.map((r, row) => 1000 * (r - 0.3) ** 2 + (row === 3 ? 0.5 * kT : 0))
    const settings = { ...DEFAULT_INVERSION_SETTINGS, straightAngle: 'level' as const }
    const after = table('A–B', { energies, settings, numbersSha256: 'others', fileSha256: 'other' })
    const [line] = compareHandOvers(handOver([table('A–B')]), handOver([after]))
    expect(line.change).toBe('changed')
    expect(line.largest?.kT).toBeCloseTo(0.5, 10)
    expect(line.largest?.coordinates).toEqual([ROWS[3]])
    expect(line.text).toContain(changedSettings(DEFAULT_INVERSION_SETTINGS, settings)[0])
  })

  it('tells files that were only written anew from those that are the same to the byte', () => {
    const before = handOver([table('A–B'), table('B–B')])
    const after = handOver([table('A–B', { fileSha256: 'other' }), table('B–B')])
    expect(kinds(before, after)).toEqual([
      ['A–B', 'same'],
      ['All others', 'same'],
    ])
  })

  it('tells of other units, another layout, mapping and temperature first', () => {
    const before = handOver([])
    const units = { ...before.layout, length: 'angstrom' as const }
    expect(kinds(before, handOver([], { layout: units }))).toEqual([['Units', 'whole']])
    expect(kinds(before, handOver([], { layout: { ...before.layout, name: 'JSON' } }))).toEqual([
      ['Layout', 'whole'],
    ])
    expect(kinds(before, handOver([], { mapping: { ...before.mapping, revision: 2 } }))).toEqual([
      ['Mapping', 'whole'],
    ])
    const hotter = { ...before.statePoint, temperature: 450 }
    expect(kinds(before, handOver([], { statePoint: hotter }))).toEqual([['Temperature', 'whole']])
  })

  it('compares layouts by what they hold, whatever the order of their keys', () => {
    const one = handOver([], { layout: { ...handOver([]).layout, document: { a: 1, b: [{ c: 2, d: 3 }] } } })
    const other = handOver([], {
      layout: { ...handOver([]).layout, document: { b: [{ d: 3, c: 2 }], a: 1 } },
    })
    expect(compareHandOvers(one, other)).toEqual([])
  })
})

describe('largestEnergyChange', () => {
  const grid = (energies: number[]) => ({ coordinates: [0, 1, 2], secondCoordinates: null, energies })

  it('does not count the constant of the energy', () => {
    expect(largestEnergyChange(grid([0, 1, 2]), grid([5, 6, 7]), TEMPERATURE)?.kT).toBeCloseTo(0, 12)
  })

  it('passes over places that neither table lets a chain reach', () => {
    const high = 12 * kT
    const change = largestEnergyChange(grid([0, 0.1 * kT, high]), grid([0, 0, high + 9 * kT]), TEMPERATURE)
    expect(change?.coordinates).toEqual([1])
    expect(change?.kT).toBeCloseTo(0.1, 12)
  })

  it('sees a wall that came up where chains went before', () => {
    const change = largestEnergyChange(grid([0, 0, 0]), grid([0, 0, 20 * kT]), TEMPERATURE)
    expect(change).toEqual({ kT: expect.closeTo(20, 10) as number, coordinates: [2] })
  })

  it('reads the old table between its rows', () => {
    const fine = { coordinates: [0, 0.5, 1, 1.5, 2], secondCoordinates: null, energies: [0, 1, 2, 3, 4] }
    expect(largestEnergyChange(grid([0, 2, 4]), fine, TEMPERATURE)?.kT).toBeCloseTo(0, 12)
  })

  it('reads a grid along both axes', () => {
    const before = { coordinates: [0, 1], secondCoordinates: [0, 1], energies: [0, 1, 2, 3] }
    const after = { coordinates: [0.5], secondCoordinates: [0, 0.5], energies: [1, 1.5] }
    // Least values are taken off first: of the old grid 0, of the new one 1.
    expect(largestEnergyChange(before, after, TEMPERATURE)?.kT).toBeCloseTo(1 / kT, 12)
  })

  it('is null where the two share no range or have another number of axes', () => {
    const far = { coordinates: [7, 8, 9], secondCoordinates: null, energies: [0, 0, 0] }
    expect(largestEnergyChange(grid([0, 0, 0]), far, TEMPERATURE)).toBeNull()
    const two = { coordinates: [0], secondCoordinates: [0], energies: [0] }
    expect(largestEnergyChange(grid([0, 0, 0]), two, TEMPERATURE)).toBeNull()
  })
})
