import { type ChainMatch, type RepeatUnit, smilesOrder } from '../chemistry'
import { BEAD_COLOURS, type Bead, type Site } from '../mapping'
import { filePath, type MappingFileError } from './mapping-file-error'
import type { MappingFile } from './mapping-file-schema'

/** The beads of a file on another unit of the same chain. */
export interface PlacedBeads {
  readonly ok: true
  readonly beads: Bead[]
  /** By how many units each bead was moved so that it counts to the unit it begins in. */
  readonly moves: readonly number[]
}

/**
 * Puts the beads of a file on the unit that its chain was matched with. Ids are b1, b2, … in the order of the file.
 *
 * @param file whose atoms all exist
 * @param own the unit of the file
 * @param match from the unit of the file to the other
 */
export function beadsOnChain(
  file: MappingFile,
  own: RepeatUnit,
  { atoms: matches, direction }: ChainMatch,
): PlacedBeads | { readonly ok: false; readonly errors: readonly MappingFileError[] } {
  const order = smilesOrder(own)
  const image = (atom: number) => matches[order[atom] as number]
  const errors: MappingFileError[] = []
  const moves: number[] = []
  const beads = file.beads.map((bead, index): Bead => {
    const placed = bead.atoms.map(({ atom, weight, offset }) => ({
      atom: image(atom).atom,
      weight,
      unit: direction * offset + image(atom).shift,
    }))
    const units = placed.map(({ unit }) => unit)
    const [least, most] = [Math.min(0, ...units), Math.max(0, ...units)]
    const fits = least >= -1 && most <= 1
    // A bead that already lies around its unit stays; another one counts to the unit it begins in.
    const move = fits && units.includes(0) ? 0 : Math.min(...units) + (spread(units) > 1 ? 1 : 0)
    const shift = units.length === 0 ? 0 : move
    moves.push(shift)
    if (spread(units) > 2) {
      const message = `On the other SMILES bead ${bead.name} would reach over more than the neighbouring units.`
      errors.push({ code: 'BEAD_TOO_LONG', message, path: filePath(['beads', index]) })
    }
    const site: Site =
      bead.site.rule === 'atom' ? { rule: 'atom', atom: image(bead.site.atom).atom } : bead.site
    return {
      id: `b${index + 1}`,
      name: bead.name,
      type: bead.type,
      label: bead.label,
      colour: bead.colour ?? index % BEAD_COLOURS.length,
      site,
      ...(bead.endGroup && { endGroup: bead.endGroup }),
      atoms: placed
        .map((held) => ({ ...held, unit: held.unit - shift }))
        .sort((a, b) => a.unit - b.unit || a.atom - b.atom),
    }
  })
  return errors.length > 0 ? { ok: false, errors } : { ok: true, beads, moves }
}

function spread(units: readonly number[]): number {
  return units.length === 0 ? 0 : Math.max(...units) - Math.min(...units)
}
