/** What is looked at in a file. */
export type LayoutCheckCode =
  | 'ROWS_EVEN'
  | 'COORDINATES_DISTINCT'
  | 'DOMAIN_COVERED'
  | 'FORCE_CONSISTENT'
  | 'FORCE_SUM'
  | 'PERIODIC_ENDS'
  | 'FORCE_UNIT_DIFFERS'
  | 'CELLS_FIT'
  | 'RESAMPLED'

/** One check of a file with a sentence for people. */
export interface LayoutCheck {
  readonly code: LayoutCheckCode
  readonly ok: boolean
  readonly message: string
}

/** A number in a sentence, with the digits it needs. */
export function shortNumber(value: number, digits = 4): string {
  return String(Number(value.toPrecision(digits)))
}
