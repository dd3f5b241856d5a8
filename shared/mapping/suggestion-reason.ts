import type { RepeatUnit } from '../chemistry'
import type { GroupWord } from './group-words'
import { listWords } from './list-words'
import type { Bead } from './mapping-document'

/** Words for where a bead lies, which say nothing about being kept whole. */
const PLACES = new Set(['backbone', 'side chain', 'ether'])

/**
 * Why a suggestion cuts where it cuts, in a few short sentences.
 *
 * @param cuts bonds where beads end; the one between units with `border`
 * @param words what each bead is
 */
export function suggestionReason(
  unit: RepeatUnit,
  {
    beads,
    masses,
    cuts,
    words,
  }: {
    readonly beads: readonly Bead[]
    readonly masses: readonly number[]
    readonly cuts: readonly { readonly from: number; readonly to: number; readonly border: boolean }[]
    readonly words: readonly (readonly GroupWord[])[]
  },
): string {
  const label = (atom: number): string => unit.atoms[atom].label
  const inside = cuts.filter(({ border }) => !border).map(({ from, to }) => `${label(from)}–${label(to)}`)
  const where =
    inside.length === 0 ? 'No cut inside the unit.' : `Cut at ${listWords(inside)}, which can turn.`
  const whole = [...new Set(words.flat().map(({ word }) => word))].filter((word) => !PLACES.has(word))
  const kept = whole.length === 0 ? '' : ` Kept whole: ${listWords(whole)}.`
  const [lightest, heaviest] = [Math.min(...masses), Math.max(...masses)].map((mass) => mass.toFixed(0))
  const balance =
    beads.length === 1
      ? ` One bead of ${heaviest} g/mol.`
      : ` Beads weigh ${lightest === heaviest ? '' : `${lightest} to `}${heaviest} g/mol.`
  const across = beads.filter(({ atoms }) => new Set(atoms.map((held) => held.unit)).size > 1)
  const border =
    across.length === 0
      ? ''
      : ` ${listWords(across.map(({ name }) => name))} reaches into the next unit, since the border runs through a group that stays whole.`
  const lone = beads.filter(({ atoms }) => atoms.length === 1).map(({ name }) => name)
  const fine =
    lone.length === 0
      ? ''
      : ` ${listWords(lone)} ${lone.length > 1 ? 'hold' : 'holds'} a single heavy atom: little is gained over all atoms.`
  return `${where}${kept}${balance}${border}${fine}`
}
