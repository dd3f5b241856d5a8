import { writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import type { InversionJson } from '../../../../server/cli/inversion-json'
import { createRandom } from '@shared/numeric'
import { runCommand } from '../../../support/run-command'
import { temporaryFolder } from '../../../support/temporary-folder'

const KT = 8.31446261815324e-3 * 400
const WORDS = ['--kind', 'angle', '--temperature', '400', '--unit', 'degree', '--columns', 'centre,count']

/** Twelve chains with angles about places of their own, and their sum; each a histogram in bins of 2°. */
function chainFiles(): { whole: string; chains: string[]; folder: string } {
  const folder = temporaryFolder()
  const random = createRandom(41)
  const write = (name: string, counts: readonly number[]): string => {
    const path = join(folder, name)
    writeFileSync(path, counts.map((count, bin) => `${2 * bin + 1} ${count}\n`).join(''))
    return path
  }
  const counts = Array.from({ length: 12 }, () => {
    const middle = 140 + 6 * random.normal()
    return Array.from({ length: 90 }, (_, bin) =>
      random.poisson(
        150 * Math.sin(((2 * bin + 1) * Math.PI) / 180) * Math.exp(-(((2 * bin + 1 - middle) / 18) ** 2)),
      ),
    )
  })
  const sum = counts[0].map((_, bin) => counts.reduce((all, each) => all + each[bin], 0))
  return {
    whole: write('whole.txt', sum),
    chains: counts.map((each, chain) => write(`chain${chain}.txt`, each)),
    folder,
  }
}

async function json(...words: string[]): Promise<InversionJson> {
  const { status, printed, notes } = await runCommand('invert', ...words, '--json')
  expect(status, notes).toBe(0)
  return JSON.parse(printed) as InversionJson
}

describe('beadwright invert with files of chains', () => {
  it('divides the counts by the inefficiency they show, and says where it comes from', async () => {
    const { whole, chains } = chainFiles()
    const result = await json(whole, ...WORDS, '--chains', ...chains)
    const total = result.bins.reduce((sum, { count }) => sum + (count ?? 0), 0)
    expect(result.blocks).toMatchObject({ kind: 'chain', count: 12 })
    expect(result.inefficiency).toBe(result.blocks?.inefficiency)
    expect(result).toMatchObject({
      inefficiencySource: 'chains',
      inefficiencyError: result.blocks?.deviation,
      notes: [],
      sampleInefficiency: null,
    })
    expect(result.inefficiency).toBeGreaterThan(3)
    expect(result.independentSamples).toBeCloseTo(total / (result.inefficiency ?? NaN), 6)
  })

  it('writes the inefficiency with its error into the comments of the table', async () => {
    const { whole, chains } = chainFiles()
    const { printed, notes } = await runCommand('invert', whole, ...WORDS, '--chains', ...chains)
    expect(printed).toMatch(
      /^# inefficiency: counts divided by [\d.]+ \+- [\d.]+, from the scatter between chains$/m,
    )
    expect(notes).toContain('12 chains give a statistical inefficiency')
    expect(notes).not.toContain('COUNTS_TAKEN_AS_INDEPENDENT')
  })

  it('puts --inefficiency before --independent-samples before the files', async () => {
    const { whole, chains } = chainFiles()
    const files = ['--chains', ...chains]
    const samples = await json(whole, ...WORDS, '--independent-samples', '700', ...files)
    expect(samples).toMatchObject({ independentSamples: 700, inefficiencySource: 'independent samples' })
    const stated = await json(
      whole,
      ...WORDS,
      '--inefficiency',
      '25',
      '--independent-samples',
      '700',
      ...files,
    )
    expect(stated).toMatchObject({ inefficiency: 25, inefficiencySource: 'stated', inefficiencyError: null })
  })

  it('notes that counts were taken as independent when nothing says otherwise', async () => {
    const { whole } = chainFiles()
    const { notes, printed } = await runCommand('invert', whole, ...WORDS)
    expect(notes).toContain('COUNTS_TAKEN_AS_INDEPENDENT')
    expect(printed).toContain('# inefficiency: counts divided by 1, assumed')
    const result = await json(whole, ...WORDS)
    expect(result.notes.map(({ code }) => code)).toEqual(['COUNTS_TAKEN_AS_INDEPENDENT'])
  })

  it('names the file to blame, by its name and that of the main file', async () => {
    const { whole, chains, folder } = chainFiles()
    const other = join(folder, 'other-grid.txt')
    writeFileSync(other, '100 1\n103 5\n106 9\n109 5\n112 1\n')
    const differ = await runCommand('invert', whole, ...WORDS, '--blocks', ...chains, other)
    expect(differ.status).toBe(2)
    expect(differ.notes).toMatch(/whole\.txt: other-grid\.txt: .*BLOCKS_DIFFER/)
    const few = await runCommand('invert', whole, ...WORDS, '--blocks', ...chains.slice(0, 9))
    expect(few.notes).toContain('TOO_FEW_BLOCKS')
    const missing = await runCommand('invert', whole, ...WORDS, '--blocks', join(folder, 'no.txt'))
    expect(missing.notes).toContain('no.txt: there is no such file')
  })
})

describe('beadwright invert with settings of the bench', () => {
  it('caps the energies, in the unit asked for', async () => {
    const { whole } = chainFiles()
    const [joules, thermal] = [
      await json(whole, ...WORDS, '--cap', '20'),
      await json(whole, ...WORDS, '--cap', String(20 / KT), '--energy-unit', 'kT'),
    ]
    const highest = (result: InversionJson) => Math.max(...result.table.map(({ energy }) => energy))
    expect(highest(joules)).toBe(20)
    // Seven digits are printed.
    expect(highest(thermal) * KT).toBeCloseTo(20, 4)
  })

  it('makes an angle level off at 180 degrees on request', async () => {
    const { whole } = chainFiles()
    const forceAtStraight = (result: InversionJson) => result.table.at(-1)?.force ?? NaN
    expect(Math.abs(forceAtStraight(await json(whole, ...WORDS)))).toBeGreaterThan(1e-3)
    expect(forceAtStraight(await json(whole, ...WORDS, '--straight-angle', 'level'))).toBe(0)
  })

  it('stiffens the tails', async () => {
    const { whole } = chainFiles()
    const first = (result: InversionJson) => result.table[0].energy
    const soft = await json(whole, ...WORDS, '--tail-stiffness', '0.05')
    expect(first(await json(whole, ...WORDS, '--tail-stiffness', '20'))).toBeGreaterThan(2 * first(soft))
  })

  it('writes the table of a form, with its parameters in the units asked for', async () => {
    const { whole } = chainFiles()
    const result = await json(whole, ...WORDS, '--form', 'harmonic')
    const [k, middle] = ['k', 'θ0'].map(
      (name) => result.form?.parameters.find((parameter) => parameter.name === name)?.value ?? NaN,
    )
    expect(result.form?.name).toBe('harmonic')
    for (const { coordinate, energy } of result.table.filter((_, row) => row % 100 === 0)) {
      // The formula writes the ½ out; seven digits are printed.
      const exact = 0.5 * k * (coordinate - middle) ** 2
      expect(Math.abs(energy - exact)).toBeLessThan(1e-5 * Math.max(1, exact))
    }
  })

  it.each([
    [['--inefficiency', '0.9'], /from 1 to/],
    [['--tail-stiffness', '30'], /0\.05 to 20/],
    [['--straight-angle', 'bent'], /free, level/],
    [['--form', 'parabola'], /harmonic/],
    [['--form', 'morse'], /not morse/],
    [['--cap', '0'], /above 0/],
  ])('refuses %j with exit status 2', async (words, sentence) => {
    const { status, notes } = await runCommand('invert', chainFiles().whole, ...WORDS, ...words)
    expect(status).toBe(2)
    expect(notes).toMatch(sentence)
  })

  it('lists every option in its help', async () => {
    const { printed } = await runCommand('invert', '--help')
    for (const option of [
      '--blocks',
      '--chains',
      '--inefficiency',
      '--straight-angle',
      '--tail-stiffness',
      '--form',
      '--cap',
    ]) {
      expect(printed).toContain(option)
    }
  })
})

describe('beadwright invert of raw samples', () => {
  it('gives the correlation of their order as evidence', async () => {
    const random = createRandom(42)
    let bend = 0
    const samples = Array.from({ length: 5000 }, () => (bend = 0.8 * bend + 6 * random.normal()))
    const path = join(temporaryFolder(), 'samples.txt')
    writeFileSync(path, samples.map((value) => (120 + value).toFixed(3)).join('\n'))
    const words = ['--kind', 'angle', '--temperature', '400', '--unit', 'degree', '--columns', 'sample']
    const { sampleInefficiency, inefficiency } = await json(path, ...words)
    // (1 + 0.8)/(1 − 0.8) = 9: analytic. As evidence it does not touch the counts.
    expect(Math.abs((sampleInefficiency?.inefficiency ?? NaN) - 9)).toBeLessThan(
      4 * (sampleInefficiency?.error ?? NaN),
    )
    expect(inefficiency).toBe(1)
  })
})
