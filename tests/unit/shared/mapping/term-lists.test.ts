import { describe, expect, it } from 'vitest'
import { parseRepeatUnit } from '@shared/chemistry'
import { deriveTerms, type MappingDocument, multiplicity, placeFlags, termGroups } from '@shared/mapping'
import { bead, mapping } from './hexyl-acrylate'
import { POLYMERS } from './polymers'

interface WorkedExample {
  readonly smiles: string
  readonly document: MappingDocument
  /** Terms with how often they stand in each unit, worked out on paper. */
  readonly terms: string
  /** Sequences whose places differ. */
  readonly flags: string
}

const EXAMPLES: Record<string, WorkedExample> = {
  // –A–A–A–A–
  'a straight chain of one bead': {
    smiles: POLYMERS['poly(ethylene oxide)'],
    document: mapping(bead('A', [0, 1, 2])),
    terms: 'A–A 1, A–A–A 1, A–A–A–A 1',
    flags: '',
  },
  // –B(R)–B(R)–: the CH2 end and the CH end of B tell the two ways along the chain apart.
  'a ring bead beside the backbone': {
    smiles: POLYMERS.polystyrene,
    document: mapping(bead('B', [0, 1]), bead('R', [2, 3, 4, 5, 6, 7])),
    terms: 'B–B 1, B–R 1, B–B–B 1, B–B–R 2, B–B–B–B 1, B–B–B–R 2, R–B–B–R 1',
    flags: 'B–B–R, B–B–B–R',
  },
  // –E–R–E–B–E–R–E–B–: a mirror through R and one through B, so nothing is flagged.
  'a straight chain with mirror planes': {
    smiles: POLYMERS['poly(ethylene terephthalate)'],
    document: mapping(
      bead('E1', [0, 1, 2], { type: 'E' }),
      bead('R', [3, 4, 5, 6, 7, 8]),
      bead('E2', [9, 10, 11], { type: 'E' }),
      bead('B', [12, 13]),
    ),
    terms: 'B–E 2, E–R 2, E–B–E 1, B–E–R 2, E–R–E 1, B–E–R–E 2, E–B–E–R 2',
    flags: '',
  },
  // –R–B–R–K–: K holds the carbonate, whose last oxygen is written in the next unit.
  'a bead across the border': {
    smiles: POLYMERS['bisphenol A polycarbonate'],
    document: mapping(
      bead('R1', [1, 2, 3, 4, 5, 6], { type: 'R' }),
      bead('B', [7, 8, 9]),
      bead('R2', [10, 11, 12, 13, 14, 15], { type: 'R' }),
      bead('K', [], {
        atoms: [
          ...[16, 17, 18].map((atom) => ({ atom, weight: 1, unit: 0 })),
          { atom: 0, weight: 1, unit: 1 },
        ],
      }),
    ),
    terms: 'B–R 2, K–R 2, B–R–K 2, R–B–R 1, R–K–R 1, B–R–K–R 2, K–R–B–R 2',
    flags: '',
  },
  // The ring as a triangle P, Q, R hanging on the backbone at P.
  'a ring of three beads': {
    smiles: POLYMERS.polystyrene,
    document: mapping(bead('B', [0, 1]), bead('P', [2, 3]), bead('Q', [4, 5]), bead('R', [6, 7])),
    terms:
      'B–B 1, B–P 1, P–Q 1, P–R 1, Q–R 1, ' +
      'B–B–B 1, B–B–P 2, B–P–Q 1, B–P–R 1, P–Q–R 1, P–R–Q 1, Q–P–R 1, ' +
      'B–B–B–B 1, B–B–B–P 2, P–B–B–P 1, B–B–P–Q 2, B–B–P–R 2, B–P–Q–R 1, B–P–R–Q 1',
    flags: 'B–B–P, B–B–B–P, B–B–P–Q, B–B–P–R',
  },
  // Four neighbours at each B: two of the backbone, S and T. The unit is its own mirror image.
  'two branches at one bead': {
    smiles: '*C(CCC)(CCCC)*',
    document: mapping(bead('B', [0]), bead('S', [1, 2, 3]), bead('T', [4, 5, 6, 7])),
    terms:
      'B–B 1, B–S 1, B–T 1, B–B–B 1, B–B–S 2, B–B–T 2, S–B–T 1, ' +
      'B–B–B–B 1, B–B–B–S 2, B–B–B–T 2, S–B–B–S 1, S–B–B–T 2, T–B–B–T 1',
    flags: '',
  },
  // –A–C–A–C– with the middle carbon shared half and half: each is bonded to the other twice, here and over the border.
  'an atom shared by two beads': {
    smiles: '*CCC*',
    document: mapping(
      bead('A', [0], { atoms: [atom(0, 1), atom(1, 0.5)] }),
      bead('C', [2], { atoms: [atom(1, 0.5), atom(2, 1)] }),
    ),
    terms: 'A–C 2, A–C–A 1, C–A–C 1, A–C–A–C 2',
    flags: 'A–C, A–C–A–C',
  },
}

describe('the terms worked out by hand', () => {
  it.each(Object.entries(EXAMPLES))('of %s', async (_, { smiles, document, terms, flags }) => {
    const unit = await parseRepeatUnit(smiles)
    const derived = deriveTerms(unit, document)
    const list = (text: string): string[] => text.split(', ').filter((word) => word !== '')
    expect(derived.map((term) => `${term.name} ${multiplicity(term)}`).sort()).toEqual(list(terms).sort())
    expect(placeFlags(unit, document).map(({ name }) => name)).toEqual(
      expect.arrayContaining(list(flags)) as unknown,
    )
    expect(placeFlags(unit, document)).toHaveLength(list(flags).length)
  })
})

/** Analytic: a tree of beads has as many independent bonds, angles and dihedrals as degrees of freedom, three a bead. */
describe('the independent places', () => {
  const trees = Object.entries(EXAMPLES).filter(([name]) => !/ring of|shared/.test(name))
  it.each(trees)('of %s are three for each bead', async (_, { smiles, document }) => {
    const unit = await parseRepeatUnit(smiles)
    const terms = deriveTerms(unit, document)
    const groups = termGroups(unit, document, terms)
    const grouped = new Set(groups.flatMap((group) => group.terms.map(({ term }) => term)))
    const alone = terms
      .filter((term) => !grouped.has(term))
      .reduce((sum, term) => sum + multiplicity(term), 0)
    expect(alone + groups.reduce((sum, { degrees }) => sum + degrees, 0)).toBe(3 * document.beads.length)
  })
})

function atom(index: number, weight: number) {
  return { atom: index, weight, unit: 0 }
}
