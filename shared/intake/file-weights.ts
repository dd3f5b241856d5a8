import { InvalidInputError } from '../errors'
import type { BinContent } from '../histogram/histogram'
import { tableColumn } from './numeric-table'
import type { NumericTable } from './numeric-table'

/**
 * The value column of a histogram.
 *
 * @param column counted from 0
 * @throws {InvalidInputError} as `tableColumn`; COUNT_NEGATIVE with line and column
 */
export function fileWeights(table: NumericTable, column: number, content: BinContent): Float64Array {
  const weights = tableColumn(table, column, `a ${content}`)
  const bad = weights.findIndex((weight) => weight < 0)
  if (bad < 0) return weights
  const line = table.lines[bad]
  throw new InvalidInputError(
    'COUNT_NEGATIVE',
    `Line ${line}, column ${column + 1}: a ${content} of ${weights[bad]}; it cannot be negative.`,
    { line, column: column + 1 },
  )
}

/**
 * The number of independent samples to go with a histogram: what the user stated, else the sum of the counts, else
 * unknown.
 */
export function independentSamplesOf(
  content: BinContent,
  weights: Float64Array,
  stated: number | null,
): number | null {
  if (stated !== null || content !== 'count') return stated
  return weights.reduce((sum, count) => sum + count, 0)
}
