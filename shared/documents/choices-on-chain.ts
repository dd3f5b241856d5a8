import type { ChainMatch, RepeatUnit } from '../chemistry'
import { deriveTerms, hasTooManyPlaces, placeKey, type Place, type TermChoice } from '../mapping'
import type { PlacedBeads } from './beads-on-chain'
import { filePath, type MappingFileError } from './mapping-file-error'
import type { MappingFile } from './mapping-file-schema'

/**
 * The choices of a file about terms, with the places of split sequences found again on the unit that its chain was matched with.
 *
 * @param unit the unit mapped
 * @param placed the beads of the file on it
 */
export function choicesOnChain(
  file: MappingFile,
  unit: RepeatUnit,
  { beads, moves }: PlacedBeads,
  { direction }: ChainMatch,
): { readonly choices: TermChoice[]; readonly errors: readonly MappingFileError[] } {
  const document = { version: 1, beads, ...(file.poolings && { poolings: file.poolings }) } as const
  const wanted = (file.termChoices ?? []).some(({ place }) => place !== undefined)
  const terms = wanted && !hasTooManyPlaces(unit, document) ? deriveTerms(unit, document) : []
  const errors: MappingFileError[] = []
  const choices = (file.termChoices ?? []).flatMap(({ types, place, use, reason }, index): TermChoice[] => {
    if (!place) return [{ types, placeKey: '', use, reason }]
    const moved = place.flatMap(({ bead, unit: at }): Place => {
      const found = beads.findIndex(({ name }) => name === bead)
      return found < 0 ? [] : [{ bead: beads[found].id, unit: direction * at + moves[found] }]
    })
    const least = Math.min(...moved.map(({ unit: at }) => at))
    const shifted = moved.map(({ bead, unit: at }) => ({ bead, unit: at - least }))
    const keys = [placeKey(shifted), placeKey(shifted.toReversed())]
    const term = terms.find(
      (each) => each.placeKey !== '' && each.places.some((own) => keys.includes(placeKey(own))),
    )
    if (term) return [{ types: term.types, placeKey: term.placeKey, use, reason }]
    const message = `No split term of the mapping stands at ${place.map(({ bead, unit: at }) => `${bead} in unit ${at}`).join(', ')}.`
    errors.push({ code: 'PLACE_UNKNOWN', message, path: filePath(['termChoices', index, 'place']) })
    return []
  })
  return { choices, errors }
}
