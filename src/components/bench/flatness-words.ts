import type { DihedralFlatness } from '@shared/flatness'
import { significantText } from '@/components/figure/number-text'

/** The verdict in a few words. */
export const FLATNESS_TITLES: Readonly<Record<DihedralFlatness['verdict'], string>> = {
  flat: 'Flat: may be dropped',
  keep: 'Keep this dihedral',
  undecided: 'Flat or not: not decided',
}

/** Why, in a sentence with the numbers it rests on. */
export function flatnessSentence({ verdict, doubt, amplitudeRange, flatBelow }: DihedralFlatness): string {
  if (doubt === 'SAMPLE_SIZE_UNKNOWN' || amplitudeRange === null) {
    return 'The number of independent samples is not stated, so nobody knows what in the curve is noise. State it.'
  }
  const [low, high] = amplitudeRange.map((amplitude) => significantText(amplitude, 2, 2))
  if (verdict === 'flat') {
    return `Its potential rises by ${high} kT at most, less than the ${flatBelow} kT that count as flat: a chain without this term is as good.`
  }
  if (verdict === 'keep') {
    return `Its potential rises by ${low} kT at least, more than the ${flatBelow} kT that count as flat.`
  }
  return `Within its band the potential rises by ${low} to ${high} kT, on both sides of the ${flatBelow} kT that count as flat: more independent samples decide.`
}

/** A small probability without false digits. */
export function probabilityText(probability: number): string {
  if (probability < 0.001) return 'below 0.001'
  return significantText(probability, 2, 3)
}
