import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { parseRepeatUnit } from '@shared/chemistry'
import {
  changeBead,
  deriveTerms,
  giveAtoms,
  makeUpChange,
  type MappingDocument,
  type PlacedTerm,
  sameMakeUp,
  setPooling,
  setTermUse,
  shareAtom,
  termMakeUp,
} from '@shared/mapping'
import { bead, FIVE_TO_ONE, HEXYL_ACRYLATE, mapping, THREE_TO_ONE } from './hexyl-acrylate'

const acrylate = await parseRepeatUnit(HEXYL_ACRYLATE)

function placed(document: MappingDocument, name: string): PlacedTerm {
  const term = deriveTerms(acrylate, document).find((each) => each.name === name)
  if (!term) throw new Error(`No term ${name}.`)
  return { document, places: term.places }
}
const changeOf = (after: MappingDocument, name: string, nameAfter = name): string | null =>
  makeUpChange(acrylate, placed(THREE_TO_ONE, name), placed(after, nameAfter))

describe('the make-up of a mapping', () => {
  it('is untouched by names, labels, colours, end groups and decisions about terms', () => {
    const renamed = changeBead(THREE_TO_ONE, 'h', { name: 'X', type: 'X', label: 'tail', endGroup: 'butyl' })
    const painted = { ...renamed, beads: renamed.beads.map((each) => ({ ...each, colour: 7 })) }
    const decided = setTermUse(
      setPooling(painted, ['B', 'B', 'E'], 'split'),
      { types: ['B', 'B', 'E', 'X'], placeKey: '' },
      'left out',
    )
    expect(sameMakeUp(THREE_TO_ONE, decided)).toBe(true)
    expect(changeOf(decided, 'B–E–H', 'B–E–X')).toBeNull()
  })

  it('does not depend on ids or on the order of beads and atoms', () => {
    fc.assert(
      fc.property(
        fc.shuffledSubarray([...FIVE_TO_ONE.beads], { minLength: 5 }),
        fc.array(fc.boolean(), { minLength: 5, maxLength: 5 }),
        (beads, turns) => {
          const shuffled = mapping(
            ...beads.map((each, index) => ({
              ...each,
              id: `new-${each.id}`,
              atoms: turns[index] ? each.atoms.toReversed() : each.atoms,
            })),
          )
          expect(sameMakeUp(FIVE_TO_ONE, shuffled)).toBe(true)
          for (const term of deriveTerms(acrylate, FIVE_TO_ONE)) {
            const before = placed(FIVE_TO_ONE, term.name)
            expect(termMakeUp(placed(shuffled, term.name))).toBe(termMakeUp(before))
          }
        },
      ),
      { numRuns: 12 },
    )
  })

  it('does not depend on the unit that a bead is counted in', () => {
    const across = mapping(bead('A', [0, 1]), bead('S', [2, 3, 4, 5, 6, 7, 8, 9, 10]))
    const shifted = mapping(
      bead('A', [], { atoms: [0, 1].map((atom) => ({ atom, weight: 1, unit: 1 })) }),
      across.beads[1],
    )
    expect(sameMakeUp(across, shifted)).toBe(true)
    expect(termMakeUp(placed(shifted, 'A–S'))).toBe(termMakeUp(placed(across, 'A–S')))
  })

  it('changes with an atom, a share, a site and with which beads are of one type', () => {
    const changes = [
      giveAtoms(THREE_TO_ONE, 'e', [5]),
      shareAtom(THREE_TO_ONE, 4, ['e', 'h']),
      changeBead(THREE_TO_ONE, 'h', { site: { rule: 'geometry' } }),
      changeBead(THREE_TO_ONE, 'h', { type: 'E' }),
    ]
    expect(changes.map((each) => sameMakeUp(THREE_TO_ONE, each))).toEqual([false, false, false, false])
  })
})

describe('data of a term after a change of its mapping', () => {
  it('fit where none of its beads changed, and do not where one did', () => {
    const moved = giveAtoms(THREE_TO_ONE, 'e', [5])
    expect(changeOf(moved, 'B–B–B')).toBeNull()
    expect(changeOf(moved, 'B–E')).toBe('Bead E was CO2 and is now C2H2O2.')
    expect(changeOf(moved, 'E–H')).toBe(
      'Bead E was CO2 and is now C2H2O2. Bead H was C6H13 and is now C5H11.',
    )
  })

  it('say which atoms were exchanged where the formula stays', () => {
    const turned = mapping(
      bead('B', [0, 1]),
      bead('E', [2, 3, 4]),
      bead('H', [5, 6, 7, 8]),
      bead('T', [9, 10]),
    )
    const other = mapping(
      bead('B', [0, 1]),
      bead('E', [2, 3, 4]),
      bead('H', [5, 6, 7, 9]),
      bead('T', [8, 10]),
    )
    expect(makeUpChange(acrylate, placed(turned, 'E–H'), placed(other, 'E–H'))).toBe(
      'Bead H held C4, C5, C6 and C7 and now holds C4, C5, C6 and C8.',
    )
  })

  it('say where a bead sat and sits', () => {
    const sited = changeBead(THREE_TO_ONE, 'h', { site: { rule: 'atom', atom: 5 } })
    expect(changeOf(sited, 'E–H')).toBe('Bead H sat at its centre of mass and now sits on C4.')
  })

  it('say that another bead took the place of one', () => {
    const replaced = mapping(
      THREE_TO_ONE.beads[0],
      THREE_TO_ONE.beads[1],
      bead('H', [5, 6, 7, 8], { id: 'other' }),
      bead('T', [9, 10]),
    )
    expect(changeOf(replaced, 'E–H')).toBe('Bead H (C6H13) no longer belongs to it; H (C4H8) does now.')
  })

  it('do not fit once their type sequence stands at more places', () => {
    const merged = changeBead(FIVE_TO_ONE, 's3', { type: 'S1' })
    const [before, after] = [placed(FIVE_TO_ONE, 'S1–S2'), placed(merged, 'S1–S2')]
    expect(makeUpChange(acrylate, before, after)).toBe('Bead S3 (C2H5) is new in it.')
  })

  it('do not fit where nobody knows what they were measured on', () => {
    const lost = { document: THREE_TO_ONE, places: [[{ bead: 'gone', unit: 0 }]] }
    expect(termMakeUp(lost)).toBeNull()
    expect(makeUpChange(acrylate, lost, placed(THREE_TO_ONE, 'B–E'))).not.toBeNull()
  })
})
