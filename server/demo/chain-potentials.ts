import type { CoordinateKind } from '../../shared/histogram/histogram'

/** An energy in kJ/mol over one internal coordinate (nm or rad), with the range the coordinate is drawn from. */
export interface CoordinatePotential {
  readonly kind: CoordinateKind
  readonly low: number
  readonly high: number
  readonly energy: (coordinate: number) => number
}

/** The side chain is stretched or folded back at its second bead; the energy parts the two, kJ/mol. */
export interface Conformer {
  readonly energy: number
  /** Angle E–S1–S2. */
  readonly angleAtS1: CoordinatePotential
  /** Dihedral B–E–S1–S2. */
  readonly turnAtE: CoordinatePotential
}

const degree = Math.PI / 180

/** Morse form with force constant k (kJ/mol/nm²): a little softer outwards, as bonds between groups of atoms are. */
function bond(length: number, k: number, depth: number): CoordinatePotential {
  const steepness = Math.sqrt(k / (2 * depth))
  return {
    kind: 'bond',
    low: length - 0.1,
    high: length + 0.14,
    energy: (r) => depth * (1 - Math.exp(-steepness * (r - length))) ** 2,
  }
}

/** ½ k (cos θ − cos θ₀)², whose slope vanishes at 180°, as it must for an angle that is often straight. */
function angle(degrees: number, k: number): CoordinatePotential {
  const cosine = Math.cos(degrees * degree)
  return {
    kind: 'angle',
    low: 0,
    high: Math.PI,
    energy: (theta) => (k / 2) * (Math.cos(theta) - cosine) ** 2,
  }
}

/** Σ |kₙ| + kₙ cos n φ for n = 1, 2, 3: every part is 0 where it is lowest. */
function turn(...k: readonly [number, number, number]): CoordinatePotential {
  return {
    kind: 'dihedral',
    low: -Math.PI,
    high: Math.PI,
    energy: (phi) => k.reduce((sum, kn, i) => sum + Math.abs(kn) + kn * Math.cos((i + 1) * phi), 0),
  }
}

/**
 * The invented chain of the demonstration: five beads per repeat unit, backbone B, ester E and S1, S2, S3 along the hexyl
 * group, each internal coordinate with a potential of its own and independent of the others, but for the side chain's
 * conformer. No measurement and no atomistic model stands behind a single number here.
 */
export const CHAIN_POTENTIALS = {
  backboneBond: bond(0.262, 12_000, 70),
  esterBond: bond(0.254, 17_000, 80),
  firstSideBond: bond(0.258, 9_500, 60),
  secondSideBond: bond(0.252, 7_500, 50),
  thirdSideBond: bond(0.254, 6_500, 50),
  backboneAngle: angle(150, 190),
  /** B–B–E towards the previous backbone bead; towards the next one it follows from the geometry. */
  esterAngle: angle(106, 95),
  angleAtE: angle(146, 480),
  angleAtS2: angle(152, 260),
  backboneTurn: turn(1.1, 0.4, 0.9),
  /** The ester about the backbone, against the next backbone bead, where its centre is (stereo centre +1); −1 mirrors it. */
  esterTurn: {
    kind: 'dihedral',
    low: -Math.PI,
    high: Math.PI,
    energy: (phi: number) => 70 * (1 - Math.cos(phi - 120 * degree)),
  } as CoordinatePotential,
  turnAtEsterBond: turn(-0.8, 1.3, 0.3),
  turnAtS1: turn(6, 0, 1.2),
} as const

export const CONFORMERS: readonly Conformer[] = [
  { energy: 0, angleAtS1: angle(160, 330), turnAtE: turn(-0.6, 0, 0.3) },
  { energy: -1, angleAtS1: angle(88, 230), turnAtE: turn(-8, 0, 0) },
]
