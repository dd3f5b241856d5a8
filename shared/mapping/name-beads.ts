import { formulaText, type RepeatUnit } from '../chemistry'
import { beadComposition } from './bead-composition'
import { groupWords } from './group-words'
import { BEAD_COLOURS, type Bead, type BeadAtom } from './mapping-document'
import { chainClasses } from './place-signature'

/** The most words that fit a bead's label. */
const MOST_WORDS = 2

/**
 * Beads for some sets of atoms, with ids, names and types: a letter for what the bead is, with a number where several beads
 * have that letter. Beads of equal composition in equal surroundings share a type, named after the first of them.
 *
 * @param sets atoms of each bead, in the order of the beads
 */
export function nameBeads(unit: RepeatUnit, sets: readonly (readonly BeadAtom[])[]): Bead[] {
  const words = sets.map((atoms) =>
    groupWords(
      unit,
      atoms.map(({ atom }) => atom),
    ),
  )
  const letters = sets.length === 1 ? ['A'] : words.map(([first]) => first.letter)
  const names = letters.map((letter, index) => {
    if (letters.filter((other) => other === letter).length === 1) return letter
    return `${letter}${letters.slice(0, index + 1).filter((other) => other === letter).length}`
  })
  const beads = sets.map((atoms, index): Bead => ({
    id: `b${index + 1}`,
    name: names[index],
    type: names[index],
    label:
      sets.length === 1
        ? 'repeat unit'
        : words[index]
            .slice(0, MOST_WORDS)
            .map(({ word }) => word)
            .join(' and '),
    colour: index % BEAD_COLOURS.length,
    site: { rule: 'mass' },
    atoms: [...atoms],
  }))
  return withSharedTypes(unit, beads, letters)
}

function withSharedTypes(unit: RepeatUnit, beads: readonly Bead[], letters: readonly string[]): Bead[] {
  const formulas = beads.map((bead) => formulaText(beadComposition(unit, bead)))
  const classes = chainClasses(unit, {
    version: 1,
    beads: beads.map((bead, index) => ({ ...bead, type: formulas[index] })),
  }).beads
  return beads.map((bead, index) => {
    const first = classes.indexOf(classes[index])
    const alone = letters.every(
      (letter, other) => letter !== letters[index] || classes[other] === classes[index],
    )
    return { ...bead, type: alone ? letters[index] : beads[first].name }
  })
}
