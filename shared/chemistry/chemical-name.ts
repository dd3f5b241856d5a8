/** Locants and prefixes that chemistry sets in italics, where a hyphen follows. */
const ITALIC =
  /(^|[^\p{L}\d])(n|i|s|t|sec|tert|iso|cis|trans|syn|anti|o|m|p|N|O|S|R|E|Z|co|alt|stat|ran|block|graft|b|g)(?=-)/gu

/** A part of a name, set upright or in italics. */
export interface ChemicalNamePart {
  readonly text: string
  readonly italic: boolean
}

/** A chemical name cut where its type changes: poly(, n in italics, -hexyl acrylate). */
export function chemicalNameParts(name: string): ChemicalNamePart[] {
  const found: ChemicalNamePart[] = []
  let end = 0
  for (const match of name.matchAll(ITALIC)) {
    const start = match.index + match[1].length
    found.push({ text: name.slice(end, start), italic: false }, { text: match[2], italic: true })
    end = start + match[2].length
  }
  found.push({ text: name.slice(end), italic: false })
  return found.filter(({ text }) => text !== '')
}
