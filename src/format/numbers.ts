const GROUP = '\u00a0'
const MINUS = '\u2212'

/** A whole number in groups of three, parted by a no-break space, with a real minus: 120 005. */
export const formatCount = (count: number): string => {
  const digits = Math.abs(Math.round(count))
    .toString()
    .replace(/\B(?=(\d{3})+$)/g, GROUP)
  return count < 0 ? `${MINUS}${digits}` : digits
}

/** A number with a fixed count of decimals and a real minus. */
export const formatFixed = (value: number, decimals: number): string => {
  const text = Math.abs(value).toFixed(decimals)
  return value < 0 && Number(text) !== 0 ? `${MINUS}${text}` : text
}

/** A number as it was given, at most `digits` significant ones, with a real minus. */
export const formatShort = (value: number, digits = 6): string =>
  String(Number(value.toPrecision(digits))).replace('-', MINUS)

/** The size of a file: 17 kB, 2.4 MB. */
export const formatBytes = (bytes: number): string => {
  if (bytes < 1000) return `${bytes}${GROUP}bytes`
  if (bytes < 1_000_000) return `${Math.round(bytes / 1000)}${GROUP}kB`
  return `${(bytes / 1_000_000).toFixed(1)}${GROUP}MB`
}

/** "1 table", "3 tables": the count and its word; `plural` where adding an s is not enough. */
export const countOf = (count: number, word: string, plural = `${word}s`): string =>
  `${formatCount(count)} ${count === 1 ? word : plural}`
