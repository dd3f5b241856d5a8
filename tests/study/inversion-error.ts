import {
  bandCoverage,
  CRITERIA,
  inversionErrors,
  pooledCoverage,
  type StudyErrors,
} from '../support/inversion-study'
import { STUDY_DENSITIES } from '../support/study-densities'

const SAMPLES = [1000, 10_000, 100_000]
const ERROR_REPEATS = 200
const BAND_REPEATS = 500
const SEED = 20_261_201

const percent = (share: number): string => `${(100 * share).toFixed(1)} %`
const grouped = (value: number): string => value.toLocaleString('en-US')
const row = (cells: readonly string[]): string => `| ${cells.join(' | ')} |`
const rule = (columns: number): string => `|${' --- |'.repeat(columns)}`

/** Prints the tables of docs/inversion-accuracy.md; `npm run study`. */
function study(): void {
  const errorHead = ['Density', 'Samples', 'Unsmoothed', 'Likelihood', 'Ratio', 'AIC', 'Ratio', 'Empty']
  const lines = [row([...errorHead, 'All bins']), rule(errorHead.length + 1)]
  for (const density of STUDY_DENSITIES) {
    for (const samples of SAMPLES) {
      const errors = inversionErrors(density, samples, ERROR_REPEATS, SEED)
      lines.push(row([density.name, grouped(samples), ...errorCells(errors)]))
    }
  }
  const bandHead = [
    'Density',
    ...SAMPLES.flatMap((samples) => CRITERIA.map((name) => `${name}, ${grouped(samples)}`)),
  ]
  lines.push('', row(bandHead), rule(bandHead.length))
  const columns = SAMPLES.flatMap((samples) => CRITERIA.map((criterion) => ({ samples, criterion })))
  const coverages = STUDY_DENSITIES.map((density) =>
    columns.map(({ samples, criterion }) => bandCoverage(density, samples, BAND_REPEATS, SEED, criterion)),
  )
  STUDY_DENSITIES.forEach(({ name }, index) => {
    lines.push(row([name, ...coverages[index].map((coverage) => percent(pooledCoverage([coverage])))]))
  })
  const pooled = columns.map((_, column) => percent(pooledCoverage(coverages.map((cells) => cells[column]))))
  lines.push(row(['All six', ...pooled]))
  process.stdout.write(`${lines.join('\n')}\n`)
}

function errorCells({ raw, smooth, smoothAll, empty }: StudyErrors): string[] {
  return [
    raw.toFixed(4),
    ...CRITERIA.flatMap((criterion) => [smooth[criterion].toFixed(4), (smooth[criterion] / raw).toFixed(2)]),
    `${(100 * empty).toFixed(1)} %`,
    smoothAll.likelihood.toFixed(4),
  ]
}

study()
