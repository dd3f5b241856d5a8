/** Bins as a file states them: not yet clipped to the domain, a dihedral not yet folded into its turn. */
export interface FileGrid {
  /** Internal units, ascending, length size + 1. A dihedral may reach half a bin beyond −180…180° or 0…360°. */
  readonly edges: Float64Array
  /** Bin of each stated centre or pair of edges. */
  readonly places: Int32Array
  /** An edge this close to an end of the domain is that end, in internal units: rounding, not a place of its own. */
  readonly slack: number
  /** The last bin is the first one again, a full turn later. */
  readonly doubled: boolean
  /** What was inferred or filled, in sentences. */
  readonly notes: readonly string[]
}
