import type { FrozenHandOver, HandOverDifference } from '../contracts/hand-over'
import type { InversionSettings } from '../inversion'
import { listWords } from '../mapping/list-words'
import { type CoordinateKind, unitSymbol } from '../units'
import { changedSettings } from './changed-settings'
import { placesWords } from './coordinate-words'
import { type EnergyGrid, largestEnergyChange } from './largest-energy-change'

/** A table of a hand-over, as far as comparing looks at it; internal units. */
export interface ComparedTable extends EnergyGrid {
  /** As in B–E–H; of a joint table both names. Tables of one name are compared. */
  readonly name: string
  readonly kinds: readonly CoordinateKind[]
  /** null for a joint table. */
  readonly settings: InversionSettings | null
  /** Of the numbers at full precision. */
  readonly numbersSha256: string
  /** Of its file. */
  readonly fileSha256: string
  /** Why two terms share a table; null for a single term. */
  readonly reason: string | null
}

/** A hand-over, as far as comparing looks at it. */
export interface ComparedHandOver {
  readonly mapping: FrozenHandOver['mapping']
  readonly statePoint: FrozenHandOver['statePoint']
  readonly layout: FrozenHandOver['layout']
  readonly leftOut: FrozenHandOver['leftOut']
  readonly tables: readonly ComparedTable[]
}

/**
 * What is different about a hand-over against the one before, in sentences: what holds for the whole first, then tables that
 * came and went, then changed ones with the largest change of their energy where either matters, then those that stayed.
 *
 * @returns at least one line: without any change, that all tables are the same
 */
export function compareHandOvers(before: ComparedHandOver, after: ComparedHandOver): HandOverDifference[] {
  const old = new Map(before.tables.map((table) => [table.name, table]))
  const now = new Map(after.tables.map((table) => [table.name, table]))
  const added = after.tables.filter(({ name }) => !old.has(name))
  const removed = before.tables.filter(({ name }) => !now.has(name))
  const merged = added.filter(({ kinds }) => kinds.length === 2)
  const goneInto = (table: ComparedTable): ComparedTable | undefined =>
    merged.find(({ name }) => namesIn(name).includes(table.name))
  const both = after.tables.flatMap((table) => {
    const other = old.get(table.name)
    return other ? [{ before: other, after: table }] : []
  })
  const moved = both.filter((pair) => pair.before.numbersSha256 !== pair.after.numbersSha256)
  const rest = both.filter((pair) => !moved.includes(pair))
  return [
    ...wholeChanges(before, after),
    ...added.map((table) => arrival(table, old)),
    ...removed.filter((table) => !goneInto(table)).map((table) => departure(table, after)),
    ...moved.map((pair) => change(pair.before, pair.after, after.statePoint.temperature)),
    ...unchanged(rest, added.length + removed.length + moved.length === 0),
  ]
}

const NOTHING = { largest: null } as const
const namesIn = (name: string): string[] => name.split(' · ')

function wholeChanges(before: ComparedHandOver, after: ComparedHandOver): HandOverDifference[] {
  const whole = (about: string, text: string): HandOverDifference => ({
    about,
    change: 'whole',
    text,
    ...NOTHING,
  })
  const lines: HandOverDifference[] = []
  const [from, to] = [before.layout, after.layout]
  const [oldUnits, newUnits] = [from, to].map(({ length, angle, energy }) =>
    [length, angle, energy].map(unitSymbol).join(', '),
  )
  if (oldUnits !== newUnits) lines.push(whole('Units', `${newUnits}; before ${oldUnits}.`))
  if (from.name !== to.name) lines.push(whole('Layout', `${to.name}; before ${from.name}.`))
  else if (oldUnits === newUnits && sorted(from.document) !== sorted(to.document)) {
    lines.push(whole('Layout', `${to.name} was changed.`))
  }
  const [old, now] = [before.mapping, after.mapping]
  if (old.revision !== now.revision) {
    lines.push(whole('Mapping', `Revision ${now.revision}; before revision ${old.revision}.`))
  }
  const [was, is] = [before.statePoint.temperature, after.statePoint.temperature]
  if (was !== is) lines.push(whole('Temperature', `${is} K; before ${was} K.`))
  return lines
}

function arrival(table: ComparedTable, old: ReadonlyMap<string, ComparedTable>): HandOverDifference {
  const singles = namesIn(table.name).filter((name) => old.has(name))
  const text =
    table.kinds.length === 2 && singles.length > 0
      ? `${singles.length === 2 ? 'Two tables' : 'One table'} became one joint potential.${table.reason === null ? '' : ` Reason on record: ${table.reason}`}`
      : 'New in this hand-over.'
  return { about: listed(table.name), change: 'added', text, ...NOTHING }
}

function departure(
  { name, kinds }: ComparedTable,
  { leftOut, tables }: ComparedHandOver,
): HandOverDifference {
  const reason = leftOut.find((term) => term.name === name)?.reason
  const apart =
    kinds.length === 2 && namesIn(name).every((each) => tables.some((table) => table.name === each))
  const text = apart
    ? 'The joint potential became two tables.'
    : reason === undefined
      ? 'No longer in this hand-over.'
      : `Left out on record: ${reason}`
  return { about: listed(name), change: 'removed', text, ...NOTHING }
}

function change(before: ComparedTable, after: ComparedTable, temperature: number): HandOverDifference {
  const largest = largestEnergyChange(before, after, temperature)
  const sentences = changedSettings(before.settings, after.settings)
  if (sentences.length === 0) sentences.push('Its data changed.')
  if (largest === null) sentences.push('The two cannot be compared: they share no range.')
  else if (largest.kT < 0.005) sentences.push('The energies change by less than 0.01 kT.')
  else {
    sentences.push(
      `Largest change ${largest.kT.toFixed(2)} kT, at ${placesWords(after.kinds, largest.coordinates)}.`,
    )
  }
  return { about: listed(after.name), change: 'changed', text: sentences.join(' '), largest }
}

function unchanged(
  rest: readonly { readonly before: ComparedTable; readonly after: ComparedTable }[],
  all: boolean,
): HandOverDifference[] {
  const about = all ? 'All tables' : 'All others'
  const byte = rest.filter((pair) => pair.before.fileSha256 === pair.after.fileSha256)
  const numbers = rest.filter((pair) => !byte.includes(pair))
  const line = (name: string, text: string): HandOverDifference => ({
    about: name,
    change: 'same',
    text,
    ...NOTHING,
  })
  if (rest.length === 0) return []
  if (numbers.length === 0) return [line(about, 'Byte for byte the same.')]
  if (byte.length === 0) return [line(about, 'The same numbers, written anew.')]
  const names = listWords(numbers.map(({ after }) => listed(after.name)))
  return [line(names, 'The same numbers, written anew.'), line('All others', 'Byte for byte the same.')]
}

/** Both names of a joint table, as in E–H, B–E–H. */
const listed = (name: string): string => namesIn(name).join(', ')

/** JSON with the keys of objects in order: one of the two comes from a database, which has an order of its own. */
function sorted(value: unknown): string {
  return JSON.stringify(value, (_key, part: unknown) =>
    typeof part === 'object' && part !== null && !Array.isArray(part)
      ? Object.fromEntries(Object.entries(part).sort(([one], [other]) => (one < other ? -1 : 1)))
      : part,
  )
}
