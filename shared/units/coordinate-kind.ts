/** What a coordinate is; it fixes the Jacobian, the internal unit and the domain. */
export type CoordinateKind = 'bond' | 'angle' | 'dihedral'
