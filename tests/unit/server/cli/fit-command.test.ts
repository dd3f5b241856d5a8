import { describe, expect, it } from 'vitest'
import type { RankingJson } from '../../../../server/cli/fit-json'
import { createRandom } from '@shared/numeric'
import { runCommand, withTextFile } from '../../../support/run-command'

/** kJ/mol/deg² */
const K = 0.02

/** Counts of a harmonic angle about 100° in 90 bins of 2°, with the noise of 20,000 samples. */
function angleFile(): string {
  const random = createRandom(5)
  const kT = 8.31446261815324e-3 * 400
  const masses = Array.from({ length: 90 }, (_, bin) => {
    const theta = 2 * bin + 1
    return Math.sin((theta * Math.PI) / 180) * Math.exp((-K * (theta - 100) ** 2) / (2 * kT))
  })
  const total = masses.reduce((sum, mass) => sum + mass, 0)
  return masses.map((mass, bin) => `${2 * bin + 1} ${random.poisson((20_000 * mass) / total)}`).join('\n')
}

const FIT = ['--kind', 'angle', '--temperature', '400', '--unit', 'degree', '--columns']

function fit(columns: string, ...words: string[]) {
  return withTextFile(angleFile(), (path) => runCommand('fit', path, ...FIT, columns, ...words))
}

async function fitJson(columns: string, ...words: string[]): Promise<RankingJson> {
  const { printed, notes } = await fit(columns, ...words, '--json')
  expect(notes).not.toContain('beadwright:')
  return JSON.parse(printed) as RankingJson
}

describe('beadwright fit', () => {
  it('ranks every form of the kind, the true one first, in the units of the file', async () => {
    const { fits, refused, units, independentSamples } = await fitJson('centre,count')
    expect([...fits, ...refused].map(({ form }) => form).sort()).toEqual([
      'cosine-harmonic',
      'gaussians',
      'harmonic',
      'quartic',
    ])
    expect(units).toEqual({ coordinate: 'degree', energy: 'kJ/mol' })
    expect(independentSamples).toBeGreaterThan(19_000)
    const [best] = fits
    expect(best).toMatchObject({ form: 'harmonic', formula: 'U = ½ k (θ − θ0)²', freeParameters: 2 })
    const [k, centre] = best.parameters
    expect(k.unit).toBe('kJ/mol/deg²')
    expect(Math.abs(k.value - K)).toBeLessThan(3 * (k.standardError ?? NaN))
    expect(Math.abs(centre.value - 100)).toBeLessThan(3 * (centre.standardError ?? NaN))
    expect(fits.map(({ deltaAic }) => deltaAic ?? NaN)).toEqual(
      fits.map(({ deltaAic }) => deltaAic ?? NaN).sort((one, other) => one - other),
    )
    fits.forEach(({ largestDeviation }) => expect(largestDeviation?.value).toBeGreaterThan(0))
  })

  it('prints a table and each formula with errors for people', async () => {
    const { status, printed } = await fit('centre,count', '--energy-unit', 'kcal/mol')
    expect(status).toBe(0)
    expect(printed).toMatch(/^angle at 400 K, input\.txt$/m)
    expect(printed).toMatch(/^form +parameters +AIC +ΔAIC +χ²\/freedom +largest \|ΔU\|$/m)
    expect(printed).toMatch(/^harmonic +2 +\d+\.\d +0\.0 .* kT at .* °$/m)
    expect(printed).toMatch(/^ {2}U = ½ k \(θ − θ0\)²\n {2}k +0\.00\d+ ± 0\.0000\d+ kcal\/mol\/deg²$/m)
    expect(printed).toMatch(/^ {2}θ0 +(99|100)\.\d+ ± 0\.\d+ °$/m)
  })

  it('prints one form alone, with a number of terms if asked', async () => {
    const { fits, refused } = await fitJson('centre,count', '--form', 'gaussians', '--terms', '1')
    expect(refused).toEqual([])
    expect(fits).toMatchObject([{ form: 'gaussians', terms: 1, tried: [] }])
    expect(fits[0].deltaAic).toBeCloseTo(0, 3)
  })

  it('divides counts by the inefficiency', async () => {
    const [plain, divided] = await Promise.all([
      fitJson('centre,count', '--form', 'harmonic'),
      fitJson('centre,count', '--form', 'harmonic', '--inefficiency', '4'),
    ])
    expect(divided.inefficiency).toBe(4)
    const errorOf = ({ fits }: RankingJson) => fits[0].parameters[0].standardError ?? NaN
    expect(errorOf(divided) / errorOf(plain)).toBeCloseTo(2, 6)
  })

  it('ranks nothing without a sample size, and says so', async () => {
    const { printed, notes } = await fit('centre,density', '--json')
    const { fits, refused, warnings } = JSON.parse(printed) as RankingJson
    expect(fits.map(({ aic, deltaAic, goodness }) => [aic, deltaAic, goodness])).toEqual(
      fits.map(() => [null, null, null]),
    )
    expect(fits.flatMap(({ parameters }) => parameters.map(({ standardError }) => standardError))).toEqual(
      fits.flatMap(({ parameters }) => parameters.map(() => null)),
    )
    expect(refused.map(({ form, code }) => [form, code])).toContainEqual(['gaussians', 'SAMPLE_SIZE_UNKNOWN'])
    expect(warnings.map(({ code }) => code)).toContain('RANKING_UNKNOWN')
    expect(notes).toContain('RANKING_UNKNOWN')
    const report = await fit('centre,density')
    expect(report.printed).toContain('gaussians refused (SAMPLE_SIZE_UNKNOWN)')
    expect(report.printed).toContain('(error unknown)')
  })

  it.each([
    [['--form', 'morse'], /forms of an angle are harmonic, cosine-harmonic, quartic, gaussians/],
    [['--form', 'spring'], /Choose one of/],
    [['--terms', '2'], /--form/],
    [['--form', 'gaussians', '--terms', '9'], /1 to 4 terms/],
    [['--form', 'harmonic', '--terms', '1'], /no number of terms/],
    [['--inefficiency', '0.5'], /from 1 to/],
  ])('refuses the options %j with exit status 2', async (words, sentence) => {
    const { status, printed, notes } = await fit('centre,count', ...words)
    expect(status).toBe(2)
    expect(printed).toBe('')
    expect(notes).toMatch(sentence)
  })

  it('explains its JSON in its help', async () => {
    const { status, printed } = await runCommand('fit', '--help')
    expect(status).toBe(0)
    for (const word of ['standardError', 'deltaAic', 'largestDeviation', 'refused']) {
      expect(printed).toContain(word)
    }
  })
})
