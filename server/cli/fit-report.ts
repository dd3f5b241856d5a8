import type { ShownParameter } from '../../shared/forms'
import { unitSymbol } from '../../shared/units'
import type { FitJson, RankingJson } from './fit-json'

const HEAD = ['form', 'parameters', 'AIC', 'ΔAIC', 'χ²/freedom', 'largest |ΔU|']

/** A ranking as lines for a person: a table of all forms, then each with its formula and parameters. */
export function fitReport(json: RankingJson): string {
  const rows = [HEAD, ...json.fits.map((fit) => tableRow(fit, json))]
  const widths = HEAD.map((_, column) => Math.max(...rows.map((row) => row[column].length)))
  const table = rows.map((row) =>
    row
      .map((cell, column) => cell.padEnd(widths[column]))
      .join('  ')
      .trimEnd(),
  )
  return [
    `${json.kind} at ${json.temperature} K, ${json.input.name}`,
    `independent samples  ${json.independentSamples === null ? 'unknown' : digits(json.independentSamples)}`,
    '',
    ...(json.fits.length > 0 ? table : ['no form fits']),
    ...json.fits.flatMap(formLines),
    ...json.refused.flatMap(({ form, code, message }) => ['', `${form} refused (${code})`, `  ${message}`]),
    '',
  ].join('\n')
}

function tableRow({ form, terms, freeParameters, ...fit }: FitJson, { units }: RankingJson): string[] {
  const { goodness, largestDeviation: largest } = fit
  return [
    terms === null ? form : `${form} (${terms})`,
    String(freeParameters),
    fit.aic === null ? 'unknown' : fit.aic.toFixed(1),
    fit.deltaAic === null ? 'unknown' : fit.deltaAic.toFixed(1),
    goodness === null ? 'unknown' : digits(goodness.chiSquare / goodness.freedom),
    largest === null
      ? 'unknown'
      : `${digits(largest.value)} kT at ${digits(largest.coordinate)} ${unitSymbol(units.coordinate)}`,
  ]
}

function formLines({ form, formula, parameters, tried }: FitJson): string[] {
  const width = Math.max(...parameters.map(({ name }) => name.length)) + 2
  return [
    '',
    form,
    `  ${formula}`,
    ...parameters.map((parameter) => `  ${parameter.name.padEnd(width)}${valueText(parameter)}`),
    ...(tried.length > 0 ? [`  terms tried, with AIC: ${tried.map(triedText).join(', ')}`] : []),
  ]
}

/** The value to the second digit of its error, or to six digits. */
function valueText({ value, standardError, unit, atBound }: ShownParameter): string {
  const tail = unit === '' ? '' : ` ${unit}`
  if (atBound) return `${digits(value, 6)}${tail} (held at the end of its domain)`
  if (standardError === null) return `${digits(value, 6)}${tail} (error unknown)`
  if (!(standardError > 0)) return `${digits(value, 6)}${tail} (exact)`
  const decimals = Math.min(12, Math.max(0, 1 - Math.floor(Math.log10(standardError))))
  return `${value.toFixed(decimals)} ± ${standardError.toFixed(decimals)}${tail}`
}

function triedText({ terms, aic }: { readonly terms: number; readonly aic: number | null }): string {
  return `${terms}: ${aic === null ? 'refused' : aic.toFixed(1)}`
}

function digits(value: number, count = 4): string {
  return String(Number(value.toPrecision(count)))
}
