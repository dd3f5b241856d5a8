import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { backboneAtoms, parseRepeatUnit, type RepeatUnit } from '@shared/chemistry'
import { mappingDocumentSchema } from '@shared/contracts/mapping'
import {
  checkMapping,
  LONE_ATOM_COST,
  type MappingSuggestion,
  MOST_SUGGESTED_BEADS,
  PLAIN_CUT_COST,
  rotatableBonds,
  suggestMappings,
} from '@shared/mapping'
import { POLYMERS } from './polymers'

const suggestionsFor = async (smiles: string) => suggestMappings(await parseRepeatUnit(smiles))

/** Beads as names with the atoms they hold; + marks an atom of the next unit. */
async function beadsOf(smiles: string, count: number): Promise<string> {
  const unit = await parseRepeatUnit(smiles)
  const found = suggestMappings(unit).find(({ beads }) => beads === count)
  const text = (atom: number, offset: number): string => unit.atoms[atom].label + (offset === 1 ? '+' : '')
  return (found?.document.beads ?? [])
    .map(({ name, atoms }) => `${name} ${atoms.map((held) => text(held.atom, held.unit)).join('')}`)
    .join(' | ')
}

/** Pieces that repeat units are made of here: chains, branches, rings, functional groups, in either direction. */
const PIECES = [
  'C',
  'CC',
  'C(C)',
  'C(CCC)',
  'C(C(=O)OCC)',
  'C(c1ccccc1)',
  'O',
  'C(=O)O',
  'OC(=O)',
  'NC(=O)',
  'OC(=O)O',
  'c1ccc(cc1)',
  'C1CCC(CC1)',
  'c1ccc2cc(ccc2c1)',
  '[Si](C)(C)O',
  'S(=O)(=O)',
  'C=C',
]
const repeatUnits = fc
  .array(fc.constantFrom(...PIECES), { minLength: 1, maxLength: 6 })
  .map((pieces) => `*${pieces.join('')}*`)

describe('suggested mappings', () => {
  it.each([
    ['poly(n-hexyl acrylate)', 3, 'B C1C2 | E C3O1O2 | S C4C5C6C7C8C9'],
    ['poly(n-hexyl acrylate)', 5, 'B C1C2 | E C3O1O2 | S1 C4C5 | S2 C6C7 | S3 C8C9'],
    ['poly(methyl methacrylate)', 2, 'B C1C2C3 | E C4O1O2C5'],
    ['poly(ethylene terephthalate)', 4, 'E1 O1C1O2 | R C2C3C4C5C6C7 | E2 C8O3O4 | B C9C10'],
    ['bisphenol A polycarbonate', 4, 'R1 C1C2C3C4C5C6 | B C7C8C9 | R2 C10C11C12C13C14C15 | K C16O2O3O1+'],
    ['polyamide 6', 2, 'A N1C1O1 | B C2C3C4C5C6'],
    ['polyamide 6,6', 4, 'A1 N1C1O1 | B1 C2C3C4C5 | A2 C6O2N2 | B2 C7C8C9C10C11C12'],
    ['polystyrene', 2, 'B C1C2 | R C3C4C5C6C7C8'],
    ['poly(dimethyl siloxane)', 1, 'A Si1C1C2O1'],
    ['poly(3-hexylthiophene)', 2, 'R C1C2C3C10S1 | S C4C5C6C7C8C9'],
    ['poly(vinyl acetate)', 2, 'B C1C2 | E O1C3C4O2'],
    ['poly(lactic acid)', 1, 'A C1C2C3O2O1+'],
  ] as const)('of %s with %i beads are what a modeller draws', async (name, count, beads) => {
    const sorted = (text: string): string =>
      text
        .split(' | ')
        .map((bead) =>
          bead.replace(/ .*/, (atoms) => ` ${(atoms.match(/[A-Z][a-z]?\d+\+?/g) ?? []).sort().join('')}`),
        )
        .join(' | ')
    expect(sorted(await beadsOf(POLYMERS[name], count))).toBe(sorted(beads))
  })

  it('give beads that a symmetry of the chain exchanges one type, and others types of their own', async () => {
    const types = async (smiles: string, count: number) =>
      (await suggestionsFor(smiles))
        .find(({ beads }) => beads === count)
        ?.document.beads.map(({ type }) => type)
    expect(await types(POLYMERS['poly(ethylene terephthalate)'], 4)).toEqual(['E', 'R', 'E', 'B'])
    expect(await types(POLYMERS['polyamide 6,6'], 4)).toEqual(['A', 'B1', 'A', 'B2'])
    expect(await types(POLYMERS['poly(n-hexyl acrylate)'], 5)).toEqual(['B', 'E', 'S1', 'S2', 'S3'])
  })

  it('say why: where they cut, what stays whole, what the beads weigh, what crosses the border', async () => {
    const reason = (suggestions: readonly MappingSuggestion[], count: number) =>
      suggestions.find(({ beads }) => beads === count)?.reason
    expect(reason(await suggestionsFor(POLYMERS['poly(n-hexyl acrylate)']), 3)).toBe(
      'Cut at C2–C3 and O2–C4, which can turn. Kept whole: ester. Beads weigh 27 to 85 g/mol.',
    )
    expect(reason(await suggestionsFor(POLYMERS['bisphenol A polycarbonate']), 4)).toContain(
      'K reaches into the next unit',
    )
    expect(reason(await suggestionsFor(POLYMERS['poly(ethylene oxide)']), 2)).toContain(
      'B holds a single heavy atom',
    )
  })

  it('hold every atom once, in one piece, and never cut a ring', async () => {
    const everySmiles = fc.oneof(repeatUnits, fc.constantFrom(...Object.values(POLYMERS)))
    await fc.assert(
      fc.asyncProperty(everySmiles, async (smiles) => {
        const unit = await parseRepeatUnit(smiles)
        for (const { document, beads, masses } of suggestMappings(unit)) {
          expect(document.beads).toHaveLength(beads)
          const names = document.beads.map(({ name }) => name)
          expect(new Set(names).size).toBe(beads)
          expect(checkMapping(unit, document)).toEqual([])
          expect(mappingDocumentSchema.parse(document)).toEqual(document)
          const held = document.beads.flatMap(({ atoms }) => atoms.map(({ atom }) => atom))
          expect(held.toSorted((a, b) => a - b)).toEqual(unit.atoms.map(({ index }) => index))
          expect(masses.every((mass) => mass > 0)).toBe(true)
        }
      }),
      { numRuns: 60 },
    )
  }, 30_000)

  it('never part a functional group', async () => {
    await fc.assert(
      fc.asyncProperty(repeatUnits, async (smiles) => {
        const unit = await parseRepeatUnit(smiles)
        const carbonyls = unit.bonds
          .filter(({ from, to, order }) => order === 2 && elementsOf(unit, from, to) === 'C O')
          .map(({ from, to }) => (unit.atoms[from].element === 'C' ? from : to))
        const polar = unit.bonds.filter(
          ({ from, to }) =>
            (carbonyls.includes(from) || carbonyls.includes(to)) && elementsOf(unit, from, to) !== 'C C',
        )
        for (const { document } of suggestMappings(unit)) {
          const beadOf = (atom: number): number =>
            document.beads.findIndex(({ atoms }) => atoms.some((held) => held.atom === atom))
          for (const { from, to } of polar) expect(beadOf(from)).toBe(beadOf(to))
        }
      }),
      { numRuns: 40 },
    )
  }, 30_000)

  it('are the best of all cuts: none found by trying every one costs less', async () => {
    for (const smiles of ['*CC(*)C(=O)OCCC', '*CC(CC)CCO*', '*c1ccc(*)cc1CCC(C)CC']) {
      const unit = await parseRepeatUnit(smiles)
      const bonds = rotatableBonds(unit).filter((bond) => bond !== 'link')
      for (const suggestion of suggestMappings(unit)) {
        const least = Math.min(...subsets(bonds, suggestion.beads - 1).map((cuts) => costOf(unit, cuts)))
        expect(suggestion.objective).toBeCloseTo(least, 9)
      }
    }
  })

  it('are the same every time, and stop where a bead would be a lone hetero atom or a ring cut', async () => {
    expect(await suggestionsFor(POLYMERS['polyamide 6,6'])).toEqual(
      await suggestionsFor(POLYMERS['polyamide 6,6']),
    )
    const counts = async (smiles: string) => (await suggestionsFor(smiles)).map(({ beads }) => beads)
    expect(await counts(POLYMERS['poly(dimethyl siloxane)'])).toEqual([1])
    expect(await counts(POLYMERS['poly(ethylene oxide)'])).toEqual([1, 2])
    expect(await counts(`*${'C'.repeat(60)}*`)).toEqual(
      Array.from({ length: MOST_SUGGESTED_BEADS }, (_, index) => index + 1),
    )
  })
})

function elementsOf(unit: RepeatUnit, from: number, to: number): string {
  return [unit.atoms[from].element, unit.atoms[to].element].sort().join(' ')
}

/** Every choice of `size` items. */
function subsets(items: readonly number[], size: number): number[][] {
  if (size === 0) return [[]]
  return items.flatMap((item, index) =>
    subsets(items.slice(index + 1), size - 1).map((rest) => [item, ...rest]),
  )
}

/** The objective of a set of cuts, as its description says, by another way: colouring the atoms. */
function costOf(unit: RepeatUnit, cuts: readonly number[]): number {
  const colours = unit.atoms.map(({ index }) => index)
  unit.bonds.forEach(({ from, to }, bond) => {
    if (cuts.includes(bond)) return
    const [kept, gone] = [colours[from], colours[to]]
    colours.forEach((colour, atom) => (colours[atom] = colour === gone ? kept : colour))
  })
  const beads = [...new Set(colours)].map((colour) =>
    unit.atoms.filter(({ index }) => colours[index] === colour),
  )
  const mean = unit.mass / beads.length
  const backbone = backboneAtoms(unit)
  const isPlain = (atom: number): boolean =>
    unit.atoms[atom].element === 'C' &&
    !unit.atoms[atom].ring &&
    !unit.bonds.some(({ from, to, order }) => order === 2 && (from === atom || to === atom))
  const plain = cuts.filter((bond) => {
    const { from, to } = unit.bonds[bond]
    return isPlain(from) && isPlain(to) && backbone.includes(from) === backbone.includes(to)
  })
  const imbalance = beads.reduce((sum, atoms) => {
    const mass = atoms.reduce((total, atom) => total + atom.mass, 0)
    const lone = atoms.length > 1 ? 0 : atoms[0].element === 'C' ? LONE_ATOM_COST : Infinity
    return sum + ((mass - mean) / mean) ** 2 + lone
  }, 0)
  return imbalance + PLAIN_CUT_COST * plain.length
}
