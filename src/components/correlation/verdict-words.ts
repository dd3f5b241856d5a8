import type { Correlation, CorrelationVerdict } from '@shared/correlation'
import { decimalsFor, fixedText, significantText } from '@/components/figure/number-text'
import type { DecisionChoice } from './decision-words'

/** Two terms by their names, bond first. */
export type PairNames = readonly [first: string, second: string]

export const VERDICT_TITLES: Readonly<Record<CorrelationVerdict, string>> = {
  separable: 'Separable',
  borderline: 'Borderline',
  joint: 'Joint potential advised',
  undecided: 'Too few samples to say',
}

/** The heading of the card; a missing sample size is told apart from a small one. */
export function verdictTitle({ verdict, independentSamples }: Correlation): string {
  if (verdict === 'undecided' && independentSamples === null) return 'Sample size not stated'
  return VERDICT_TITLES[verdict]
}

/** Nats with three decimals; an estimate below 0 is chance about 0 and is written as it is, and what rounds to 0 as a bound. */
export function natsText(nats: number): string {
  return Math.abs(nats) < 0.0005 ? 'below 0.001' : fixedText(nats, 3)
}

/** The number of the verdict and its standard deviation to the digits it earns. */
export function natsWithDeviation(
  nats: number,
  deviation: number | null,
): { value: string; error: string | null } {
  if (deviation === null || !(deviation > 0)) return { value: natsText(nats), error: null }
  const decimals = Math.min(4, Math.max(3, decimalsFor(deviation, 1)))
  return { value: fixedText(nats, decimals), error: fixedText(1.96 * deviation, decimals) }
}

/** What the verdict means for the tables. The card sets kT in italics. */
export function costSentence(correlation: Correlation, [first, second]: PairNames): string {
  const { verdict, mutualInformationCorrected, totalVariation } = correlation
  if (mutualInformationCorrected === null) {
    return 'How many independent samples the file stands for is not stated, so chance cannot be told from coupling.'
  }
  const cost = `Treating ${first} and ${second} one by one costs ${kTText(mutualInformationCorrected)} on average`
  const share = `${fixedText(100 * totalVariation, 0)} %`
  if (verdict === 'joint') return `${cost}, and misplaces ${share} of the configurations.`
  if (verdict === 'borderline') {
    return `${cost}, and misplaces ${share} of the configurations. Two tables may do; look where the coupling sits.`
  }
  if (verdict === 'separable') return `${cost}: two tables, one by one, keep what the chain does.`
  return `With so few samples unrelated terms could look like this. Measure longer before deciding.`
}

function kTText(nats: number): string {
  return nats < 0.0005 ? 'less than 0.001 kT' : `${significantText(nats, nats < 0.1 ? 1 : 2)} kT`
}

/** What it means to decide otherwise than the verdict; null where decision and verdict agree or none was reached. */
export function dissentSentence(verdict: CorrelationVerdict, choice: DecisionChoice): string | null {
  if (verdict === 'joint' && choice === 'separate') {
    return 'A joint potential is advised. Two tables let the chain visit what it does not, and no later round repairs that.'
  }
  if (verdict === 'separable' && choice === 'joint') {
    return 'The terms are separable. A joint potential needs far more samples for a grid and an engine that reads one.'
  }
  if (verdict === 'separable' && choice === 'change mapping') {
    return 'The terms are separable: this pair gives no reason to change the mapping. Say which other one does.'
  }
  if (verdict === 'undecided' && choice === 'separate') {
    return 'The samples cannot rule out a coupling. Two tables rest on the reason alone.'
  }
  return null
}
