/** The bead sits at the centre of mass, at the geometric centre, or on one atom of it (index in the repeat unit). */
export type Site =
  { readonly rule: 'mass' } | { readonly rule: 'geometry' } | { readonly rule: 'atom'; readonly atom: number }

/** An atom of the repeat unit in a bead. */
export interface BeadAtom {
  /** Index in `RepeatUnit.atoms`. */
  readonly atom: number
  /** Share of the atom that belongs to this bead, in (0, 1]; the shares of an atom sum to 1 over all beads. */
  readonly weight: number
  /** Which unit of the chain the atom is in, counted from the unit of the bead: −1, 0 or 1. */
  readonly unit: number
}

export interface Bead {
  readonly id: string
  /** The letters on the drawing: one or two characters, unique in the mapping. */
  readonly name: string
  /** Beads of one type share their potentials. */
  readonly type: string
  /** A word for people, such as backbone; may be empty. */
  readonly label: string
  /** Place in the order of bead colours, 0 to 7. */
  readonly colour: number
  readonly site: Site
  readonly atoms: BeadAtom[]
  /** What differs where this bead ends a chain, such as “starts with a butyl group”; empty or absent where nothing is noted. */
  readonly endGroup?: string
}

/**
 * What was decided about a type sequence that stands at places with different surroundings: one term for each kind of place,
 * or one for all of them and why.
 */
export interface TermPooling {
  /** Bead types in the canonical direction of the term. */
  readonly types: string[]
  readonly choice: 'split' | 'pooled'
  readonly reason: string
}

/** Whether a term is used or left out of the set, and why. Terms without a choice are used. */
export interface TermChoice {
  /** Bead types in the canonical direction of the term. */
  readonly types: string[]
  /** As `DerivedTerm.placeKey`: empty unless the term is one of several of a split sequence. */
  readonly placeKey: string
  readonly use: 'used' | 'left out'
  readonly reason: string
}

/** The saved mapping. Readers refuse versions they do not know; a new version brings a step that lifts the one before. */
export interface MappingDocument {
  readonly version: 1
  readonly beads: Bead[]
  /** Absent in documents from before there were any, as is `termChoices`. */
  readonly poolings?: TermPooling[]
  readonly termChoices?: TermChoice[]
}

/** Hues of the beads in the order in which they are given out; a bead stores its place in this list. */
export const BEAD_COLOURS = [
  'blue',
  'orange',
  'purple',
  'sky',
  'yellow',
  'green',
  'vermilion',
  'black',
] as const
export type BeadColour = (typeof BEAD_COLOURS)[number]
