const GROUP = '\u00a0'
const MINUS = '\u2212'
const EXPONENTS = '⁰¹²³⁴⁵⁶⁷⁸⁹'

/** A number with a fixed count of decimals, groups of three from five digits on and a real minus. */
export function fixedWords(value: number, decimals: number): string {
  const [whole, rest] = Math.abs(value).toFixed(decimals).split('.')
  const grouped = whole.length > 4 ? whole.replace(/\B(?=(\d{3})+$)/g, GROUP) : whole
  const text = rest === undefined ? grouped : `${grouped}.${rest}`
  return value < 0 && /[1-9]/.test(text) ? `${MINUS}${text}` : text
}

/**
 * A number to so many significant digits, without trailing zeros.
 *
 * @example numberWords(39312.7, 3) // '39 300'
 */
export function numberWords(value: number, digits: number): string {
  const rounded = Number(value.toPrecision(digits))
  if (rounded !== 0 && (Math.abs(rounded) < 1e-4 || Math.abs(rounded) >= 1e9))
    return powerWords(rounded, digits)
  const decimals = String(rounded).split('.')[1]?.length ?? 0
  return fixedWords(rounded, decimals)
}

/**
 * A number with its error, both to the last digit that the error, at two significant digits, has earned.
 *
 * @param error above 0; null gives the number alone
 * @example errorWords(39312.7, 1404) // '39 300 ± 1400'
 */
export function errorWords(value: number, error: number | null): string {
  if (error === null || !(error > 0 && Number.isFinite(error))) return numberWords(value, 4)
  const decimals = 1 - Math.floor(Math.log10(error))
  if (decimals > 7 || decimals < -7) return `${numberWords(value, 4)} ± ${numberWords(error, 2)}`
  // Tens and hundreds that the error has not earned become zeros.
  const step = 10 ** Math.max(0, -decimals)
  const words = (each: number): string => fixedWords(Math.round(each / step) * step, 0)
  if (decimals <= 0) return `${words(value)} ± ${words(error)}`
  return `${fixedWords(value, decimals)} ± ${fixedWords(error, decimals)}`
}

/** A count of samples: whole below a million, beyond it to four digits. */
export function countWords(count: number): string {
  return count < 1e6 ? fixedWords(Math.round(count), 0) : numberWords(count, 4)
}

/** The size of a file: 17 kB, 2.4 MB. */
export function sizeWords(bytes: number): string {
  if (bytes < 1000) return `${bytes}${GROUP}bytes`
  return bytes < 1e6 ? `${Math.round(bytes / 1000)}${GROUP}kB` : `${(bytes / 1e6).toFixed(1)}${GROUP}MB`
}

/** The day of a time stamp, in UTC: 12 June 2026. */
export function dayWords(timestamp: string): string {
  const [year, month, day] = timestamp.slice(0, 10).split('-').map(Number)
  return `${day} ${MONTHS[month - 1]} ${year}`
}

const MONTHS = [
  'January',
  'February',
  'March',
  'April',
  'May',
  'June',
  'July',
  'August',
  'September',
  'October',
  'November',
  'December',
]

function powerWords(value: number, digits: number): string {
  const [mantissa, exponent] = value.toExponential(digits - 1).split('e')
  const raised = Math.abs(Number(exponent))
    .toString()
    .replace(/\d/g, (digit) => EXPONENTS[Number(digit)])
  const sign = Number(exponent) < 0 ? '⁻' : ''
  return `${String(Number(mantissa)).replace('-', MINUS)} × 10${sign}${raised}`
}
