import type { AppliedInefficiency, InefficiencySource } from '../inversion'
import { formatNumber } from './format-number'

const SOURCES: Readonly<Record<InefficiencySource, string>> = {
  stated: 'as stated',
  'independent samples': 'from the stated number of independent samples',
  'time blocks': 'from the scatter between blocks of time',
  chains: 'from the scatter between chains',
  assumed: 'assumed: every count was taken as an independent sample',
}

/** What counts were divided by, with its error where it was measured, and who says so. */
export function inefficiencySentence({ value, source, deviation }: AppliedInefficiency): string {
  const error = deviation === null ? '' : ` +- ${shortNumber(deviation, 2)}`
  return `counts divided by ${shortNumber(value, 4)}${error}, ${SOURCES[source]}`
}

function shortNumber(value: number, digits: number): string {
  return formatNumber(Number(value.toPrecision(digits)))
}
