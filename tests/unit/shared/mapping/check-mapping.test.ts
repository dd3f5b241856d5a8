import { expect, it } from 'vitest'
import { parseRepeatUnit } from '@shared/chemistry'
import { checkMapping, type MappingDocument } from '@shared/mapping'
import { bead, FIVE_TO_ONE, HEXYL_ACRYLATE, mapping, THREE_TO_ONE } from './hexyl-acrylate'

const acrylate = await parseRepeatUnit(HEXYL_ACRYLATE)
const [backbone, ester, hexyl] = THREE_TO_ONE.beads

function codes(document: MappingDocument, unit = acrylate): string[] {
  return checkMapping(unit, document).map(({ code }) => code)
}

it('finds nothing to say about the two sound mappings', () => {
  expect(checkMapping(acrylate, THREE_TO_ONE)).toEqual([])
  expect(checkMapping(acrylate, FIVE_TO_ONE)).toEqual([])
})

it('names an atom in no bead with the mass that would be missing', () => {
  const [problem] = checkMapping(acrylate, mapping(backbone, ester, bead('H', [5, 6, 7, 8, 9])))
  expect(problem).toMatchObject({ code: 'ATOM_IN_NO_BEAD', atoms: [10], title: 'C9 is in no bead' })
  expect(problem.detail).toContain('15.035 g/mol')
})

it('sees a bead in two pieces, and that a bond to the next unit holds a bead together', () => {
  expect(codes(mapping(backbone, bead('E', [2, 3, 4, 10]), bead('H', [5, 6, 7, 8, 9])))).toEqual([
    'BEAD_IN_PIECES',
  ])
  const across = bead('B', [], {
    atoms: [
      { atom: 1, weight: 1, unit: -1 },
      { atom: 0, weight: 1, unit: 0 },
    ],
  })
  expect(codes(mapping(across, ester, hexyl))).toEqual([])
  const torn = { ...across, atoms: across.atoms.map((atom) => ({ ...atom, unit: -atom.unit })) }
  expect(codes(mapping(torn, ester, hexyl))).toEqual(['BEAD_IN_PIECES'])
})

it('asks that the shares of an atom sum to 1', () => {
  const shared = (weight: number): MappingDocument =>
    mapping(
      backbone,
      bead('E', [], {
        atoms: [...ester.atoms.slice(0, 2), { atom: 4, weight: 0.5, unit: 0 }],
      }),
      bead('H', [], { atoms: [{ atom: 4, weight, unit: 0 }, ...hexyl.atoms] }),
    )
  expect(codes(shared(0.5))).toEqual([])
  expect(codes(shared(1))).toEqual(['ATOM_SHARES'])
})

it('sees names given twice', () => {
  expect(codes(mapping(backbone, ester, { ...hexyl, name: 'E' }))).toEqual(['BEAD_NAME_TWICE'])
})

it('sees a type that stands for two compositions, and lets equal ones share a type', () => {
  expect(codes(mapping(backbone, ester, { ...hexyl, type: 'E' }))).toEqual(['TYPE_COMPOSITION'])
  const [b, e, ...side] = FIVE_TO_ONE.beads
  expect(codes(mapping(b, e, { ...side[0], type: 'S' }, { ...side[1], type: 'S' }, side[2]))).toEqual([])
})

it('sees empty beads and sites outside their bead', () => {
  expect(codes(mapping(backbone, ester, hexyl, bead('X', [])))).toEqual(['BEAD_EMPTY'])
  expect(codes(mapping({ ...backbone, site: { rule: 'atom', atom: 5 } }, ester, hexyl))).toEqual([
    'SITE_OUTSIDE',
  ])
})

it('notes a ring that no bead holds whole', async () => {
  const unit = await parseRepeatUnit('*CC(*)c1ccccc1')
  const whole = mapping(bead('B', [0, 1]), bead('P', [2, 3, 4, 5, 6, 7]))
  const cut = mapping(bead('B', [0, 1]), bead('P', [2, 3, 7]), bead('Q', [4, 5, 6]))
  expect(codes(whole, unit)).toEqual([])
  expect(checkMapping(unit, cut)).toMatchObject([{ code: 'RING_CUT', severity: 'note', beads: ['p', 'q'] }])
})

it('says nothing but the unknown atoms when a mapping names some', () => {
  expect(codes(mapping(bead('B', [0, 99])))).toEqual(['ATOM_UNKNOWN'])
})
