import type { LayoutDocument } from '@shared/contracts/layout'

type Choice<Value> = { readonly value: Value; readonly title: string; readonly subtitle?: string }

/** The values that have words, in their order. */
export const valuesOf = <Value extends string>(words: Readonly<Record<Value, string>>): Value[] =>
  Object.keys(words) as Value[]

/** A list of choices out of the words for each value. */
const choices = <Value extends string>(words: Readonly<Record<Value, string>>): Choice<Value>[] =>
  valuesOf(words).map((value) => ({ value, title: words[value] }))

export const QUANTITY_WORDS: Readonly<Record<LayoutDocument['columns'][number], string>> = {
  row: 'row number',
  coordinate: 'coordinate',
  energy: 'energy',
  force: 'force, −dU/dq',
  derivative: 'derivative, dU/dq',
}

export const JOINT_QUANTITY_WORDS: Readonly<Record<LayoutDocument['joint']['columns'][number], string>> = {
  row: 'row number',
  x: 'x',
  y: 'y',
  energy: 'energy',
  xForce: 'force along x',
  yForce: 'force along y',
  xDerivative: 'derivative by x',
  yDerivative: 'derivative by y',
}

export const WRITING = choices<LayoutDocument['writing']>({
  columns: 'columns',
  template: 'a template for each row',
  json: 'JSON',
})

export const SEPARATORS = choices<LayoutDocument['separator']>({
  spaces: 'blanks',
  tab: 'tabs',
  comma: 'commas',
  semicolon: 'semicolons',
})

export const LINE_ENDS = choices<LayoutDocument['lineEnd']>({ lf: 'LF', crlf: 'CR LF' })

export const FIRST_ROWS = [
  { value: 0, title: '0' },
  { value: 1, title: '1' },
] as const

export const READINGS = choices<LayoutDocument['angle']['reading']>({
  internal: 'internal angle, straight at 180°',
  supplement: 'supplement, straight at 0',
})

export const ZEROS = choices<LayoutDocument['dihedral']['zero']>({ cis: 'cis', trans: 'trans' })

export const RANGES = choices<LayoutDocument['dihedral']['range']>({
  '-180..180': '−180° to 180°',
  '0..360': '0 to 360°',
})

export const YES_OR_NO = choices<'yes' | 'no'>({ yes: 'yes', no: 'no' })

export const STYLES = choices<LayoutDocument['numbers']['energy']['style']>({
  shortest: 'shortest',
  fixed: 'fixed',
  scientific: 'scientific',
})

export const OUTER = choices<LayoutDocument['joint']['outer']>({ x: 'x', y: 'y' })
