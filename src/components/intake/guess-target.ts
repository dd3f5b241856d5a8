import type { Pair } from '@shared/contracts/distribution'
import type { Term } from '@shared/contracts/mapping'
import type { StatePoint } from '@shared/contracts/polymer'

/** What a file is brought for: one term, or a pair of them. */
export type IntakeTarget =
  | { readonly type: 'term'; readonly termId: string }
  | { readonly type: 'pair'; readonly firstTermId: string; readonly secondTermId: string }

/** A target in a word, for a list of choices: `termId`, or both ids with a tilde between. */
export const targetKey = (target: IntakeTarget): string =>
  target.type === 'term' ? target.termId : `${target.firstTermId}~${target.secondTermId}`

const KIND_WORDS: readonly (readonly [Term['kind'], RegExp])[] = [
  ['bond', /bond|(?:^|[^a-z])(?:dist|length)/i],
  ['angle', /angle|(?:^|[^a-z])ang/i],
  ['dihedral', /dihedral|torsion|(?:^|[^a-z])(?:dih|phi)/i],
]

const escaped = (text: string): string => text.replace(/[+]/g, '\\+')

/**
 * Where a term's type sequence stands in a file name, in either direction: B-E-H, B_E_H, B–E–H or BEH, bounded by something
 * that is no letter or digit.
 */
const findSequence = (name: string, types: readonly string[]): { start: number; end: number } | null => {
  for (const order of [types, [...types].reverse()]) {
    const body = order.map(escaped).join('[-_–.~ ]?')
    const match = new RegExp(`(?<![A-Za-z0-9+])${body}(?![A-Za-z0-9+])`).exec(name)
    if (match) return { start: match.index, end: match.index + match[0].length }
  }
  return null
}

/** The term a file name names: the longest type sequence in it, of the kind it names if it names one. */
const guessTerm = (
  name: string,
  terms: readonly Term[],
): { term: Term; start: number; end: number } | null => {
  const kind = KIND_WORDS.find(([, word]) => word.test(name))?.[0]
  const found = terms.flatMap((term) => {
    const place = findSequence(name, term.types)
    return place === null ? [] : [{ term, ...place, fits: kind === undefined || kind === term.kind }]
  })
  found.sort((a, b) => Number(b.fits) - Number(a.fits) || b.term.types.length - a.term.types.length)
  return found[0] ?? null
}

/**
 * Guesses from the name of a file what it holds: a pair when two terms of one stand in it side by side, else the term whose
 * types it spells out, else nothing.
 */
export const guessTarget = (
  fileName: string,
  terms: readonly Term[],
  pairs: readonly Pair[],
): IntakeTarget | null => {
  const name = fileName.replace(/\.[A-Za-z]+$/, '')
  const guess = guessTerm(name, terms)
  for (const { firstTermId, secondTermId } of pairs) {
    const [first, second] = [firstTermId, secondTermId].map((id) => terms.find((term) => term.id === id))
    if (!first || !second) continue
    // A dihedral's name holds those of two bonds side by side.
    if (guess !== null && guess.term.types.length >= first.types.length + second.types.length) continue
    const inner = findSequence(name, second.types)
    if (inner === null) continue
    const rest = `${name.slice(0, inner.start)}|${name.slice(inner.end)}`
    if (findSequence(rest, first.types) !== null) return { type: 'pair', firstTermId, secondTermId }
  }
  return guess === null ? null : { type: 'term', termId: guess.term.id }
}

/** The state point whose temperature a file name states, as in 450K; null when none or more than one fits. */
export const guessStatePoint = (fileName: string, statePoints: readonly StatePoint[]): StatePoint | null => {
  const stated = [...fileName.matchAll(/(\d+(?:\.\d+)?)[ _]?K(?![A-Za-z])/g)].map((match) => Number(match[1]))
  const fitting = statePoints.filter(({ temperature }) => stated.includes(temperature))
  return fitting.length === 1 ? fitting[0] : null
}
