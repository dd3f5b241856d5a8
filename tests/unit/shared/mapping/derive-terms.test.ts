import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { parseRepeatUnit, type RepeatUnit } from '@shared/chemistry'
import { mappingSchema } from '@shared/contracts/mapping'
import { deriveTerms, type DerivedTerm, type MappingDocument } from '@shared/mapping'
import { bead, FIVE_TO_ONE, HEXYL_ACRYLATE, mapping, THREE_TO_ONE } from './hexyl-acrylate'

const acrylate = await parseRepeatUnit(HEXYL_ACRYLATE)

function names(terms: readonly DerivedTerm[], kind?: string): string[] {
  return terms.filter((term) => kind === undefined || term.kind === kind).map((term) => term.name)
}

function distinctPlaces(term: DerivedTerm | undefined): number {
  return new Set(term?.placeClasses).size
}

/** Same kinds, types, number of places and of classes: what does not depend on how beads and atoms are numbered. */
function summary(terms: readonly DerivedTerm[]): string[] {
  return terms.map((term) => `${term.kind} ${term.name} ${term.places.length} ${distinctPlaces(term)}`)
}

describe('the terms of poly(n-hexyl acrylate)', () => {
  it('are ten in the 3-to-1 mapping', () => {
    const terms = deriveTerms(acrylate, THREE_TO_ONE)
    expect(names(terms, 'bond')).toEqual(['B–B', 'B–E', 'E–H'])
    expect(names(terms, 'angle')).toEqual(['B–B–B', 'B–B–E', 'B–E–H'])
    expect(names(terms, 'dihedral')).toEqual(['B–B–B–B', 'B–B–B–E', 'E–B–B–E', 'B–B–E–H'])
  })

  it('are sixteen in the 5-to-1 mapping', () => {
    const terms = deriveTerms(acrylate, FIVE_TO_ONE)
    expect(names(terms, 'bond')).toEqual(['B–B', 'B–E', 'E–S1', 'S1–S2', 'S2–S3'])
    expect(names(terms, 'angle')).toEqual(['B–B–B', 'B–B–E', 'B–E–S1', 'E–S1–S2', 'S1–S2–S3'])
    expect(names(terms, 'dihedral')).toEqual([
      'B–B–B–B',
      'B–B–B–E',
      'E–B–B–E',
      'B–B–E–S1',
      'B–E–S1–S2',
      'E–S1–S2–S3',
    ])
  })

  it('stand at two places that differ where the direction of the backbone matters', () => {
    const terms = deriveTerms(acrylate, FIVE_TO_ONE)
    const doubled = terms.filter((term) => distinctPlaces(term) > 1).map((term) => term.name)
    expect(doubled).toEqual(['B–B–E', 'B–B–B–E', 'B–B–E–S1'])
  })

  it('name every bead of a place, shifted so that the first unit is 0', () => {
    const angle = deriveTerms(acrylate, THREE_TO_ONE).find((term) => term.name === 'B–B–E')
    expect(angle?.places).toEqual([
      [
        { bead: 'b', unit: 0 },
        { bead: 'b', unit: 1 },
        { bead: 'e', unit: 1 },
      ],
      [
        { bead: 'b', unit: 1 },
        { bead: 'b', unit: 0 },
        { bead: 'e', unit: 0 },
      ],
    ])
  })
})

describe('chains of one bead per unit', () => {
  it('have one bond, one angle and one dihedral', () => {
    const terms = deriveTerms(
      acrylate,
      mapping(
        bead(
          'A',
          acrylate.atoms.map((_, index) => index),
        ),
      ),
    )
    expect(names(terms)).toEqual(['A–A', 'A–A–A', 'A–A–A–A'])
    expect(terms.map((term) => term.places.length)).toEqual([1, 1, 1])
  })
})

describe('places that a symmetry of the chain exchanges', () => {
  it('are of one class, however long the unit is written', async () => {
    const unit = await parseRepeatUnit('*CCCC*')
    const terms = deriveTerms(
      unit,
      mapping(bead('A', [0, 1], { type: 'P' }), bead('B', [2, 3], { type: 'P' })),
    )
    expect(summary(terms)).toEqual(['bond P–P 2 1', 'angle P–P–P 2 1', 'dihedral P–P–P–P 2 1'])
  })

  it('are of two classes as soon as one of the beads sits elsewhere', async () => {
    const unit = await parseRepeatUnit('*CCCC*')
    const terms = deriveTerms(
      unit,
      mapping(
        bead('A', [0, 1], { type: 'P' }),
        bead('B', [2, 3], { type: 'P', site: { rule: 'atom', atom: 2 } }),
      ),
    )
    expect(distinctPlaces(terms.find((term) => term.name === 'P–P–P'))).toBe(2)
  })

  it('are one place where a row read backwards is the same row', () => {
    const [bond, angle] = deriveTerms(acrylate, THREE_TO_ONE).filter((term) => /^B–B(–B)?$/.test(term.name))
    expect([bond.placeClasses, angle.placeClasses]).toEqual([[0], [0]])
  })
})

describe('rings of beads', () => {
  it('give angles and dihedrals of distinct beads only', async () => {
    const unit = await parseRepeatUnit('*c1ccc(*)cc1')
    const ring = mapping(bead('P', [0, 1]), bead('Q', [2, 3]), bead('R', [4, 5]))
    const terms = deriveTerms(unit, ring)
    for (const term of terms) {
      for (const place of term.places) {
        expect(new Set(place.map(({ bead: id, unit: at }) => `${id}${at}`)).size).toBe(place.length)
      }
    }
    expect(names(terms, 'bond')).toEqual(['P–Q', 'P–R', 'Q–R'])
    expect(terms.find((term) => term.name === 'P–Q')?.places).toHaveLength(2)
  })
})

describe('what a bead may hold', () => {
  const across = mapping(
    bead('B', [], {
      atoms: [
        { atom: 1, weight: 1, unit: 0 },
        { atom: 0, weight: 1, unit: 1 },
      ],
    }),
    bead('E', [2, 3, 4]),
    bead('H', [5, 6, 7, 8, 9, 10]),
  )

  it('includes atoms of the next unit, with the same terms', () => {
    expect(names(deriveTerms(acrylate, across))).toEqual(names(deriveTerms(acrylate, THREE_TO_ONE)))
  })

  it('includes shared atoms, which bond both of their beads to what they are bonded to', async () => {
    const unit = await parseRepeatUnit('*CCC*')
    const half = (atom: number) => ({ atom, weight: 0.5, unit: 0 })
    const whole = (atom: number) => ({ atom, weight: 1, unit: 0 })
    const terms = deriveTerms(
      unit,
      mapping(bead('A', [], { atoms: [whole(0), half(1)] }), bead('B', [], { atoms: [half(1), whole(2)] })),
    )
    expect(names(terms, 'bond')).toEqual(['A–B'])
    expect(terms[0].places).toHaveLength(2)
  })

  it('leaves out beads without atoms, and refuses atoms that the unit does not have', () => {
    const empty = mapping(...THREE_TO_ONE.beads, bead('X', []))
    expect(names(deriveTerms(acrylate, empty))).toEqual(names(deriveTerms(acrylate, THREE_TO_ONE)))
    expect(() => deriveTerms(acrylate, mapping(bead('B', [11])))).toThrow(
      expect.objectContaining({ code: 'MAPPING_INVALID' }),
    )
  })
})

describe('the terms do not depend', () => {
  const twelve: MappingDocument = mapping(
    ...acrylate.atoms.map(({ index }) =>
      bead(`A${index}`.slice(0, 2), [index], { id: `a${index}`, type: `T${index}` }),
    ),
  )

  it('on the order of the beads or of their atoms', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(THREE_TO_ONE, FIVE_TO_ONE, twelve).chain((document) =>
          fc.record({
            document: fc.constant(document),
            beads: fc.shuffledSubarray([...document.beads], { minLength: document.beads.length }),
          }),
        ),
        ({ document, beads }) => {
          const turned = beads.map((one) => ({ ...one, atoms: one.atoms.toReversed() }))
          expect(deriveTerms(acrylate, mapping(...turned))).toEqual(deriveTerms(acrylate, document))
        },
      ),
      { numRuns: 40 },
    )
  })

  it('on the numbering of the atoms', () => {
    const size = acrylate.atoms.length
    fc.assert(
      fc.property(
        fc.constantFrom(THREE_TO_ONE, FIVE_TO_ONE, twelve),
        fc.shuffledSubarray([...Array(size).keys()], { minLength: size }),
        (document, place) => {
          const unit = renumbered(acrylate, place)
          const moved = mapping(
            ...document.beads.map((one) => ({
              ...one,
              atoms: one.atoms.map((atom) => ({ ...atom, atom: place[atom.atom] })),
            })),
          )
          expect(deriveTerms(unit, moved)).toEqual(deriveTerms(acrylate, document))
        },
      ),
      { numRuns: 40 },
    )
  })

  it('on which end of the unit is the head, but for the direction of its places', () => {
    const [head, tail] = acrylate.attachments
    const turned: RepeatUnit = { ...acrylate, attachments: [tail, head] }
    for (const document of [THREE_TO_ONE, FIVE_TO_ONE, twelve]) {
      expect(summary(deriveTerms(turned, document))).toEqual(summary(deriveTerms(acrylate, document)))
    }
  })

  it('on which unit a bead that spans the border counts as its own', () => {
    const spanning = (shift: number): MappingDocument =>
      mapping(
        bead('B', [], {
          atoms: [
            { atom: 1, weight: 1, unit: shift - 1 },
            { atom: 0, weight: 1, unit: shift },
          ],
        }),
        ...THREE_TO_ONE.beads.slice(1),
      )
    expect(summary(deriveTerms(acrylate, spanning(0)))).toEqual(summary(deriveTerms(acrylate, spanning(1))))
  })
})

it('hands over documents and places in the shape of the contract', () => {
  const { document } = mappingSchema.pick({ document: true }).parse({ document: FIVE_TO_ONE })
  expect(deriveTerms(acrylate, document)).toEqual(deriveTerms(acrylate, FIVE_TO_ONE))
})

function renumbered(unit: RepeatUnit, place: readonly number[]): RepeatUnit {
  const atoms = unit.atoms.map((atom) => ({ ...atom, index: place[atom.index] }))
  const [head, tail] = unit.attachments
  return {
    ...unit,
    atoms: atoms.toSorted((a, b) => a.index - b.index),
    bonds: unit.bonds.map((bond) => ({ ...bond, from: place[bond.from], to: place[bond.to] })),
    attachments: [place[head], place[tail]],
  }
}
