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
      basins: { map: 1, product: 1, depth: 0.5, mapOnly: 0, productOnly: 0 },
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
    expect(printed).toMatch(
      /^basins +1 in the map, none that the product lacks; 1 in the product.*deeper than 0\.5 kT$/m,
    )
  })

  it('counts basins at the depth asked for, in the units of the file', async () => {
    const ridges = pairs(0, 8000)
      .split('\n')
      .map((line, row) => {
        const [bond, angle] = line.split(' ').map(Number)
        const [along, across] = [(bond - 0.35) * 150, ((angle - 120) / 5) * 0.35 + (row % 2 === 0 ? 1 : -1)]
        return `${0.35 + 0.007 * (along + across)} ${120 + 3.5 * (along - across)}`
      })
      .join('\n')
    const basinsAt = async (depth: string) => {
      const { printed } = await withTextFile(ridges, (path) =>
        runCommand('correlate', path, ...CORRELATE, '--columns', 'x,y', '--basin-depth', depth, '--json'),
      )
      return (JSON.parse(printed) as CorrelationJson).basins!
    }
    const basins = await basinsAt('0.5')
    expect(basins).toMatchObject({ map: 2, product: 1, depth: 0.5, mapOnly: 1, productOnly: 0 })
    expect(basins.found.map(({ inProduct }) => inProduct).sort()).toEqual([false, true])
    expect(basins.found[0].depth).toBeNull()
    for (const { x, y } of basins.found) {
      expect(Math.abs(x - 0.35)).toBeLessThan(0.02)
      expect(Math.abs(y - 120)).toBeLessThan(10)
    }
    expect(await basinsAt('20')).toMatchObject({ map: 1, depth: 20 })
  })

  it('writes an information that rounds to nothing as a bound', async () => {
    const { printed } = await withTextFile(pairs(0, 100_000), (path) =>
      runCommand('correlate', path, ...CORRELATE),
    )
    expect(printed).toMatch(/^mutual information +below 0\.001 nats/m)
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
