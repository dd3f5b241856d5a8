import { type RepeatUnit, smilesOrder } from '../chemistry'
import { deriveTerms, hasTooManyPlaces, type MappingDocument } from '../mapping'
import { MAPPING_FILE_FORMAT, MAPPING_FILE_VERSION } from './mapping-file-schema'

/**
 * A mapping as a file: JSON with two blanks of indentation and a line break at the end, the same text for the same mapping.
 *
 * @param unit the repeat unit whose SMILES the file names
 * @param document a mapping whose atoms all exist
 * @param name of the mapping
 */
export function writeMappingFile(unit: RepeatUnit, document: MappingDocument, name: string): string {
  const order = smilesOrder(unit)
  const indexOf = (atom: number): number => order.indexOf(atom)
  const beads = document.beads.map(({ name: letters, type, label, colour, site, endGroup, atoms }) => ({
    name: letters,
    type,
    label,
    colour,
    site: site.rule === 'atom' ? { rule: site.rule, atom: indexOf(site.atom) } : site,
    ...(endGroup ? { endGroup } : {}),
    atoms: atoms.map((held) => ({ atom: indexOf(held.atom), weight: held.weight, offset: held.unit })),
  }))
  const file = {
    format: MAPPING_FILE_FORMAT,
    version: MAPPING_FILE_VERSION,
    name,
    smiles: unit.smiles,
    beads,
    ...(document.poolings?.length ? { poolings: document.poolings } : {}),
    ...(document.termChoices?.length ? { termChoices: choices(unit, document) } : {}),
  }
  return `${JSON.stringify(file, null, 2)}\n`
}

/** Choices about terms the mapping has; ids of beads mean nothing outside it, so places name beads by their letters. */
function choices(unit: RepeatUnit, document: MappingDocument) {
  const terms = hasTooManyPlaces(unit, document) ? [] : deriveTerms(unit, document)
  const names = new Map(document.beads.map((bead) => [bead.id, bead.name]))
  return (document.termChoices ?? []).flatMap(({ types, placeKey, use, reason }) => {
    const term = terms.find(
      (each) => each.placeKey === placeKey && each.types.join('\n') === types.join('\n'),
    )
    if (!term) return []
    const place = term.places[0].map(({ bead, unit: at }) => ({ bead: names.get(bead), unit: at }))
    return [{ types, ...(placeKey === '' ? {} : { place }), use, reason }]
  })
}
