/** Order of a bond in one localised (Kekulé) structure. */
export type BondOrder = 1 | 2 | 3

/** How many atoms of each element, hydrogens included; fractions where atoms are shared between beads. */
export type Composition = Readonly<Record<string, number>>

/** A heavy atom of the repeat unit with the hydrogens on it. Attachment points (`*`) are not atoms. */
export interface RepeatUnitAtom {
  /** From 0, in the order of the SMILES, counting heavy atoms only. Mapping documents name atoms by it. */
  readonly index: number
  /** Element and running number of that element, such as C3: the name people read. */
  readonly label: string
  readonly element: string
  readonly aromatic: boolean
  /** Member of at least one ring of the unit. */
  readonly ring: boolean
  readonly hydrogens: number
  readonly charge: number
  /** Standard atomic weight with the hydrogens, in g/mol. */
  readonly mass: number
  /** An attachment point sits on it. */
  readonly attachment: boolean
  /** Atoms of one class have the same surroundings in the unit, up to its symmetry. Chirality is not looked at. */
  readonly symmetryClass: number
}

export interface RepeatUnitBond {
  readonly from: number
  readonly to: number
  readonly order: BondOrder
  /** Part of an aromatic ring; `order` is then that of one of its localised structures. */
  readonly aromatic: boolean
}

/** A repeat unit as `parseRepeatUnit` makes it: checked there, trusted afterwards. Plain data. */
export interface RepeatUnit {
  /** As given, without blanks around it. */
  readonly smiles: string
  readonly atoms: readonly RepeatUnitAtom[]
  readonly bonds: readonly RepeatUnitBond[]
  /**
   * The atoms the two `*` sit on, in SMILES order: [head, tail]. In a chain the tail of a unit is bonded to the head of the
   * next one. Both may be the same atom.
   */
  readonly attachments: readonly [head: number, tail: number]
  /** Order of the bond between two neighbouring units. */
  readonly linkOrder: BondOrder
  /** For every bond in a ring the smallest ring through it, each once, as atom indices in ring order. */
  readonly rings: readonly (readonly number[])[]
  readonly composition: Composition
  /** Hill order, such as C9H16O2. */
  readonly formula: string
  /** g/mol per repeat unit. */
  readonly mass: number
}
