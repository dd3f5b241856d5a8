import type { RepeatUnit } from '../chemistry'
import { listWords } from './list-words'
import type { Bead, MappingDocument } from './mapping-document'
import type { MappingProblem } from './mapping-problem'

/** Shares of an atom may miss 1 by this much: what is left of thirds typed with six digits. */
const SHARE_TOLERANCE = 1e-5

/** Atoms that a bead names and the unit does not have. */
export function unknownAtoms(unit: RepeatUnit, bead: Bead): MappingProblem[] {
  const atoms = bead.atoms.map(({ atom }) => atom).filter((atom) => atom >= unit.atoms.length)
  if (atoms.length === 0) return []
  return [
    {
      code: 'ATOM_UNKNOWN',
      severity: 'problem',
      title: `${bead.name} names atoms that the repeat unit does not have`,
      detail: `The unit has ${unit.atoms.length} heavy atoms; the bead names number ${atoms.map((atom) => atom + 1).join(', ')}.`,
      beads: [bead.id],
      atoms: [],
    },
  ]
}

/** Atoms in no bead. */
export function looseAtoms(unit: RepeatUnit, document: MappingDocument): MappingProblem[] {
  const held = new Set(document.beads.flatMap((bead) => bead.atoms.map(({ atom }) => atom)))
  const loose = unit.atoms.filter(({ index }) => !held.has(index))
  if (loose.length === 0) return []
  const mass = loose.reduce((sum, atom) => sum + atom.mass, 0).toFixed(3)
  const many = loose.length > 1
  return [
    {
      code: 'ATOM_IN_NO_BEAD',
      severity: 'problem',
      title: `${listWords(loose.map(({ label }) => label))} ${many ? 'are' : 'is'} in no bead`,
      detail: `${many ? 'Their' : 'Its'} ${mass} g/mol would be missing from every unit of the chain.`,
      beads: [],
      atoms: loose.map(({ index }) => index),
    },
  ]
}

/** Atoms whose shares in their beads do not sum to 1. */
export function wrongShares(unit: RepeatUnit, document: MappingDocument): MappingProblem[] {
  return unit.atoms.flatMap((atom): MappingProblem[] => {
    const holders = document.beads.filter((bead) => bead.atoms.some((held) => held.atom === atom.index))
    const shares = holders.flatMap((bead) => bead.atoms.filter((held) => held.atom === atom.index))
    const sum = shares.reduce((total, { weight }) => total + weight, 0)
    if (shares.length === 0 || Math.abs(sum - 1) <= SHARE_TOLERANCE) return []
    return [
      {
        code: 'ATOM_SHARES',
        severity: 'problem',
        title: `${atom.label} counts ${Number(sum.toFixed(3))} times`,
        detail: `Its shares in ${listWords(holders.map(({ name }) => name))} must sum to 1, or the mass of the chain is wrong.`,
        beads: holders.map(({ id }) => id),
        atoms: [atom.index],
      },
    ]
  })
}

/** Rings that no bead holds whole: a note, since a ring may be split on purpose. */
export function cutRings(unit: RepeatUnit, document: MappingDocument): MappingProblem[] {
  return unit.rings.flatMap((ring): MappingProblem[] => {
    const holders = document.beads.filter((bead) => bead.atoms.some(({ atom }) => ring.includes(atom)))
    const whole = holders.some((bead) =>
      [-1, 0, 1].some((offset) =>
        ring.every((index) => bead.atoms.some(({ atom, unit: at }) => atom === index && at === offset)),
      ),
    )
    if (whole || holders.length < 2) return []
    return [
      {
        code: 'RING_CUT',
        severity: 'note',
        title: `A ring of ${ring.length} is shared by ${listWords(holders.map(({ name }) => name))}`,
        detail: `${ring.map((atom) => unit.atoms[atom].label).join(', ')}: the bonds between its beads are stiff, and several terms describe one motion.`,
        beads: holders.map(({ id }) => id),
        atoms: ring,
      },
    ]
  })
}
