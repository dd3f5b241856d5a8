import { InvalidInputError, type InputPlace, type InvalidInputCode } from '@shared/errors'
import type { Histogram } from '@shared/histogram'
import { DEFAULT_INVERSION_SETTINGS, invert, type Inversion, type InversionSettings } from '@shared/inversion'
import { makeTable, type Table } from '@shared/tables'

/** What the bench asks: one histogram at one temperature under the settings on screen. */
export interface InversionTask {
  readonly histogram: Histogram
  readonly temperature: number
  readonly settings: InversionSettings
}

/** The inversion and the table that the same settings write. */
export interface InversionAnswer {
  readonly inversion: Inversion
  readonly table: Table
}

/** A refusal as plain data: an error class does not survive the way between threads. */
export interface Refusal {
  readonly code: InvalidInputCode
  readonly message: string
  readonly place: InputPlace
}

export type Outcome<Answer> =
  { readonly answer: Answer; readonly refusal: null } | { readonly answer: null; readonly refusal: Refusal }

/** Inverts, and makes the table. */
export function runInversion({ histogram, temperature, settings }: InversionTask): Outcome<InversionAnswer> {
  return outcomeOf(() => {
    const inversion = invert(histogram, temperature, settings)
    return { inversion, table: makeTable(inversion.potential, settings.table) }
  })
}

/** Where automatic smoothing sits, log10 λ, for the mark beside the slider; null where it cannot be chosen. */
export function findAutomatic({ histogram, temperature, settings }: InversionTask): Outcome<number | null> {
  return outcomeOf(() => {
    const { smoothing } = DEFAULT_INVERSION_SETTINGS
    return invert(histogram, temperature, { ...settings, smoothing }).smoothing.log10Lambda
  })
}

function outcomeOf<Answer>(work: () => Answer): Outcome<Answer> {
  try {
    return { answer: work(), refusal: null }
  } catch (error) {
    if (!(error instanceof InvalidInputError)) throw error
    return { answer: null, refusal: { code: error.code, message: error.message, place: error.place } }
  }
}
