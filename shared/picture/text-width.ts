/** Advance widths of Fira Sans in em, measured, by kinds of letters that share about one width. */
const NARROW = 0.28
const SLIM = 0.37
const USUAL = 0.54
const FIGURE = 0.56
const CAPITAL = 0.6
const WIDE = 0.8

/**
 * Width of a text in pixels without a screen to measure it on, within some 5 % for Fira Sans and fonts like it: enough to
 * lay entries of a key beside each other and to break a caption.
 */
export function textWidth(text: string, size: number): number {
  let width = 0
  for (const letter of text) width += advance(letter)
  return width * size
}

function advance(letter: string): number {
  if (/[ijl.,:;'!|() \u00a0]/.test(letter)) return NARROW
  if (/[frtI[\]/-]/.test(letter)) return SLIM
  if (/[mwMW%@—]/.test(letter)) return WIDE
  if (/\d/.test(letter)) return FIGURE
  return /\p{Lu}/u.test(letter) ? CAPITAL : USUAL
}

/** Words in lines no wider than `width`; a word that is wider stands alone in its line. */
export function brokenLines(text: string, width: number, size: number): string[] {
  const lines: string[] = []
  for (const word of text.split(' ')) {
    const open = lines.at(-1)
    if (open !== undefined && textWidth(`${open} ${word}`, size) <= width)
      lines[lines.length - 1] = `${open} ${word}`
    else lines.push(word)
  }
  return lines
}
