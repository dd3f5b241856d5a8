import { type CorrelationVerdict, JOINT_ABOVE, SEPARABLE_BELOW } from '../../shared/correlation'
import { unitWord } from '../../shared/units'
import type { BasinsJson, CorrelationJson } from './correlation-json'

const VERDICTS: Record<CorrelationVerdict, string> = {
  separable: 'separable: the two terms may be treated one by one',
  borderline: 'borderline: treating the two one by one costs little, look at the map',
  joint: 'joint potential advised',
  undecided: 'undecided: too few samples to say, or nobody said how many there are',
}

/** A correlation as lines for a person. */
export function correlationReport(json: CorrelationJson): string {
  const { kinds, units, grid, largestCoupling: largest } = json
  const rows: [string, string][] = [
    ['verdict', VERDICTS[json.verdict]],
    ['mutual information', `${nats(json.mutualInformationCorrected)} nats, corrected by unrelated tables`],
    ['  plug-in', `${nats(json.mutualInformation)} nats on ${grid[0]} x ${grid[1]} bins`],
    ['  Miller-Madow', `${nats(json.mutualInformationMillerMadow)} nats on the file's own bins`],
    ['unrelated tables', `mean ${digits(json.nullMean)} nats, p = ${digits(json.pValue)}`],
    ['total variation', digits(json.totalVariation)],
    ['Pearson, Spearman', `${digits(json.pearson)}, ${digits(json.spearman)}`],
    [
      'largest coupling',
      largest === null
        ? 'no cell holds enough to judge'
        : `${digits(largest.value)} kT at ${digits(largest.x)} ${unitWord(units[0])}, ` +
          `${digits(largest.y)} ${unitWord(units[1])}`,
    ],
    ['basins', basins(json.basins)],
    ['independent samples', digits(json.independentSamples)],
    ['thresholds', `${SEPARABLE_BELOW} and ${JOINT_ABOVE} nats, our defaults`],
  ]
  const width = Math.max(...rows.map(([name]) => name.length)) + 2
  const lines = rows.map(([name, text]) => `${name.padEnd(width)}${text}`)
  return [`${kinds[0]} with ${kinds[1]}, ${json.input.name}`, ...lines, ''].join('\n')
}

/** A count of basins never stands without the depth it was asked at. */
function basins(json: BasinsJson | null): string {
  if (json === null) return 'unknown: no sample size, or data in too few bins'
  const { map, product, depth, mapOnly } = json
  const beyond = mapOnly === 0 ? 'none that the product lacks' : `${mapOnly} that the product lacks`
  return `${map} in the map, ${beyond}; ${product} in the product of the marginals; deeper than ${depth} kT`
}

/** An estimate that rounds to 0 is said as a bound; one below 0 is chance about 0 and written as it is. */
function nats(value: number | null): string {
  return value !== null && Math.abs(value) < 0.0005 ? 'below 0.001' : digits(value)
}

function digits(value: number | null): string {
  return value === null ? 'unknown' : String(Number(value.toPrecision(4)))
}
