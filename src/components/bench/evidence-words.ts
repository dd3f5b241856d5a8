import type { Distribution } from '@shared/contracts/distribution'
import type { AppliedInefficiency } from '@shared/inversion'
import { significantText } from '@/components/figure/number-text'
import { errorText } from './error-text'

/** The statistical inefficiency with where it comes from: "18.6 ± 1.2, from 12 blocks". */
export function inefficiencyText(
  { value, source, deviation }: AppliedInefficiency,
  blocks: Distribution['blocks'],
): string {
  const number = deviation === null ? significantText(value, 3) : errorText(value, deviation)
  if (source === 'stated') return `${number}, stated`
  if (source === 'assumed') return `${number}, taken as independent`
  if (source === 'independent samples') return `${number}, from the stated samples`
  const count = blocks === null ? '' : `${blocks.count} `
  return `${number}, from ${count}${source === 'chains' ? 'chains' : 'blocks'}`
}
