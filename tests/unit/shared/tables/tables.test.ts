import { describe, expect, it } from 'vitest'
import { DEFAULT_INVERSION_SETTINGS } from '@shared/inversion'
import { formatNumber, formatRows, formatTable, type Table, tableComments, tableRows } from '@shared/tables'

const table: Table = {
  kind: 'angle',
  temperature: 400,
  coordinates: Float64Array.of(0, Math.PI / 2, Math.PI),
  energies: Float64Array.of(41.84, 0, 4.184),
  forces: Float64Array.of(57.29577951308232, 0, -1),
}

describe('numbers of a table', () => {
  it.each([
    [0.123456789, '0.1234568'],
    [-12.3400001, '-12.34'],
    [-0, '0'],
    [123456789, '123456800'],
    [1e-9, '1e-9'],
  ])('%s is written %s', (value, text) => {
    expect(formatNumber(value)).toBe(text)
  })
})

describe('rows of a table', () => {
  it('are in the units asked for, force per unit of the coordinate', () => {
    expect(tableRows(table, { coordinateUnit: 'degree', energyUnit: 'kcal/mol' })).toEqual([
      { coordinate: 0, energy: 10, force: 0.2390057 },
      { coordinate: 90, energy: 0, force: 0 },
      { coordinate: 180, energy: 1, force: -0.004171437 },
    ])
  })
})

describe('the text of a table', () => {
  const units = { coordinateUnit: 'degree', energyUnit: 'kJ/mol' } as const

  it('has comment lines, named columns and aligned rows', () => {
    expect(formatTable(table, units, ['term: B–E–H'])).toBe(
      [
        '# term: B–E–H',
        '#',
        '# coordinate[deg]  energy[kJ/mol] force[kJ/mol/deg]',
        '              0           41.84               1',
        '             90               0               0',
        '            180           4.184     -0.01745329',
        '',
      ].join('\n'),
    )
  })

  it('holds the rows that a checksum is taken over, and nothing else below the comments', () => {
    const text = formatTable(table, units, ['a', 'b'])
    expect(text.endsWith(formatRows(table, units))).toBe(true)
    expect(
      text
        .split('\n')
        .filter((line) => !line.startsWith('#'))
        .join('\n'),
    ).toBe(formatRows(table, units))
  })
})

describe('comment lines', () => {
  const input = {
    invented: false,
    polymer: 'poly(x)',
    mapping: '3-to-1',
    term: 'B–E–H',
    kind: 'angle',
    beadOrder: 'B(0) E(0) H(0)',
    temperature: 400,
    statePoint: '1 bar',
    units: { coordinateUnit: 'degree', energyUnit: 'kJ/mol' },
    settings: DEFAULT_INVERSION_SETTINGS,
    smoothing: {
      mode: 'auto',
      criterion: 'likelihood',
      lambda: 100,
      log10Lambda: 2,
      effectiveDimension: 7.123,
    },
    independentSamples: 1000,
    warnings: [],
    input: { name: 'a.txt', sha256: 'ff' },
    rowsSha256: '00',
    savedOn: '2026-01-02',
  } as const

  it('state term, state point, units, convention, Jacobian, smoothing, checksums and what a table is good for', () => {
    const text = tableComments(input).join('\n')
    for (const part of [
      'B–E–H',
      '400 K, 1 bar',
      'coordinate in deg',
      '180 deg is straight',
      'sin(theta)',
      '2.00',
    ]) {
      expect(text).toContain(part)
    }
    expect(text).toContain('input: a.txt, SHA-256 ff')
    expect(text).toContain('rows: SHA-256 00')
    expect(text).toContain('Valid at this one state point only')
    expect(text).not.toContain('INVENTED')
  })

  it('say first when the data are invented, and leave out what is not known', () => {
    expect(tableComments({ ...input, invented: true })[0]).toMatch(/^INVENTED/)
    const bare = tableComments({ ...input, polymer: null, savedOn: null, input: null })
    expect(bare.some((line) => /^(polymer|saved|input)/.test(line))).toBe(false)
  })

  it('stay on one line each, whatever a name holds', () => {
    const lines = tableComments({ ...input, polymer: 'two\nlines' })
    expect(lines.every((line) => !line.includes('\n'))).toBe(true)
  })
})
