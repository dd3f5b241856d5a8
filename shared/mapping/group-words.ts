import { backboneAtoms, neighbourLists, type RepeatUnit } from '../chemistry'
import { acylCarbons } from './rotatable-bonds'

/** What a bead is, in a word for people and a letter for its name. */
export interface GroupWord {
  readonly word: string
  readonly letter: string
}

const LETTERS: Readonly<Record<string, string>> = {
  carbonate: 'K',
  urethane: 'U',
  urea: 'U',
  ester: 'E',
  acid: 'X',
  amide: 'A',
  carbonyl: 'Y',
  siloxane: 'D',
  'aromatic ring': 'R',
  ring: 'R',
  ether: 'O',
  backbone: 'B',
  'side chain': 'S',
}

/**
 * What some atoms are: the functional groups and rings among them, or else where they lie.
 *
 * @param atoms indices in the repeat unit, at least one
 * @returns the words that hold, the most telling first
 */
export function groupWords(unit: RepeatUnit, atoms: readonly number[]): GroupWord[] {
  const held = new Set(atoms)
  const neighbours = chainNeighbours(unit)
  const acyl = [...acylCarbons(unit)].filter((carbon) => held.has(carbon))
  const words = new Set(acyl.map((carbon) => acylWord(unit, neighbours, carbon)))
  const elements = new Set(atoms.map((atom) => unit.atoms[atom].element))
  if (elements.has('Si') && elements.has('O')) words.add('siloxane')
  const rings = unit.rings.filter((ring) => ring.every((atom) => held.has(atom)))
  if (rings.length > 0) {
    words.add(
      rings.some((ring) => ring.every((atom) => unit.atoms[atom].aromatic)) ? 'aromatic ring' : 'ring',
    )
  }
  if (words.size === 0 && atoms.some((atom) => isEther(unit, neighbours, atom))) words.add('ether')
  if (words.size === 0) {
    const backbone = new Set(backboneAtoms(unit))
    words.add(atoms.some((atom) => backbone.has(atom)) ? 'backbone' : 'side chain')
  }
  return [...words].map((word) => ({ word, letter: LETTERS[word] }))
}

/** Neighbours of each atom in the endless chain. */
function chainNeighbours(unit: RepeatUnit): number[][] {
  const [head, tail] = unit.attachments
  return neighbourLists(unit.atoms.length, [...unit.bonds, { from: tail, to: head }])
}

function acylWord(unit: RepeatUnit, neighbours: readonly (readonly number[])[], carbon: number): string {
  const doubled = unit.bonds
    .filter(({ from, to, order }) => order === 2 && (from === carbon || to === carbon))
    .map(({ from, to }) => (from === carbon ? to : from))
  const single = neighbours[carbon].filter((atom) => !doubled.includes(atom))
  const oxygens = single.filter((atom) => unit.atoms[atom].element === 'O')
  const nitrogens = single.filter((atom) => unit.atoms[atom].element === 'N')
  if (oxygens.length > 1) return 'carbonate'
  if (oxygens.length === 1 && nitrogens.length === 1) return 'urethane'
  if (nitrogens.length > 1) return 'urea'
  if (nitrogens.length === 1) return 'amide'
  if (oxygens.length === 0) return 'carbonyl'
  return neighbours[oxygens[0]].length > 1 ? 'ester' : 'acid'
}

function isEther(unit: RepeatUnit, neighbours: readonly (readonly number[])[], atom: number): boolean {
  return unit.atoms[atom].element === 'O' && neighbours[atom].length === 2
}
