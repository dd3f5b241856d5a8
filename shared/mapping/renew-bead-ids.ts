import type { MappingDocument } from './mapping-document'

/**
 * The same mapping with other ids for its beads: each gets the prefix before its own. One prefix for all keeps the order of
 * ids, and with it which place names a term.
 *
 * @param prefix lower-case letters, digits and hyphens, never used before where terms must not pass to other beads
 * @example renewBeadIds(document, 'n1-').beads[0].id // 'n1-b1'
 */
export function renewBeadIds(document: MappingDocument, prefix: string): MappingDocument {
  const renewed = (key: string): string =>
    key === ''
      ? key
      : key
          .split(' ')
          .map((place) => prefix + place)
          .join(' ')
  return {
    ...document,
    beads: document.beads.map((bead) => ({ ...bead, id: prefix + bead.id })),
    ...(document.termChoices && {
      termChoices: document.termChoices.map((choice) => ({ ...choice, placeKey: renewed(choice.placeKey) })),
    }),
  }
}
