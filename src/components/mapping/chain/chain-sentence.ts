import type { MappingDocument } from '@shared/mapping'
import { CHAIN_UNITS, type ChainLayout } from './chain-layout'

/** The drawn chain in words, for those who hear it: the beads of a unit and what is bonded, across its border too. */
export function chainSentence(layout: ChainLayout, document: MappingDocument): string {
  const names = new Map(document.beads.map(({ id, name }) => [id, name]))
  const beads = layout.beads.filter(({ unit }) => unit === 0).map(({ bead }) => names.get(bead) ?? '')
  const bonds = layout.bonds
    .filter(({ from, to }) => Math.min(from.unit, to.unit) === 0)
    .map(({ from, to }) => {
      const pair = [names.get(from.bead), names.get(to.bead)].join('–')
      return from.unit === to.unit ? pair : `${pair} to the next unit`
    })
  const held = `Chain of ${CHAIN_UNITS} units. Beads of a unit: ${beads.join(', ')}.`
  return bonds.length === 0 ? `${held} Nothing is bonded yet.` : `${held} Bonds: ${bonds.join(', ')}.`
}
