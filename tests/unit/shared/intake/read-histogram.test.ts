import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { InvalidInputError, type InputPlace, type InvalidInputCode } from '@shared/errors'
import {
  guessIntakeSettings,
  type IntakeSettings,
  MAX_BINS,
  previewDistribution,
  readColumns,
  readHistogram,
} from '@shared/intake'

const BOND: IntakeSettings = {
  version: 1,
  kind: 'bond',
  unit: 'nm',
  layout: 'centre',
  value: 'count',
  columns: { low: 0, high: 0, value: 1 },
  alreadyDivided: false,
  independentSamples: null,
}
const ANGLE: IntakeSettings = { ...BOND, kind: 'angle', unit: 'degree' }
const DIHEDRAL: IntakeSettings = { ...BOND, kind: 'dihedral', unit: 'degree' }
const EDGES: Partial<IntakeSettings> = { layout: 'edges', columns: { low: 0, high: 1, value: 2 } }

const ROWS = [
  [0.3, 12],
  [0.31, 15],
  [0.32, 18],
  [0.33, 14],
  [0.34, 9],
] as const

const file = (separator: string, rows: readonly (readonly unknown[])[] = ROWS) =>
  rows.map((row) => row.join(separator)).join('\n')

function refusal(
  text: string,
  settings: IntakeSettings,
): { code: InvalidInputCode; place: InputPlace; message: string } {
  try {
    readHistogram(text, settings)
  } catch (error) {
    if (error instanceof InvalidInputError) return error
    throw error
  }
  throw new Error('The file was read.')
}

describe('the dialects of a file', () => {
  it.each([
    ['commas', file(',')],
    ['semicolons', file(';')],
    ['tabs', file('\t')],
    ['blanks', file('   ')],
    ['a header', `r,count\n${file(',')}`],
    ['comments of every sign', `# a\n@ b\n; c\n! d\n% e\n${file(' ')}\n# end\n`],
    ['Windows line ends and a byte order mark', `\ufeff${file(',').replaceAll('\n', '\r\n')}\r\n`],
    ['a separator at the end of each line', file(',').replaceAll('\n', ',\n') + ','],
  ])('%s give the same histogram', (_, text) => {
    const { histogram } = readHistogram(text, BOND)
    expect([...histogram.weights]).toEqual([12, 15, 18, 14, 9])
    expect(histogram.edges[0]).toBeCloseTo(0.295, 12)
    expect(histogram.edges[5]).toBeCloseTo(0.345, 12)
  })

  it('two edges, ångströms and radians are read exactly', () => {
    const edges = file(' ', [
      [2, 3, 5],
      [3, 4, 6],
      [4, 5, 7],
      [5, 6, 8],
      [6, 7, 9],
    ])
    const { histogram } = readHistogram(edges, { ...BOND, ...EDGES, unit: 'angstrom' })
    expect([...histogram.edges].map((edge) => Number(edge.toPrecision(12)))).toEqual([
      0.2, 0.3, 0.4, 0.5, 0.6, 0.7,
    ])
    const radians = file(' ', [
      [1, 1.2, 1],
      [1.2, 1.4, 2],
      [1.4, 1.6, 3],
      [1.6, 1.8, 2],
      [1.8, 2, 1],
    ])
    expect(readHistogram(radians, { ...ANGLE, ...EDGES, unit: 'radian' }).histogram.edges[5]).toBe(2)
  })

  it('a density and a probability become masses of sum 1 without a sample size', () => {
    for (const value of ['density', 'probability'] as const) {
      const { histogram } = readHistogram(file(' '), { ...BOND, value })
      expect(histogram.weights.reduce((sum, mass) => sum + mass, 0)).toBeCloseTo(1, 12)
      expect(histogram.independentSamples).toBeNull()
    }
  })

  it('raw samples, one a line, are put into bins', () => {
    const text = Array.from({ length: 500 }, (_, index) => (0.3 + 0.0002 * index).toFixed(4)).join('\n')
    const { histogram, notes } = readHistogram(text, { ...BOND, layout: 'samples' })
    expect(histogram.weights.reduce((sum, weight) => sum + weight, 0)).toBe(500)
    expect(notes.join(' ')).toMatch(/500 samples/)
  })

  it('a file that was divided by the Jacobian is multiplied by it again, and no more counts', () => {
    const { histogram, notes } = readHistogram(file(' '), { ...BOND, alreadyDivided: true })
    expect(histogram.content).toBe('probability')
    expect(histogram.weights[4] / histogram.weights[0]).toBeCloseTo((9 / 12) * (0.34 / 0.3) ** 2, 3)
    expect(notes.join(' ')).toMatch(/Jacobian/)
  })

  it('any histogram written in any of them is read back', () => {
    const counts = fc.array(fc.integer({ min: 1, max: 1e6 }), { minLength: 5, maxLength: 60 })
    const dialect = fc.record({
      separator: fc.constantFrom(',', ';', '\t', '  '),
      header: fc.boolean(),
      lineEnd: fc.constantFrom('\n', '\r\n'),
      unit: fc.constantFrom('degree', 'radian'),
    })
    fc.assert(
      fc.property(counts, dialect, (weights, { separator, header, lineEnd, unit }) => {
        const turn = unit === 'degree' ? 180 : Math.PI
        const edge = (index: number) => (turn * index) / weights.length
        const lines = weights.map((weight, bin) => [edge(bin), edge(bin + 1), weight].join(separator))
        const text = [...(header ? [['low', 'high', 'n'].join(separator)] : []), ...lines].join(lineEnd)
        const { histogram } = readHistogram(text, { ...ANGLE, ...EDGES, unit: unit })
        expect([...histogram.weights]).toEqual(weights)
        histogram.edges.forEach((value, index) =>
          expect(value).toBeCloseTo((Math.PI * index) / weights.length, 9),
        )
      }),
    )
  })
})

describe('grids that touch the ends of the domain', () => {
  it('centres on 0° and 180° have half bins there, and the preview says so', () => {
    const rows = Array.from({ length: 19 }, (_, index) => [10 * index, 5])
    const { histogram, notes } = readHistogram(file(' ', rows), ANGLE)
    expect(histogram.edges[0]).toBe(0)
    expect(histogram.edges[19]).toBeCloseTo(Math.PI, 12)
    expect(histogram.edges[1]).toBeCloseTo((5 * Math.PI) / 180, 12)
    expect(notes.join(' ')).toMatch(/clipped/)
  })

  it('a dihedral row at both −180° and +180° is one bin', () => {
    const rows = Array.from({ length: 37 }, (_, index) => [-180 + 10 * index, 4])
    const { histogram, notes } = readHistogram(file(' ', rows), DIHEDRAL)
    expect(histogram.edges[0]).toBeCloseTo(-Math.PI, 12)
    expect(histogram.edges[histogram.edges.length - 1]).toBeCloseTo(Math.PI, 12)
    expect(notes.length).toBeGreaterThan(0)
  })

  it('a turn from 0° to 360° is folded into [−180°, 180°)', () => {
    const rows = Array.from({ length: 36 }, (_, index) => [5 + 10 * index, index < 18 ? 1 : 3])
    const { histogram } = readHistogram(file(' ', rows), DIHEDRAL)
    expect(histogram.edges[0]).toBeCloseTo(-Math.PI, 12)
    expect([histogram.weights[0], histogram.weights[35]]).toEqual([3, 1])
  })

  it('rows left out of an even grid are empty bins, and the preview says so', () => {
    const rows = [...ROWS, [0.37, 3], [0.38, 1]]
    const { histogram, notes } = readHistogram(file(' ', rows), BOND)
    expect([...histogram.weights]).toEqual([12, 15, 18, 14, 9, 0, 0, 3, 1])
    expect(notes.join(' ')).toMatch(/left out/)
  })
})

describe('what is refused, with its line and column', () => {
  const withLine = (line: readonly unknown[]) => file(' ', [...ROWS.slice(0, 2), line, ...ROWS.slice(3)])

  it.each<[string, string, IntakeSettings, InvalidInputCode, InputPlace]>([
    [
      'text where a number should be',
      withLine(['0.32', 'many']),
      BOND,
      'TEXT_NOT_A_NUMBER',
      { line: 3, column: 2 },
    ],
    ['NaN', withLine(['0.32', 'NaN']), BOND, 'NUMBER_NOT_FINITE', { line: 3, column: 2 }],
    ['infinity', withLine(['0.32', 'inf']), BOND, 'NUMBER_NOT_FINITE', { line: 3, column: 2 }],
    ['a negative count', withLine(['0.32', '-3']), BOND, 'COUNT_NEGATIVE', { line: 3, column: 2 }],
    ['bins that do not ascend', withLine(['0.29', '3']), BOND, 'BINS_NOT_ASCENDING', { line: 3, column: 1 }],
    [
      'bins that overlap',
      file(' ', [
        [0.2, 0.3, 1],
        [0.25, 0.35, 1],
        [0.35, 0.4, 1],
        [0.4, 0.45, 1],
        [0.45, 0.5, 1],
      ]),
      { ...BOND, ...EDGES },
      'BINS_OVERLAP',
      { line: 2 },
    ],
    [
      'an angle beyond 180°',
      file(' ', [
        [150, 1],
        [160, 1],
        [170, 1],
        [180, 1],
        [190, 1],
        [200, 1],
      ]),
      ANGLE,
      'ANGLE_OUT_OF_RANGE',
      { line: 5 },
    ],
    [
      'a dihedral outside its turn',
      file(' ', [
        [-200, 1],
        [-100, 1],
        [0, 1],
        [100, 1],
        [170, 1],
      ]),
      DIHEDRAL,
      'DIHEDRAL_OUT_OF_RANGE',
      { line: 1 },
    ],
    [
      'a bond at or below zero',
      file(' ', [
        [-0.1, 1],
        [0.1, 1],
        [0.3, 1],
        [0.5, 1],
        [0.7, 1],
      ]),
      BOND,
      'BOND_NOT_POSITIVE',
      { line: 1 },
    ],
    ['fewer than five filled bins', withLine(['0.32', '0']), BOND, 'TOO_FEW_BINS', {}],
    [
      'a missing column',
      file(
        ' ',
        ROWS.map(([r]) => [r]),
      ),
      BOND,
      'COLUMN_MISSING',
      {},
    ],
    ['a file of comments', '# nothing\n', BOND, 'FILE_EMPTY', {}],
  ])('%s', (_, text, settings, code, place) => {
    const refused = refusal(text, settings)
    expect(refused.code).toBe(code)
    expect(refused.place).toMatchObject(place)
    if (place.line !== undefined) expect(refused.message).toContain(`ine ${place.line}`)
  })

  it('decimal commas, with a hint', () => {
    const refused = refusal(
      file(
        ' ',
        ROWS.map((row) => row.map((value) => String(value).replace('.', ','))),
      ),
      BOND,
    )
    expect(refused.code).toBe('DECIMAL_COMMA')
    expect(refused.message).toMatch(/point/)
  })

  it(`more than ${MAX_BINS} bins`, () => {
    const rows = Array.from({ length: MAX_BINS + 1 }, (_, index) => [0.1 + index * 1e-4, 1])
    expect(refusal(file(' ', rows), BOND).code).toBe('TOO_MANY_BINS')
  })

  it('any text gives a histogram or an error with a code, and the preview never throws', () => {
    const piece = fc.oneof(
      fc.double({ noDefaultInfinity: false }).map(String),
      fc.constantFrom('nan', '', ' ', ',', ';', '#', '\t', '1,5', '1e', '-', '0.3', '180', 'abc'),
      fc.string({ maxLength: 4 }),
    )
    const text = fc
      .array(fc.array(piece, { maxLength: 4 }), { maxLength: 12 })
      .map((lines) => lines.map((line) => line.join(' ')).join('\n'))
    fc.assert(
      fc.property(text, fc.constantFrom('bond', 'angle', 'dihedral'), (content, kind) => {
        const { histogram, error } = previewDistribution(content, kind, null)
        expect((histogram === null) !== (error === null)).toBe(true)
      }),
      { numRuns: 500, seed: 7 },
    )
  })
})

describe('guesses', () => {
  it('name columns, values and unit, each with its reason', () => {
    const { settings, reasons } = guessIntakeSettings(
      readColumns(
        `angle,count\n${file(',', [
          [10, 3],
          [20, 4],
          [30, 5],
        ])}`,
      ),
      'angle',
    )
    expect(settings).toMatchObject({
      layout: 'centre',
      value: 'count',
      unit: 'degree',
      columns: { low: 0, value: 1 },
    })
    expect(reasons.length).toBeGreaterThanOrEqual(3)
  })

  it.each([
    ['0.3 1\n0.31 2\n0.32 1', 'bond', { unit: 'nm' }],
    ['3.0 1\n3.1 2\n3.2 1', 'bond', { unit: 'angstrom' }],
    ['0.1 1\n1.1 2\n2.1 1', 'angle', { unit: 'radian' }],
    ['0.1 0.2 1\n0.2 0.3 2\n0.3 0.4 1', 'bond', { layout: 'edges' }],
    ['0.31\n0.33\n0.32', 'bond', { layout: 'samples' }],
  ] as const)('%j of a %s', (text, kind, expected) => {
    expect(guessIntakeSettings(readColumns(text), kind).settings).toMatchObject(expected)
  })
})
