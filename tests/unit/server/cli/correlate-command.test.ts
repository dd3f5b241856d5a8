import { describe, expect, it } from 'vitest'
import type { CorrelationJson } from '../../../../server/cli/correlation-json'
import { createRandom } from '@shared/numeric'
import { runCommand, withTextFile } from '../../../support/run-command'

/** Pairs of a bond in nm and an angle in degrees with a given correlation. */
function pairs(correlation: number, count: number): string {
  const random = createRandom(7)
  return Array.from({ length: count }, () => {
    const [x, y] = [random.normal(), random.normal()]
    const z = correlation * x + Math.sqrt(1 - correlation ** 2) * y
    return `${0.35 + 0.01 * x} ${120 + 5 * z}`
  }).join('\n')
}

const CORRELATE = ['--kinds', 'bond,angle', '--units', 'nm,degree']

describe('beadwright correlate', () => {
  it('calls unrelated samples separable and related ones in need of a joint potential', async () => {
    const verdictOf = async (correlation: number) => {
      const { printed } = await withTextFile(pairs(correlation, 5000), (path) =>
        runCommand('correlate', path, ...CORRELATE, '--columns', 'x,y', '--json'),
      )
      return JSON.parse(printed) as CorrelationJson
    }
    expect(await verdictOf(0)).toMatchObject({
      verdict: 'separable',
      samples: 5000,
      independentSamples: 5000,
    })
    const related = await verdictOf(0.7)
    expect(related).toMatchObject({ verdict: 'joint', grid: [25, 25] })
    expect(related.pearson).toBeCloseTo(0.7, 1)
    expect(related.pValue).toBeLessThan(0.01)
  })

  it('prints a report for people without --json', async () => {
    const { status, printed } = await withTextFile(pairs(0.7, 5000), (path) =>
      runCommand('correlate', path, ...CORRELATE),
    )
    expect(status).toBe(0)
    expect(printed).toMatch(/^verdict +joint potential advised$/m)
  })

  it.each([
    [['--kinds', 'bond', '--units', 'nm,degree'], /two words/],
    [['--kinds', 'bond,angle', '--units', 'degree,nm'], /nm or angstrom/],
    [[...CORRELATE, '--columns', 'x,count'], /Name x, y/],
  ])('refuses the options %j with exit status 2', async (words, sentence) => {
    const { status, notes } = await withTextFile(pairs(0, 100), (path) =>
      runCommand('correlate', path, ...words),
    )
    expect(status).toBe(2)
    expect(notes).toMatch(sentence)
  })
})
