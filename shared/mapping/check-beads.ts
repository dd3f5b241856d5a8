import { formulaText, type RepeatUnit } from '../chemistry'
import { beadComposition } from './bead-composition'
import { beadPieces } from './bead-pieces'
import { listWords } from './list-words'
import type { Bead, MappingDocument } from './mapping-document'
import type { MappingProblem } from './mapping-problem'

/** A bead without atoms. */
export function emptyBead(bead: Bead): MappingProblem[] {
  if (bead.atoms.length > 0) return []
  return [
    {
      code: 'BEAD_EMPTY',
      severity: 'problem',
      title: `${bead.name} holds no atom`,
      detail: 'It has no mass and no site, and no term reaches it.',
      beads: [bead.id],
      atoms: [],
    },
  ]
}

/** A bead whose atoms are not bonded to one another. */
export function beadInPieces(unit: RepeatUnit, bead: Bead): MappingProblem[] {
  const parts = beadPieces(unit, bead)
  if (parts.length < 2) return []
  const named = parts.map((part) => part.map(({ atom }) => unit.atoms[atom].label).join(', '))
  return [
    {
      code: 'BEAD_IN_PIECES',
      severity: 'problem',
      title: `${bead.name} is in ${parts.length === 2 ? 'two' : parts.length} pieces`,
      detail: `${named.join(' and ')} are not bonded inside the bead, so its site would lie between them.`,
      beads: [bead.id],
      atoms: bead.atoms.map(({ atom }) => atom),
    },
  ]
}

/** A bead that sits on an atom it does not hold. */
export function siteOutside(unit: RepeatUnit, bead: Bead): MappingProblem[] {
  const { site } = bead
  if (site.rule !== 'atom' || bead.atoms.some(({ atom }) => atom === site.atom)) return []
  const label = unit.atoms[site.atom]?.label ?? `number ${site.atom + 1}`
  return [
    {
      code: 'SITE_OUTSIDE',
      severity: 'problem',
      title: `${bead.name} sits on ${label}, which it does not hold`,
      detail: 'Choose one of its own atoms or a centre as its site.',
      beads: [bead.id],
      atoms: unit.atoms[site.atom] ? [site.atom] : [],
    },
  ]
}

/** Names that more than one bead has. */
export function sameNames(document: MappingDocument): MappingProblem[] {
  return [...grouped(document.beads, ({ name }) => name)]
    .filter(([, beads]) => beads.length > 1)
    .map(([name, beads]) => ({
      code: 'BEAD_NAME_TWICE',
      severity: 'problem',
      title: `${beads.length === 2 ? 'Two' : beads.length} beads are called ${name}`,
      detail:
        'Names tell beads apart on the drawing. Beads that share their potentials share a type, not a name.',
      beads: beads.map(({ id }) => id),
      atoms: [],
    }))
}

/** Types that stand for more than one composition. */
export function mixedTypes(unit: RepeatUnit, document: MappingDocument): MappingProblem[] {
  const filled = document.beads.filter(({ atoms }) => atoms.length > 0)
  return [...grouped(filled, ({ type }) => type)].flatMap(([type, beads]): MappingProblem[] => {
    const formulas = [...new Set(beads.map((bead) => formulaText(beadComposition(unit, bead))))]
    if (formulas.length < 2) return []
    return [
      {
        code: 'TYPE_COMPOSITION',
        severity: 'problem',
        title: `Type ${type} stands for ${listWords(formulas)}`,
        detail: `${listWords(beads.map(({ name }) => name))} share one mass and one set of potentials, but not a composition.`,
        beads: beads.map(({ id }) => id),
        atoms: [],
      },
    ]
  })
}

function grouped(beads: readonly Bead[], key: (bead: Bead) => string): Map<string, Bead[]> {
  const groups = new Map<string, Bead[]>()
  for (const bead of beads) groups.set(key(bead), [...(groups.get(key(bead)) ?? []), bead])
  return groups
}
