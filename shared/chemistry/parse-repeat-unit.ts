import { InvalidInputError } from '../errors'
import { atomicWeight } from './atomic-weights'
import { checkAttachments, type Attachments } from './check-attachments'
import { checkValences } from './check-valences'
import { composition, compositionMass, formulaText } from './composition'
import { readStructure, type Structure } from './read-structure'
import { refineClasses } from './refine-classes'
import type { RepeatUnit, RepeatUnitAtom, RepeatUnitBond } from './repeat-unit'
import { smallestRings } from './rings'
import { scanSmiles } from './scan-smiles'
import { neighbourLists, type SmilesGraph } from './smiles-graph'

/**
 * Reads a repeat unit from SMILES with exactly two `*`: atoms with their hydrogens, bonds, rings, symmetry classes, formula and
 * mass. Loads the chemistry library, so call it only where a repeat unit is needed.
 *
 * Explicit hydrogens (`[H]`) are folded into the atoms that carry them, stereo marks and labels (`[*:1]`) are read and
 * dropped, aromatic rings may be written either way.
 *
 * @param smiles OpenSMILES; blanks around it are ignored
 * @throws {InvalidInputError} SMILES_UNPARSABLE, ELEMENT_UNKNOWN, ATTACHMENT_COUNT, ATTACHMENT_BONDS, FRAGMENTS, TOO_MANY_ATOMS,
 *   VALENCE_EXCEEDED; `place.position` is the character, from 0, where it is known
 * @example (await parseRepeatUnit('*CC(*)c1ccccc1')).formula // 'C8H8'
 */
export async function parseRepeatUnit(smiles: string): Promise<RepeatUnit> {
  const text = smiles.trim()
  if (text === '') {
    throw new InvalidInputError('SMILES_UNPARSABLE', 'Type the repeat unit as SMILES with two *.', {
      field: 'smiles',
      position: 0,
    })
  }
  const graph = scanSmiles(text)
  const attachments = checkAttachments(graph)
  const structure = await readStructure(text, graph)
  checkValences(graph, structure)
  await checkDrawable(text)
  return assemble(text, graph, attachments, structure)
}

/** The drawing has a reader of its own; a unit it cannot read could not be shown or mapped. */
async function checkDrawable(smiles: string): Promise<void> {
  const { default: drawer } = await import('smiles-drawer')
  try {
    drawer.Parser.parse(smiles)
  } catch {
    throw new InvalidInputError('SMILES_UNPARSABLE', 'The SMILES cannot be drawn as it is written.', {
      field: 'smiles',
    })
  }
}

function assemble(
  smiles: string,
  graph: SmilesGraph,
  attachments: Attachments,
  structure: Structure,
): RepeatUnit {
  const heavy = graph.atoms.flatMap((atom, index) =>
    atom.element === '*' || atom.element === 'H' ? [] : [index],
  )
  const indexOf = new Map(heavy.map((vertex, index) => [vertex, index]))
  const at = (vertex: number): number => indexOf.get(vertex) ?? -1

  const bonds: RepeatUnitBond[] = []
  const explicitHydrogens = new Array<number>(graph.atoms.length).fill(0)
  graph.bonds.forEach(({ from, to }, index) => {
    if (graph.atoms[from].element === 'H') explicitHydrogens[to]++
    if (graph.atoms[to].element === 'H') explicitHydrogens[from]++
    if (!indexOf.has(from) || !indexOf.has(to)) return
    bonds.push({
      from: at(from),
      to: at(to),
      order: structure.bondOrders[index],
      aromatic: structure.aromaticBonds[index],
    })
  })

  const counts = new Map<string, number>()
  const plain = heavy.map((vertex, index): Omit<RepeatUnitAtom, 'symmetryClass'> => {
    const { element } = graph.atoms[vertex]
    const hydrogens = structure.hydrogens[vertex] + explicitHydrogens[vertex]
    const count = (counts.get(element) ?? 0) + 1
    counts.set(element, count)
    return {
      index,
      label: `${element}${count}`,
      element,
      aromatic: structure.aromaticAtoms[vertex],
      ring: structure.ringAtoms[vertex],
      hydrogens,
      charge: structure.charges[vertex],
      mass: atomicWeight(element) + hydrogens * atomicWeight('H'),
      attachment: attachments.anchors.includes(vertex),
    }
  })
  const ends = attachments.anchors.map(at)
  const classes = symmetryClasses(plain, bonds, ends)
  const atoms = plain.map((atom, index) => ({ ...atom, symmetryClass: classes[index] }))
  const total = composition(atoms)
  return {
    smiles,
    atoms,
    bonds,
    attachments: [ends[0], ends[1]],
    linkOrder: structure.bondOrders[graph.bonds.indexOf(attachments.bonds[0])],
    rings: smallestRings(neighbourLists(atoms.length, bonds)),
    composition: total,
    formula: formulaText(total),
    mass: compositionMass(total),
  }
}

/** Classes of the unit by itself; its two ends are not told apart. */
function symmetryClasses(
  atoms: readonly Omit<RepeatUnitAtom, 'symmetryClass'>[],
  bonds: readonly RepeatUnitBond[],
  ends: readonly number[],
): number[] {
  const labels = atoms.map(
    ({ element, hydrogens, charge, index }) =>
      `${element} ${hydrogens} ${charge} ${ends.filter((end) => end === index).length}`,
  )
  return refineClasses(
    labels,
    bonds.map(({ from, to, order, aromatic }) => ({ from, to, label: aromatic ? 'a' : String(order) })),
  )
}
