import type { Bead, MappingDocument } from './mapping-document'
import type { Place } from './term'

/** A term where it stands in a document: what its distribution was measured on, or would be. */
export interface PlacedTerm {
  readonly document: MappingDocument
  readonly places: readonly Place[]
}

/** An atom of a bead at its place along the chain, with its share. */
interface HeldAtom {
  readonly atom: number
  readonly unit: number
  readonly weight: number
}

/**
 * What the distribution of a term depends on, as text: at every place the atoms of each bead with their shares and units, and
 * the rule of its site; hydrogens follow their atoms. Names, types, labels, colours, ids and the order of beads and atoms do not
 * count, nor a shift along the chain, nor the end a place is read from.
 *
 * @returns equal texts for equal make-up; null when a place names a bead that the document does not have
 */
export function termMakeUp({ document, places }: PlacedTerm): string | null {
  const beads = new Map(document.beads.map((bead) => [bead.id, bead]))
  const texts: string[] = []
  for (const place of places) {
    const held = place.map(({ bead, unit }) => {
      const found = beads.get(bead)
      return found && { bead: found, unit }
    })
    if (held.some((each) => each === undefined)) return null
    texts.push(placeText(held as { bead: Bead; unit: number }[]))
  }
  return texts.sort().join('\n')
}

/**
 * Whether two documents make the same beads of the same atoms and call the same ones by one type, so that every term stands on
 * what it stood on. Beads without atoms do not count.
 */
export function sameMakeUp(one: MappingDocument, other: MappingDocument): boolean {
  return documentText(one) === documentText(other)
}

/** Whether a bead is made of the same shares of the same atoms and sits by the same rule, up to a shift along the chain. */
export function sameBead(one: Bead, other: Bead): boolean {
  return ownText(one) === ownText(other)
}

function documentText({ beads }: MappingDocument): string {
  const types = new Map<string, string[]>()
  for (const bead of beads) {
    if (bead.atoms.length > 0) types.set(bead.type, [...(types.get(bead.type) ?? []), ownText(bead)])
  }
  return [...types.values()]
    .map((texts) => texts.sort().join(' + '))
    .sort()
    .join('\n')
}

function ownText(bead: Bead): string {
  return placeText([{ bead, unit: 0 }])
}

function placeText(place: readonly { readonly bead: Bead; readonly unit: number }[]): string {
  const atoms = place.map(({ bead, unit }) => bead.atoms.map((held) => ({ ...held, unit: held.unit + unit })))
  const least = Math.min(...atoms.flat().map(({ unit }) => unit))
  const words = place.map(({ bead }, index) => `${atomsText(atoms[index], least)} by ${siteText(bead)}`)
  const [forth, back] = [words.join(' | '), words.toReversed().join(' | ')]
  return forth < back ? forth : back
}

function atomsText(atoms: readonly HeldAtom[], least: number): string {
  return atoms
    .map(({ atom, unit, weight }) => `${atom}@${unit - least}x${weight}`)
    .sort()
    .join(' ')
}

function siteText({ site }: Bead): string {
  return site.rule === 'atom' ? `atom ${site.atom}` : site.rule
}
