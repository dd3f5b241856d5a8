import { createHash } from 'node:crypto'
import { describe, expect, it } from 'vitest'
import type { InversionJson } from '../../../../server/cli/inversion-json'
import { runCommand, withTextFile } from '../../../support/run-command'

const KT = 8.31446261815324e-3 * 400

/** Expected counts of a harmonic angle, k = 40 kJ/mol/rad² about 150°, in 90 bins of 2°. */
function angleFile(head = '# bins in degrees\n'): string {
  const lines = Array.from({ length: 90 }, (_, bin) => {
    let count = 0
    for (let step = 0; step < 50; step++) {
      const theta = ((2 * bin + (step + 0.5) / 25) * Math.PI) / 180
      count += Math.sin(theta) * Math.exp((-20 * (theta - (150 * Math.PI) / 180) ** 2) / KT)
    }
    return `${2 * bin + 1} ${(count * 1e6).toFixed(6)}`
  })
  return `${head}${lines.join('\n')}\n`
}

const INVERT = ['--kind', 'angle', '--temperature', '400', '--unit', 'degree', '--columns', 'centre,count']

async function invertJson(text: string, ...words: string[]): Promise<InversionJson> {
  const result = await withTextFile(text, (path) => runCommand('invert', path, ...INVERT, '--json', ...words))
  expect(result.notes).not.toContain('beadwright:')
  return JSON.parse(result.printed) as InversionJson
}

describe('beadwright invert', () => {
  it('prints a table whose rows hash to the checksum in its comments', async () => {
    const { status, printed } = await withTextFile(angleFile(), (path) =>
      runCommand('invert', path, ...INVERT),
    )
    expect(status).toBe(0)
    const lines = printed.trimEnd().split('\n')
    const rows = lines.filter((line) => !line.startsWith('#'))
    expect(rows).toHaveLength(1000)
    const stated = /^# rows: SHA-256 ([0-9a-f]{64})$/m.exec(printed)?.[1]
    expect(
      createHash('sha256')
        .update(`${rows.join('\n')}\n`)
        .digest('hex'),
    ).toBe(stated)
  })

  it('prints the same rows in the table and in the JSON', async () => {
    const { printed } = await withTextFile(angleFile(), (path) =>
      runCommand('invert', path, ...INVERT, '--rows', '37'),
    )
    const rows = printed.split('\n').filter((line) => line !== '' && !line.startsWith('#'))
    const json = await invertJson(angleFile(), '--rows', '37')
    expect(rows.map((row) => row.trim().split(/\s+/).map(Number))).toEqual(
      json.table.map(({ coordinate, energy, force }) => [coordinate, energy, force]),
    )
  })

  it('gives −kT ln(count/volume) of each bin, least value 0, and null for an empty one', async () => {
    const json = await invertJson(angleFile().replace(/^1 .*$/m, '1 0'))
    const filled = json.bins.filter(({ count }) => count !== 0)
    expect(filled.length).toBeGreaterThan(60)
    const raw = filled.map(({ count, volume }) => -KT * Math.log((count ?? NaN) / volume))
    const least = Math.min(...raw)
    filled.forEach(({ energy }, bin) => expect(energy).toBeCloseTo(raw[bin] - least, 9))
    expect(json.bins[0]).toMatchObject({ low: 0, count: 0, energy: null })
    const [low, high] = [json.bins[40].low, json.bins[40].high].map((angle) => (angle * Math.PI) / 180)
    expect(json.bins[40].volume).toBeCloseTo(Math.cos(low) - Math.cos(high), 12)
  })

  it('divides by the width alone with the Jacobian off', async () => {
    const json = await invertJson(angleFile(), '--jacobian', 'off')
    expect(json.bins[40].volume).toBeCloseTo(2, 9)
  })

  it('gives energies in the unit asked for', async () => {
    const [joules, calories, thermal] = await Promise.all(
      ['kJ/mol', 'kcal/mol', 'kT'].map(
        async (unit) => (await invertJson(angleFile(), '--energy-unit', unit)).bins[30].energy ?? NaN,
      ),
    )
    expect(calories).toBeCloseTo(joules / 4.184, 9)
    expect(thermal).toBeCloseTo(joules / KT, 9)
  })

  it('takes the range and the rows asked for, in the unit asked for', async () => {
    const json = await invertJson(angleFile(), '--rows', '13', '--from', '60', '--to', '180')
    expect(json.table.map(({ coordinate }) => coordinate)).toEqual(
      Array.from({ length: 13 }, (_, row) => 60 + 10 * row),
    )
  })

  it('knows no error of a density of unknown sample size, and says so', async () => {
    const words = ['--kind', 'angle', '--temperature', '400', '--unit', 'degree', '--json']
    const { printed, notes } = await withTextFile(angleFile(), (path) =>
      runCommand('invert', path, ...words, '--columns', 'centre,density'),
    )
    const json = JSON.parse(printed) as InversionJson
    expect(json.bins.every(({ count, error }) => count === null && error === null)).toBe(true)
    expect(json.warnings.map(({ code }) => code)).toContain('SAMPLE_SIZE_UNKNOWN')
    expect(json).toMatchObject({ independentSamples: null, inefficiency: null, smoothing: { mode: 'off' } })
    expect(notes).toContain('SAMPLE_SIZE_UNKNOWN')
  })

  it('reports λ as it was given', async () => {
    const { smoothing } = await invertJson(angleFile(), '--smoothing', '100')
    expect(smoothing).toMatchObject({ mode: 'manual', lambda: 100 })
  })

  it('counts per independent sample are the inefficiency', async () => {
    const json = await invertJson(angleFile(), '--independent-samples', '1000')
    expect(json.independentSamples).toBe(1000)
    const total = json.bins.reduce((sum, { count }) => sum + (count ?? 0), 0)
    expect(json.inefficiency).toBeCloseTo(total / 1000, 6)
  })

  it('says on standard error what it guessed', async () => {
    const { notes, printed } = await withTextFile(angleFile(), (path) =>
      runCommand('invert', path, '--kind', 'angle', '--temperature', '400'),
    )
    expect(notes).toMatch(/^guessed: /m)
    expect(printed).toMatch(/^# units: coordinate in deg/m)
  })

  it.each([
    ['text where a number should be', '1 2\n3 x\n5 6\n', /line 2, column 2/i, 'TEXT_NOT_A_NUMBER'],
    ['an angle outside its range', '178 1\n180 2\n182 3\n184 1\n186 2\n', /line/i, 'ANGLE_OUT_OF_RANGE'],
    ['an empty file', '', /./, 'FILE_EMPTY'],
  ])('refuses %s with exit status 2, the file and the place', async (_, text, place, code) => {
    await withTextFile(text, async (path) => {
      const { status, printed, notes } = await runCommand('invert', path, ...INVERT)
      expect(status).toBe(2)
      expect(printed).toBe('')
      expect(notes).toContain(`beadwright: ${path}: `)
      expect(notes).toMatch(place)
      expect(notes).toContain(code)
    })
  })

  it.each([
    [['--kind', 'torsion', '--temperature', '400'], /bond, angle, dihedral/],
    [['--kind', 'bond', '--temperature', '0'], /above 0/],
    [['--kind', 'bond'], /temperature/],
    [['--kind', 'bond', '--temperature', '400', '--unit', 'degree'], /nm or angstrom/],
    [['--kind', 'angle', '--temperature', '400', '--columns', 'centre'], /centre and a value/],
    [['--kind', 'angle', '--temperature', '400', '--smoothing', '-1'], /auto, off/],
    [['--kind', 'angle', '--temperature', '400', '--rows', '1.5'], /whole number/],
    [['--kind', 'angle', '--temperature', '400', '--colour'], /unknown option/],
  ])('refuses the options %j with exit status 2', async (words, sentence) => {
    const { status, notes } = await withTextFile(angleFile(), (path) => runCommand('invert', path, ...words))
    expect(status).toBe(2)
    expect(notes).toMatch(sentence)
  })

  it('names a file that is not there', async () => {
    const { status, notes } = await runCommand('invert', '/no/such/file.txt', ...INVERT)
    expect(status).toBe(2)
    expect(notes).toContain('/no/such/file.txt: there is no such file')
  })
})
