import type { MappingDocument, Term } from '@shared/contracts/mapping'

/** A bead as a glyph draws it. */
export interface TermBead {
  /** One or two letters. */
  readonly name: string
  /** Place in the order of bead colours; null for a bead that is no longer in the mapping. */
  readonly colour: number | null
  readonly site: 'mass' | 'geometry' | 'atom' | null
}

/** The beads of a term in its order, from the first place where it stands along the chain. */
export function termBeads(term: Pick<Term, 'types' | 'places'>, document: MappingDocument): TermBead[] {
  return term.types.map((type, position) => {
    const id = term.places[0]?.[position]?.bead
    const bead =
      document.beads.find((each) => each.id === id) ?? document.beads.find((each) => each.type === type)
    return bead === undefined
      ? { name: type.slice(0, 2), colour: null, site: null }
      : { name: bead.name, colour: bead.colour, site: bead.site.rule }
  })
}

/** Where the beads of a term sit, in words. */
export function siteSentence(beads: readonly TermBead[]): string {
  const rules = new Set(beads.map(({ site }) => site))
  if (rules.size > 1) return 'Sites by different rules'
  if (rules.has('mass')) return 'Sites at centres of mass'
  if (rules.has('geometry')) return 'Sites at geometric centres'
  return rules.has('atom') ? 'Sites on atoms' : 'Sites unknown'
}
