import type { SheetLine } from '../contracts/data-sheet'
import type { FrozenHandOver } from '../contracts/hand-over'
import { unitSymbol } from '../units'
import { dayWords, numberWords } from './number-words'

const COUNTS = [
  'no',
  'one',
  'two',
  'three',
  'four',
  'five',
  'six',
  'seven',
  'eight',
  'nine',
  'ten',
  'eleven',
  'twelve',
]

const SITES = { mass: 'centres of mass', geometry: 'geometric centres', atom: 'single atoms' } as const

/** What stands after the name of the polymer: three beads for one repeat unit (3-to-1), 400 K. */
export function subtitleWords({ mapping, statePoint }: FrozenHandOver): string {
  const count = mapping.document.beads.length
  const beads = `${COUNTS[count] ?? count} bead${count === 1 ? '' : 's'} for one repeat unit`
  return `${beads} (${mapping.name}), ${numberWords(statePoint.temperature, 6)} K`
}

/** The state point in a line. */
export function statePointWords({ statePoint }: Pick<FrozenHandOver, 'statePoint'>): string {
  const { temperature, pressure, phase, composition } = statePoint
  return [
    `${numberWords(temperature, 6)} K`,
    pressure === null ? '' : `${numberWords(pressure, 6)} bar`,
    phase,
    composition,
  ]
    .filter((part) => part !== '')
    .join(', ')
}

/** What the sheet says first, each in a word or two. */
export function sheetFacts(frozen: FrozenHandOver): SheetLine[] {
  const { layout, mapping, group, madeBy, signedOffBy, signedOffAt, releasedAt, replaces } = frozen
  const units = [unitSymbol(layout.length), `${layout.angle}s`, unitSymbol(layout.energy)].join(', ')
  return [
    { title: 'State point', text: statePointWords(frozen) },
    { title: 'Units in the files', text: units },
    { title: 'Layout', text: layout.name },
    { title: 'Made by', text: madeBy === null ? group : `${madeBy}, ${group}` },
    {
      title: 'Signed off',
      text: `${dayWords(signedOffAt)}${signedOffBy === null ? '' : ` by ${signedOffBy}`}`,
    },
    { title: 'Released', text: dayWords(releasedAt) },
    { title: 'Sites', text: siteWords(mapping.document) },
    { title: 'Mapping', text: `${mapping.name}, revision ${mapping.revision}` },
    {
      title: 'Replaces',
      text: replaces === null ? 'nothing: the first of its kind' : `hand-over ${replaces}`,
    },
  ]
}

/** Where the beads sit. */
function siteWords({ beads }: FrozenHandOver['mapping']['document']): string {
  const rules = [...new Set(beads.map(({ site }) => site.rule))]
  if (rules.length === 1) return SITES[rules[0]]
  return beads.map(({ name, site }) => `${name} ${SITES[site.rule].replace(/s( of|$)/, '$1')}`).join(', ')
}

/** Who stands for the hand-over, and when. */
export function signOffLines(frozen: FrozenHandOver): SheetLine[] {
  const { madeBy, group, signedOffBy, signedOffAt, releasedAt } = frozen
  return [
    { title: 'Made by', text: `${madeBy ?? 'a member who left'}, ${group}` },
    { title: 'Signed off by', text: `${signedOffBy ?? 'a member who left'}, ${dayWords(signedOffAt)}` },
    { title: 'Released', text: `${dayWords(releasedAt)}; a released hand-over never changes` },
  ]
}
