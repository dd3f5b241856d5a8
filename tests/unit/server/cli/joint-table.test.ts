import { createHash } from 'node:crypto'
import { existsSync, readFileSync, rmSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { thermalEnergy } from '@shared/units'
import { runCommand, withTextFile } from '../../../support/run-command'

const KT = thermalEnergy(400)

/** Expected counts of a coupled spring of a bond and an angle in bins of 4 pm and 3°, in long form. */
function map(samples: number): string {
  const cells = Array.from({ length: 40 * 40 }, (_, cell) => {
    const [r, degrees] = [0.3 + 0.004 * Math.floor(cell / 40), 60 + 3 * (cell % 40)]
    const [a, b] = [(r - 0.38) / 0.016, (degrees - 118) / 12]
    const volume = r * r * Math.sin((degrees * Math.PI) / 180)
    return { r, degrees, weight: volume * Math.exp(-0.5 * (a * a + b * b - 1.2 * a * b)) }
  })
  const total = cells.reduce((sum, { weight }) => sum + weight, 0)
  return cells
    .map(({ r, degrees, weight }) => `${r.toFixed(3)} ${degrees} ${Math.round((samples * weight) / total)}`)
    .join('\n')
}

const KINDS = ['--kinds', 'bond,angle', '--units', 'nm,degree']
const COUNTS = [...KINDS, '--columns', 'x,y,count']
const TABLE = ['--temperature', '400', '--joint-rows', '31,41']

const blocksOf = (text: string) =>
  text
    .split('\n')
    .filter((line) => !line.startsWith('#'))
    .join('\n')
    .split('\n\n')
    .map((block) => block.trimEnd().split('\n'))

describe('beadwright correlate --joint-table', { timeout: 60_000 }, () => {
  it('prints the joint potential in place of the report, with forces that are its differences', async () => {
    const { status, printed } = await withTextFile(map(50_000), (path) =>
      runCommand('correlate', path, ...COUNTS, ...TABLE, '--joint-table', '-'),
    )
    expect(status).toBe(0)
    expect(printed).not.toMatch(/^verdict/m)
    const blocks = blocksOf(printed).map((block) => block.map((line) => line.trim().split(/\s+/).map(Number)))
    expect([blocks.length, blocks[0].length]).toEqual([31, 41])
    // The least energy lies between rows.
    const energies = blocks.flat().map(([, , energy]) => energy)
    expect(Math.min(...energies)).toBeGreaterThanOrEqual(0)
    expect(Math.min(...energies)).toBeLessThan(0.3 * KT)
    for (const block of blocks) {
      for (let row = 1; row + 1 < block.length; row++) {
        const [, y, energy, , force] = block[row]
        if (energy > 4 * KT) continue
        const [before, after] = [block[row - 1], block[row + 1]]
        const difference = (before[2] - after[2]) / (after[1] - before[1])
        // What a central difference over 9° of a nearly quadratic energy misses.
        expect(Math.abs(force - difference)).toBeLessThan(0.03)
        expect(y).toBeCloseTo(4.5 * row, 9)
      }
    }
  })

  it('writes it to a file beside the report, with the checksum of its rows', async () => {
    await withTextFile(map(50_000), async (path) => {
      const target = `${path}.joint`
      const { status, printed } = await runCommand(
        'correlate',
        path,
        ...COUNTS,
        ...TABLE,
        '--energy-unit',
        'kT',
        '--joint-table',
        target,
      )
      expect(status).toBe(0)
      expect(printed).toMatch(/^verdict +joint potential advised$/m)
      const text = readFileSync(target, 'utf8')
      rmSync(target)
      const rows = text.replace(/^#.*\n/gm, '')
      expect(text).toContain(`rows: SHA-256 ${createHash('sha256').update(rows).digest('hex')}`)
      expect(text).toContain('yforce = -dE/dy in kT per deg')
      expect(text).toContain('state point: 400 K')
    })
  })

  it('asks for the temperature, refuses a density without a sample size and rows beyond the limit', async () => {
    await withTextFile(map(50_000), async (path) => {
      const target = `${path}.joint`
      const refused = async (...words: string[]) => {
        const { status, notes } = await runCommand('correlate', path, ...words, '--joint-table', target)
        expect(status).toBe(2)
        expect(existsSync(target)).toBe(false)
        return notes
      }
      expect(await refused(...COUNTS)).toMatch(/--temperature/)
      expect(await refused(...KINDS, '--columns', 'x,y,density', ...TABLE)).toMatch(/independent samples/)
      expect(await refused(...COUNTS, '--temperature', '400', '--joint-rows', '31,501')).toMatch(/500/)
    })
  })
})
