import { execFileSync } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import { describe, expect, it } from 'vitest'
import type { InversionJson } from '../../server/cli/inversion-json'
import { withTextFile } from '../support/run-command'
import fixture from './fixtures/harmonic-bond.json'

const COMMAND = fileURLToPath(new URL('../../server/cli/beadwright.mjs', import.meta.url))

/** Analytic: bins of p(r) = r² exp(−U/kT)/Z with U = (k/2)(r − r₀)². */
describe('the command as users start it', () => {
  it('recovers the harmonic bond from its exact bin probabilities', async () => {
    const { r_lo, bin_width, k, r0, T, kT } = fixture.inputs
    const counts = fixture.expected.bin_probability.map((probability) => probability * 1e8)
    const text = counts
      .map((count, bin) => `${r_lo + bin * bin_width}\t${r_lo + (bin + 1) * bin_width}\t${count}`)
      .join('\n')
    const printed = await withTextFile(text, (path) =>
      execFileSync(
        COMMAND,
        ['invert', path, '--kind', 'bond', '--temperature', String(T), '--unit', 'nm', '--columns'].concat([
          'low,high,count',
          '--energy-unit',
          'kJ/mol',
          '--json',
        ]),
        { encoding: 'utf8', cwd: '/' },
      ),
    )
    const json = JSON.parse(printed) as InversionJson
    const worst = json.table
      .map(({ coordinate, energy }) => ({ energy, exact: (k / 2) * (coordinate - r0) ** 2 }))
      .filter(({ exact }) => exact < 6 * kT)
      .map(({ energy, exact }) => Math.abs(energy - exact) / kT)
    expect(worst.length).toBeGreaterThan(100)
    // The bound of the product: the bin-averaging error is gone.
    expect(Math.max(...worst)).toBeLessThan(0.01)
    json.bins.forEach(({ volume, low, high }) => expect(volume).toBeCloseTo((high ** 3 - low ** 3) / 3, 12))
  })
})
