import { type CurveBasins, curveBasins, DEFAULT_BASIN_THRESHOLD } from '@shared/basins'
import { InvalidInputError, type InputPlace, type InvalidInputCode } from '@shared/errors'
import { type DihedralFlatness, dihedralFlatness } from '@shared/flatness'
import {
  comparedRanking,
  curveAic,
  type DerivedPotential,
  fitChosenForm,
  type FormRanking,
  rankForms,
  withForm,
} from '@shared/forms'
import type { Histogram } from '@shared/histogram'
import { DEFAULT_INVERSION_SETTINGS, invert, type InversionSettings } from '@shared/inversion'
import { makeTable, type Table } from '@shared/tables'
import { remembered } from './remembered'

/** What the bench asks: one histogram at one temperature under the settings on screen. */
export interface InversionTask {
  readonly histogram: Histogram
  readonly temperature: number
  readonly settings: InversionSettings
  /** Basins are asked for from this depth on, in kT. */
  readonly basinDepth: number
  /** A dihedral whose potential rises by less than this may be dropped, in kT. */
  readonly flatBelow: number
}

/** What the table is written from, the table, and the evidence that rests on the smooth curve. */
export interface InversionAnswer extends DerivedPotential {
  readonly table: Table
  readonly basins: CurveBasins
  /** Of a dihedral only. */
  readonly flatness: DihedralFlatness | null
}

/** All forms beside the smooth curve they are compared with. */
export interface RankingAnswer {
  readonly ranking: FormRanking
  /** AIC of the smooth curve; null where it has none. */
  readonly curveAic: number | null
}

/** A refusal as plain data: an error class does not survive the way between threads. */
export interface Refusal {
  readonly code: InvalidInputCode
  readonly message: string
  readonly place: InputPlace
}

export type Outcome<Answer> =
  { readonly answer: Answer; readonly refusal: null } | { readonly answer: null; readonly refusal: Refusal }

/** Inverts, puts the chosen form in its place, and makes the table. */
export function runInversion(task: InversionTask): Outcome<InversionAnswer> {
  return outcomeOf(() => {
    const { histogram, temperature, settings, basinDepth, flatBelow } = task
    const derived = withForm(invert(histogram, temperature, settings), chosenForm(task))
    const { inversion, smooth } = derived
    const threshold = { ...DEFAULT_BASIN_THRESHOLD, depth: basinDepth }
    return {
      ...derived,
      table: makeTable(inversion.potential, settings.table),
      basins: curveBasins(smooth.potential, threshold, smooth.jacobian),
      flatness: smooth.kind === 'dihedral' ? dihedralFlatness(smooth, flatBelow) : null,
    }
  })
}

/** Ranks all forms of the histogram and compares them with the smooth curve under the settings. */
export function runRanking(task: InversionTask): Outcome<RankingAnswer> {
  return outcomeOf(() => {
    const smooth = invert(task.histogram, task.temperature, task.settings)
    return { ranking: comparedRanking(rankedForms(task), smooth), curveAic: curveAic(smooth) }
  })
}

/** Where automatic smoothing sits, log10 λ, for the mark beside the slider; null where it cannot be chosen. */
export function findAutomatic({ histogram, temperature, settings }: InversionTask): Outcome<number | null> {
  return outcomeOf(() => {
    const { smoothing } = DEFAULT_INVERSION_SETTINGS
    return invert(histogram, temperature, { ...settings, smoothing }).smoothing.log10Lambda
  })
}

/** Neither depends on the smoothing: they stay while the slider moves. */
const chosenForm = remembered(
  ({ histogram, temperature, settings }: InversionTask) => fitChosenForm(histogram, temperature, settings),
  ({ temperature, settings: { form, jacobian, inefficiency, table } }) =>
    form === null ? null : [temperature, form, jacobian, inefficiency, table.low, table.high],
)
const rankedForms = remembered(
  ({ histogram, temperature, settings: { jacobian, inefficiency } }: InversionTask) =>
    rankForms(histogram, temperature, { jacobian, inefficiency }),
  ({ temperature, settings: { jacobian, inefficiency } }) => [temperature, jacobian, inefficiency],
)

function outcomeOf<Answer>(work: () => Answer): Outcome<Answer> {
  try {
    return { answer: work(), refusal: null }
  } catch (error) {
    if (!(error instanceof InvalidInputError)) throw error
    return { answer: null, refusal: { code: error.code, message: error.message, place: error.place } }
  }
}
