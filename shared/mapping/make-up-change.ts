import { formulaText, type RepeatUnit } from '../chemistry'
import { beadComposition } from './bead-composition'
import { listWords } from './list-words'
import { type PlacedTerm, sameBead, termMakeUp } from './make-up'
import type { Bead } from './mapping-document'

/** Beads and atoms named in a sentence; more are counted. */
const MOST_NAMED = 4

/**
 * Why data that were measured on a term as it stood once do not fit it as it stands now: which bead, from what to what.
 *
 * @param before the term where the data were measured
 * @param after the same term now
 * @returns a sentence; null while the data fit
 * @example makeUpChange(unit, before, after) // 'Bead H was C4H9 and is now C6H13.'
 */
export function makeUpChange(unit: RepeatUnit, before: PlacedTerm, after: PlacedTerm): string | null {
  const [old, now] = [termMakeUp(before), termMakeUp(after)]
  if (old !== null && old === now) return null
  const then = new Map(beadsOf(before).map((bead) => [bead.id, bead]))
  const today = beadsOf(after)
  const changed = today.flatMap((bead) => {
    const was = then.get(bead.id)
    return was && !sameBead(was, bead) ? [beadChange(unit, was, bead)] : []
  })
  const gone = [...then.values()].filter(({ id }) => !today.some((bead) => bead.id === id))
  const come = today.filter(({ id }) => !then.has(id))
  const parts = [...changed, ...exchange(unit, gone, come)]
  if (parts.length > MOST_NAMED) parts.splice(MOST_NAMED, Infinity, 'More beads of it changed.')
  return parts.join(' ') || placesChange(before, after)
}

/** The beads at the places of a term, each once. */
function beadsOf({ document, places }: PlacedTerm): Bead[] {
  const ids = new Set(places.flat().map(({ bead }) => bead))
  return document.beads.filter(({ id }) => ids.has(id))
}

function beadChange(unit: RepeatUnit, was: Bead, is: Bead): string {
  const name = was.name === is.name ? `Bead ${is.name}` : `Bead ${is.name}, once ${was.name},`
  const [before, after] = [formulaOf(unit, was), formulaOf(unit, is)]
  if (before !== after) return `${name} was ${before} and is now ${after}.`
  const [held, holds] = [atomsOf(unit, was), atomsOf(unit, is)]
  if (held !== holds) return `${name} held ${held} and now holds ${holds}.`
  return `${name} sat ${siteWords(unit, was)} and now sits ${siteWords(unit, is)}.`
}

function exchange(unit: RepeatUnit, gone: readonly Bead[], come: readonly Bead[]): string[] {
  const words = (beads: readonly Bead[]): string =>
    listWords(beads.map((bead) => `${bead.name} (${formulaOf(unit, bead)})`))
  const many = (beads: readonly Bead[]): string => (beads.length > 1 ? 'Beads' : 'Bead')
  if (gone.length === 0 && come.length === 0) return []
  if (gone.length === 0) return [`${many(come)} ${words(come)} ${come.length > 1 ? 'are' : 'is'} new in it.`]
  const left = `${many(gone)} ${words(gone)} no longer ${gone.length > 1 ? 'belong' : 'belongs'} to it`
  return [come.length === 0 ? `${left}.` : `${left}; ${words(come)} ${come.length > 1 ? 'do' : 'does'} now.`]
}

function placesChange({ places: before }: PlacedTerm, { places: after }: PlacedTerm): string {
  if (before.length === after.length) return 'Its beads follow one another in another way.'
  const count = (number: number): string => `${number} place${number === 1 ? '' : 's'}`
  return `It stood at ${count(before.length)} of the unit and now stands at ${count(after.length)}.`
}

function formulaOf(unit: RepeatUnit, bead: Bead): string {
  return bead.atoms.length === 0 ? 'empty' : formulaText(beadComposition(unit, bead))
}

/** As 'C3, O1 and 0.5 × C4 of the next unit'. */
function atomsOf(unit: RepeatUnit, { atoms }: Bead): string {
  const words = atoms
    .toSorted((a, b) => a.unit - b.unit || a.atom - b.atom)
    .map(({ atom, weight, unit: shift }) => {
      const share = weight === 1 ? '' : `${Number(weight.toFixed(3))} × `
      const where = shift === 0 ? '' : shift > 0 ? ' of the next unit' : ' of the unit before'
      return `${share}${unit.atoms[atom].label}${where}`
    })
  return listWords(words)
}

function siteWords(unit: RepeatUnit, { site }: Bead): string {
  if (site.rule === 'atom') return `on ${unit.atoms[site.atom]?.label ?? `atom ${site.atom + 1}`}`
  return site.rule === 'mass' ? 'at its centre of mass' : 'at its geometric centre'
}
