import { type CoordinateKind, unitWord } from '../units'
import { unitWords } from './column-names'
import { type Layout, kindLayout } from './layout'
import { readingSentence } from './layout-wording'

const SEPARATORS = { spaces: 'blanks', tab: 'tabs', comma: 'commas', semicolon: 'semicolons' } as const

/** What a layout writes, in sentences for whoever gets its files; in the letters of a text file. */
export function layoutSentences(layout: Layout, kinds: readonly CoordinateKind[]): string[] {
  return [
    rowSentence(layout),
    ...kinds.flatMap((kind) => [readingOfKind(layout, kind), forceSentence(layout, kind)]),
  ]
}

function rowSentence({ writing, columns, separator, comment }: Layout): string {
  if (writing === 'json') return `Each file is one JSON object; its rows hold ${columns.join(', ')}.`
  const comments = comment === '' ? '' : ` Lines that start with ${comment} are comments.`
  if (writing === 'template') return `The rows follow a form of the group's own.${comments}`
  return `The columns are ${columns.join(', ')}, separated by ${SEPARATORS[separator]}.${comments}`
}

function readingOfKind(layout: Layout, kind: CoordinateKind): string {
  const { coordinate, energy } = unitWords(layout, kind)
  const [name, rest] = readingSentence(layout, kind)
    .replace(/; formulas below.*$/, '')
    .split(': ')
  const end =
    kind === 'dihedral' && !layout.dihedral.repeatEnd
      ? '; the last row stands one step before the turn is full'
      : ''
  return `${name[0].toUpperCase()}${name.slice(1)} in ${coordinate}, energy in ${energy}: ${rest}${end}.`
}

function forceSentence(layout: Layout, kind: CoordinateKind): string {
  const { energyUnit, per } = kindLayout(layout, kind).force
  return `Of a ${kind === 'angle' ? 'bond angle' : kind} the force is minus the derivative of the energy by the coordinate as written, in ${unitWord(energyUnit)} per ${unitWord(per)}; a derivative has the other sign.`
}
