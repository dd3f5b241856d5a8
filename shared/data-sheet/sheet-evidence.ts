import type { DataSheet, SheetLine } from '../contracts/data-sheet'
import type { HandOverLayout } from '../contracts/hand-over'
import { type FormFit, parametersInUnits } from '../forms'
import { placeWords } from '../inversion'
import { coordinateUnitOf } from './curve-figure'
import { countWords, dayWords, errorWords, fixedWords, numberWords } from './number-words'
import type { SheetSource, SourcePair } from './sheet-source'

const VERDICTS = {
  separable: 'separable',
  borderline: 'borderline',
  joint: 'joint potential advised',
  undecided: 'too few samples to say',
} as const

const DECISIONS = {
  joint: 'One joint potential',
  separate: 'Two single tables',
  'change mapping': 'Change the mapping',
} as const

/** Standard deviations that a 95 % interval reaches to either side. */
const INTERVAL = 1.96

/** The analytic forms that tables are written from: formula, parameters with their errors, distance from the smooth curve. */
export function formLines({ frozen, tables }: Pick<SheetSource, 'frozen' | 'tables'>): SheetLine[] {
  return tables.flatMap(({ name, single }) =>
    single?.form ? [{ title: name, text: formWords(single.form, frozen.layout) }] : [],
  )
}

function formWords(form: FormFit, units: Pick<HandOverLayout, 'length' | 'angle' | 'energy'>): string {
  const parameters = parametersInUnits(form, coordinateUnitOf(form.kind, units), units.energy)
    .map(({ name, value, standardError, unit, atBound }) => {
      const shown = errorWords(value, standardError === null ? null : INTERVAL * standardError)
      return `${name}\u00a0=\u00a0${withUnit(shown.replaceAll(' ', '\u00a0'), unit)}${atBound ? ' (held at the end of its domain)' : ''}`
    })
    .join(', ')
  const { largestDeviation } = form
  const distance =
    largestDeviation === null
      ? ''
      : ` It differs from the smooth curve by up to ${fixedWords(largestDeviation.value, 2)} kT where the data live, at ${placeWords(form.kind, largestDeviation.coordinate).replace('-', '−')}.`
  return `${form.formula}, with ${parameters}.${distance}`
}

/** A value with its error in brackets before a unit, as in (39 300 ± 1400) kJ/mol/nm². */
function withUnit(shown: string, unit: string): string {
  if (unit === '') return shown
  const value = shown.includes('±') ? `(${shown})` : shown
  return unit === '°' ? `${value}°` : `${value}\u00a0${unit}`
}

/** The verdict on each pair whose joint distribution was looked at, and what was decided. */
export function verdictRows(pairs: SheetSource['pairs']): DataSheet['verdicts'] {
  return pairs.map(({ name, numbers, ...pair }) => ({
    name,
    verdict: VERDICTS[numbers.verdict],
    information: fixedWords(numbers.mutualInformationCorrected ?? numbers.mutualInformation, 3),
    pValue:
      numbers.pValue === null ? '–' : numbers.pValue < 0.001 ? '< 0.001' : fixedWords(numbers.pValue, 3),
    samples: numbers.independentSamples === null ? 'not stated' : countWords(numbers.independentSamples),
    decision: decisionWords(pair),
  }))
}

function decisionWords({ decision, apart }: Pick<SourcePair, 'decision' | 'apart'>): string {
  if (decision === null) return 'None asked for.'
  const { choice, reason, by, at } = decision
  const who = `${by === null ? '' : `${by}, `}${dayWords(at)}`
  const kept = apart === null ? '' : ` Kept apart in this hand-over: ${sentence(apart)}`
  return `${DECISIONS[choice]}. ${sentence(reason)} (${who})${kept}`
}

/** Every warning of the tables with the answer on record. */
export function warningRows(tables: SheetSource['tables']): DataSheet['warnings'] {
  return tables.flatMap(({ name, warnings }) =>
    warnings.map(({ message, answer }) => ({
      about: listed(name),
      message,
      answer:
        answer === null
          ? 'No answer on record.'
          : `Kept: ${sentence(answer.reason)} (${answer.by === null ? '' : `${answer.by}, `}${dayWords(answer.at)})`,
    })),
  )
}

/** Both names of a joint table, as in E–H, B–E–H. */
export const listed = (name: string): string => name.split(' · ').join(', ')

/** How many samples a number of independent ones is, for a caption. */
export function samplesWords(samples: number | null): string {
  return samples === null ? 'sample size not stated' : `N = ${countWords(samples)}`
}

/** log₁₀ λ of each axis. */
export function lambdaWords(log10Lambda: readonly number[] | null): string {
  return log10Lambda === null ? '–' : log10Lambda.map((value) => fixedWords(value, 2)).join('; ')
}

/** An effective dimension to the digits that matter. */
export function dimensionWords(dimension: number | null): string {
  return dimension === null ? '–' : numberWords(dimension, 3)
}

/** A reason as a sentence: with an end. */
function sentence(text: string): string {
  const trimmed = text.trim()
  return /[.!?…]$/.test(trimmed) ? trimmed : `${trimmed}.`
}
