import { describe, expect, it } from 'vitest'
import type { MappingJson } from '../../../../server/cli/mapping-json'
import { parseRepeatUnit } from '@shared/chemistry'
import { writeMappingFile } from '@shared/documents'
import { type MappingDocument, setPooling, setTermUse } from '@shared/mapping'
import { runCommand, withTextFile } from '../../../support/run-command'
import { bead, HEXYL_ACRYLATE, mapping, THREE_TO_ONE } from '../../shared/mapping/hexyl-acrylate'

const acrylate = await parseRepeatUnit(HEXYL_ACRYLATE)
const described = (text: string, ...words: string[]) =>
  withTextFile(text, (path) => runCommand('mapping', path, ...words))
const fileOf = (document: MappingDocument): string => writeMappingFile(acrylate, document, '3-to-1')

async function jsonOf(document: MappingDocument): Promise<MappingJson> {
  const { status, printed } = await described(fileOf(document), '--json')
  expect(status).toBe(0)
  return JSON.parse(printed) as MappingJson
}

describe('beadwright mapping', () => {
  it('prints beads with formula and mass, terms with their multiplicity, flags and groups', async () => {
    const json = await jsonOf(THREE_TO_ONE)
    expect(json).toMatchObject({ name: '3-to-1', smiles: HEXYL_ACRYLATE, formula: 'C9H16O2', mass: 156.225 })
    expect(json.beads.map(({ name, formula, mass }) => [name, formula, mass])).toEqual([
      ['B', 'C2H3', 27.046],
      ['E', 'CO2', 44.009],
      ['H', 'C6H13', 85.17],
    ])
    expect(
      json.terms.map(({ name, multiplicity, flagged }) => `${name} ${multiplicity}${flagged ? ' !' : ''}`),
    ).toEqual([
      'B–B 1',
      'B–E 1',
      'E–H 1',
      'B–B–B 1',
      'B–B–E 2 !',
      'B–E–H 1',
      'B–B–B–B 1',
      'B–B–B–E 2 !',
      'E–B–B–E 1',
      'B–B–E–H 2 !',
    ])
    expect(json.flags.map(({ name, choice }) => [name, choice])).toEqual([
      ['B–B–E', null],
      ['B–B–B–E', null],
      ['B–B–E–H', null],
    ])
    expect(json.groups.map(({ centre, places, degrees }) => [centre, places, degrees])).toEqual([
      ['B', 3, 3],
      ['B–B', 4, 1],
      ['B–E', 2, 1],
    ])
    expect(json.numbers).toMatchObject({ degreesKept: 9, degreesBefore: 81, reduction: 9 })
    expect(json.problems).toEqual([])
  })

  it('respects what the file decides about terms', async () => {
    const split = setPooling(THREE_TO_ONE, ['B', 'B', 'E'], 'split')
    const document = setTermUse(split, { types: ['E', 'B', 'B', 'E'], placeKey: '' }, 'left out', 'why')
    const { terms } = await jsonOf(document)
    expect(terms.map(({ name }) => name)).toContain('B–B–E (2)')
    expect(terms.filter(({ use }) => use === 'left out').map(({ name }) => name)).toEqual(['E–B–B–E'])
  })

  it('prints a report for people without --json', async () => {
    const { status, printed } = await described(fileOf(THREE_TO_ONE))
    expect(status).toBe(0)
    expect(printed).toMatch(/^3-to-1: .*156\.225 g\/mol$/m)
    expect(printed).toMatch(/^ {2}H +H +C6H13 +85\.170 +mass +C4 C5 C6 C7 C8 C9$/m)
    expect(printed).toMatch(/^ {2}dihedral +B–B–B–E +2 +used +pools places that differ$/m)
    expect(printed).toContain('Use B–B–B–B about B–B and leave out B–B–B–E and E–B–B–E')
    expect(printed).not.toContain('problems')
  })

  it('names problems of the mapping without refusing it', async () => {
    const loose = mapping(...THREE_TO_ONE.beads.slice(0, 2), bead('H', [5, 6]))
    const { status, printed } = await described(fileOf(loose))
    expect(status).toBe(0)
    expect(printed).toContain('problem ATOM_IN_NO_BEAD')
  })

  it('names every error with its place and exits with status 2', async () => {
    const file = JSON.parse(fileOf(THREE_TO_ONE)) as { beads: { name: string; type: string }[] }
    file.beads[0].name = ''
    file.beads[2].type = 'not a type'
    const { status, printed, notes } = await described(JSON.stringify(file))
    expect(status).toBe(2)
    expect(printed).toBe('')
    expect(notes).toMatch(/input\.txt: beads\[0\]\.name: .*\(FIELD_INVALID\)/)
    expect(notes).toMatch(/input\.txt: beads\[2\]\.type: .*\(FIELD_INVALID\)/)
  })

  it.each([
    ['1 2\n3 4\n', 'FILE_NOT_JSON'],
    [fileOf(THREE_TO_ONE).replace(HEXYL_ACRYLATE, '*CC(*'), 'smiles: .*SMILES_UNPARSABLE'],
    [
      fileOf(THREE_TO_ONE).replace('"atom": 12', '"atom": 13'),
      'beads\\[2\\]\\.atoms\\[5\\]\\.atom: .*ATOM_UNKNOWN',
    ],
  ])('refuses a file that cannot be a mapping: %#', async (text, error) => {
    const { status, notes } = await described(text)
    expect(status).toBe(2)
    expect(notes).toMatch(new RegExp(error))
  })

  it('names a file that is not there', async () => {
    const { status, notes } = await runCommand('mapping', '/no/such/file.json')
    expect(status).toBe(2)
    expect(notes).toContain('there is no such file')
  })
})
