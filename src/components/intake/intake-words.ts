import type { BinContent } from '@shared/histogram'
import type { CoordinateUnit } from '@shared/units'

export const UNIT_WORDS: Readonly<Record<CoordinateUnit, string>> = {
  nm: 'nm',
  angstrom: 'Å',
  degree: 'degrees',
  radian: 'radians',
}

export const CONTENT_CHOICES: readonly { value: BinContent; title: string }[] = [
  { value: 'count', title: 'counts' },
  { value: 'density', title: 'density' },
  { value: 'probability', title: 'probability' },
]

/** The columns of a file as choices, with their names where the file names them. */
export const columnChoices = (preview: {
  readonly columnCount: number
  readonly columnNames: readonly string[] | null
}): { value: number; title: string }[] =>
  Array.from({ length: preview.columnCount }, (_, column) => {
    const name = preview.columnNames?.[column]
    return { value: column, title: name ? `column ${column + 1}, ${name}` : `column ${column + 1}` }
  })
