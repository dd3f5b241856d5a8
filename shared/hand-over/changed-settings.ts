import type { InversionSettings } from '../inversion'

/**
 * What was set differently, in sentences; empty where nothing was, or where one of the two is a joint table, which takes the
 * house's own settings.
 */
export function changedSettings(before: InversionSettings | null, after: InversionSettings | null): string[] {
  if (before === null || after === null) return []
  const lines: string[] = []
  if (before.jacobian !== after.jacobian) lines.push(`Jacobian switched ${after.jacobian ? 'on' : 'off'}.`)
  if (JSON.stringify(before.smoothing) !== JSON.stringify(after.smoothing)) {
    lines.push(`Smoothing ${smoothingWords(after.smoothing)}; before ${smoothingWords(before.smoothing)}.`)
  }
  if (before.inefficiency !== after.inefficiency) {
    lines.push(
      after.inefficiency === null
        ? 'Statistical inefficiency taken from the data.'
        : `Statistical inefficiency set to ${after.inefficiency}.`,
    )
  }
  if (before.straightAngle !== after.straightAngle) {
    lines.push(after.straightAngle === 'level' ? 'Slope at 180° set to zero.' : 'Slope at 180° left free.')
  }
  if (before.form !== after.form) {
    lines.push(
      after.form === null
        ? 'Written from the smooth curve, no longer from a form.'
        : `Written from the form ${after.form}.`,
    )
  }
  if (before.tails.stiffness !== after.tails.stiffness) lines.push('Tails made differently stiff.')
  return [...lines, ...tableLines(before.table, after.table)]
}

function smoothingWords(smoothing: InversionSettings['smoothing']): string {
  if (smoothing.mode === 'off') return 'off'
  if (smoothing.mode === 'manual') return `by hand (log λ ${smoothing.log10Lambda.toFixed(2)})`
  return smoothing.criterion === 'aic' ? 'by AIC' : 'by likelihood'
}

function tableLines(before: InversionSettings['table'], after: InversionSettings['table']): string[] {
  const lines: string[] = []
  if (before.rows !== after.rows) lines.push(`${after.rows} rows; before ${before.rows}.`)
  if (before.low !== after.low || before.high !== after.high)
    lines.push('The range of the table was changed.')
  if (before.cap !== after.cap) {
    lines.push(after.cap === null ? 'No cap on the energies.' : `Energies level off at ${after.cap} kJ/mol.`)
  }
  return lines
}
