import type { SheetLine } from '../contracts/data-sheet'
import type { FrozenHandOver } from '../contracts/hand-over'
import { listWords } from '../mapping/list-words'
import { energyScale, unitSymbol } from '../units'
import { numberWords } from './number-words'
import type { SheetSource, SourceTable } from './sheet-source'

/** Points that the sheet words in a place of their own. */
const ELSEWHERE = ['State point']
/** What whoever runs the tables must know before they do: the points on record, angles made level, caps. */
export function beforeYouRun({ frozen, tables }: Pick<SheetSource, 'frozen' | 'tables'>): SheetLine[] {
  return [
    ...frozen.points.filter(({ title }) => !ELSEWHERE.includes(title)),
    ...straightLines(tables),
    ...capLines(frozen, tables),
  ]
}

function straightLines(tables: readonly SourceTable[]): SheetLine[] {
  const angles = tables.filter(({ single }) => single?.inversion.kind === 'angle' && single.form === null)
  const level = angles.filter(({ single }) => single?.inversion.settings.straightAngle === 'level')
  if (level.length === 0) return []
  const names = listWords(level.map(({ name }) => name))
  return [{ title: 'Straight angle', text: `The slope of ${names} vanishes at 180°.` }]
}

function capLines({ layout, statePoint }: FrozenHandOver, tables: readonly SourceTable[]): SheetLine[] {
  const caps = new Map<number, string[]>()
  for (const { name, single } of tables) {
    const cap = single?.inversion.settings.table.cap ?? null
    if (cap !== null) caps.set(cap, [...(caps.get(cap) ?? []), name])
  }
  const scale = energyScale(layout.energy, statePoint.temperature)
  return [...caps].map(([cap, names]) => ({
    title: 'Cap',
    text: `Energies of ${listWords(names)} level off at ${numberWords(cap * scale, 4)} ${unitSymbol(layout.energy)}, where the force is zero.`,
  }))
}
