import { type ChainMatch, type RepeatUnit, smilesOrder } from '../chemistry'
import { BEAD_COLOURS, type Bead, type BeadAtom } from '../mapping'
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
  const placed = file.beads.map(({ atoms }) =>
    atoms.map(({ atom, weight, offset }) => ({
      atom: image(atom).atom,
      weight,
      unit: direction * offset + image(atom).shift,
    })),
  )
  const errors = file.beads.flatMap(({ name }, index): MappingFileError[] => {
    if (spread(placed[index]) <= 2) return []
    const message = `On the other SMILES bead ${name} would reach over more than the neighbouring units.`
    return [{ code: 'BEAD_TOO_LONG', message, path: filePath(['beads', index]) }]
  })
  if (errors.length > 0) return { ok: false, errors }
  const moves = placed.map(moveOf)
  const beads = file.beads.map(({ name, type, label, colour, site, endGroup }, index): Bead => ({
    id: `b${index + 1}`,
    name,
    type,
    label,
    colour: colour ?? index % BEAD_COLOURS.length,
    site: site.rule === 'atom' ? { rule: 'atom', atom: image(site.atom).atom } : site,
    ...(endGroup && { endGroup }),
    atoms: placed[index]
      .map((held) => ({ ...held, unit: held.unit - moves[index] }))
      .sort((a, b) => a.unit - b.unit || a.atom - b.atom),
  }))
  return { ok: true, beads, moves }
}

/** A bead that lies around its unit stays; another one counts to the unit it begins in, or to the middle one of three. */
function moveOf(atoms: readonly BeadAtom[]): number {
  const units = atoms.map(({ unit }) => unit)
  if (units.length === 0 || (units.includes(0) && units.every((unit) => Math.abs(unit) <= 1))) return 0
  return Math.min(...units) + (spread(atoms) > 1 ? 1 : 0)
}

function spread(atoms: readonly BeadAtom[]): number {
  const units = atoms.map(({ unit }) => unit)
  return units.length === 0 ? 0 : Math.max(...units) - Math.min(...units)
}
