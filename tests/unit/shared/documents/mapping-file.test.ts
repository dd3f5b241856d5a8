import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { parseRepeatUnit } from '@shared/chemistry'
import { mappingDocumentSchema } from '@shared/contracts/mapping'
import { importMappingFile, type MappingImport, readMappingFile, writeMappingFile } from '@shared/documents'
import {
  beadMass,
  deriveTerms,
  type MappingDocument,
  multiplicity,
  setPooling,
  setTermUse,
  suggestMappings,
  usedTerms,
} from '@shared/mapping'
import { bead, HEXYL_ACRYLATE, mapping, THREE_TO_ONE } from '../mapping/hexyl-acrylate'
import { POLYMERS } from '../mapping/polymers'

const acrylate = await parseRepeatUnit(HEXYL_ACRYLATE)

/** Writes a mapping of one SMILES and takes it over to another. */
async function across(document: MappingDocument, from: string, to: string): Promise<MappingImport> {
  const reading = readMappingFile(writeMappingFile(await parseRepeatUnit(from), document, 'any'))
  if (!reading.ok) throw new Error(JSON.stringify(reading.errors))
  return importMappingFile(reading.file, await parseRepeatUnit(to))
}

function imported(result: MappingImport): Extract<MappingImport, { ok: true }> {
  if (!result.ok) throw new Error(JSON.stringify(result.errors))
  return result
}

/** Terms with their multiplicity and use, and beads with their masses: what must survive a journey. */
function essence({ unit, document }: Extract<MappingImport, { ok: true }>): string[] {
  const terms = deriveTerms(unit, document)
  const used = usedTerms(document, terms)
  return [
    ...terms.map((term) => `${term.name} ${multiplicity(term)} ${used.includes(term)}`),
    ...document.beads.map((one) => `${one.name} ${one.type} ${beadMass(unit, one)}`),
  ]
}

/** Codes and paths of what is wrong with a file. */
async function errorsOf(text: string, target?: string): Promise<string[]> {
  const reading = readMappingFile(text)
  if (!reading.ok) return reading.errors.map(({ code, path }) => `${code} ${path}`)
  const result = await importMappingFile(
    reading.file,
    target === undefined ? undefined : await parseRepeatUnit(target),
  )
  return result.ok ? [] : result.errors.map(({ code, path }) => `${code} ${path}`)
}

describe('a mapping file', () => {
  it('brings back what was written, atoms named by the order of the SMILES', async () => {
    const decided = setTermUse(
      setPooling(
        mapping(
          bead('B', [0, 1], { id: 'b1', endGroup: 'starts with an initiator' }),
          bead('E', [], { id: 'b2', site: { rule: 'atom', atom: 3 }, atoms: [2, 3, 4].map(half) }),
          bead('H', [5, 6, 7, 8, 9, 10], { id: 'b3', label: 'hexyl', colour: 5, site: { rule: 'geometry' } }),
          bead('F', [], { id: 'b4', atoms: [2, 3, 4].map(half) }),
        ),
        ['B', 'B', 'E'],
        'pooled',
        'they agree',
      ),
      { types: ['B', 'B', 'B', 'E'], placeKey: '' },
      'left out',
      'turns with the backbone',
    )
    const text = writeMappingFile(acrylate, decided, '3-to-1')
    // '*CC(*)C(=O)…': the two * are 0 and 3.
    expect((JSON.parse(text) as { beads: { atoms: unknown[] }[] }).beads[1].atoms[0]).toEqual({
      atom: 4,
      weight: 0.5,
      offset: 0,
    })
    const reading = readMappingFile(`\uFEFF${text}`)
    if (!reading.ok) throw new Error('the file was refused')
    const back = imported(await importMappingFile(reading.file))
    expect(back).toMatchObject({ name: '3-to-1', matched: false, notes: [] })
    expect(back.document).toEqual(decided)
    expect(mappingDocumentSchema.parse(back.document)).toEqual(back.document)
    expect(writeMappingFile(back.unit, back.document, '3-to-1')).toBe(text)
  })

  it('fills in what may be left out', async () => {
    const reading = readMappingFile(
      JSON.stringify({
        format: 'beadwright mapping',
        version: 1,
        smiles: '*CCO*',
        beads: [{ name: 'A', type: 'A', atoms: [{ atom: 1 }, { atom: 2 }, { atom: 3 }] }],
      }),
    )
    if (!reading.ok) throw new Error('the file was refused')
    expect(imported(await importMappingFile(reading.file)).document).toEqual(
      mapping(bead('A', [0, 1, 2], { id: 'b1' })),
    )
  })

  it.each([
    ['in another order', HEXYL_ACRYLATE, 'CCCCCCOC(=O)C(*)C*'],
    ['from the other end', HEXYL_ACRYLATE, '*C(C(=O)OCCCCCC)C*'],
    ['parted at another bond', POLYMERS['polyamide 6'], '*C(=O)CCCCCN*'],
    ['parted at another bond and from the other end', POLYMERS['poly(lactic acid)'], '*C(=O)C(C)O*'],
    [
      'parted inside the carbonate',
      POLYMERS['bisphenol A polycarbonate'],
      '*C(=O)Oc1ccc(cc1)C(C)(C)c1ccc(cc1)O*',
    ],
  ])('is taken over to the same chain written %s, with the same terms and masses', async (_, from, to) => {
    const unit = await parseRepeatUnit(from)
    for (const { document } of suggestMappings(unit)) {
      const whole = deriveTerms(unit, document).find(({ placeClasses }) => new Set(placeClasses).size > 1)
      let decided = whole ? setPooling(document, whole.types, 'split') : document
      const part = deriveTerms(unit, decided).find(({ placeKey }) => placeKey !== '')
      if (part) decided = setTermUse(decided, part, 'left out', 'for the journey')
      const result = imported(await across(decided, from, to))
      expect(result).toMatchObject({ matched: true, notes: [expect.stringContaining('same chain')] })
      const own = { ok: true, name: '', unit, document: decided, matched: false, notes: [] } as const
      expect(essence(result)).toEqual(essence(own))
      expect(mappingDocumentSchema.parse(result.document)).toEqual(result.document)
    }
  })

  it('is refused for another chain with a sentence', async () => {
    const result = await across(THREE_TO_ONE, HEXYL_ACRYLATE, POLYMERS.polystyrene)
    expect(result).toMatchObject({ ok: false, errors: [{ code: 'CHAIN_DIFFERS', path: 'smiles' }] })
    expect(JSON.stringify(result)).toContain('its unit is C9H16O2, this one is C8H8')
  })

  it('is refused where a bead would reach too far', async () => {
    const long = bead('A', [], {
      atoms: [-1, 0, 1]
        .map((unit) => ({ atom: 0, weight: 1 / 3, unit }))
        .concat([{ atom: 6, weight: 1, unit: 1 }]),
    })
    const result = await across(mapping(long), '*NC(=O)CCCCC*', '*CCNC(=O)CCC*')
    expect(result).toMatchObject({ ok: false, errors: [{ code: 'BEAD_TOO_LONG', path: 'beads[0]' }] })
  })
})

describe('errors of a mapping file', () => {
  const good = JSON.parse(writeMappingFile(acrylate, THREE_TO_ONE, 'good')) as Record<string, unknown>
  const beads = good.beads as Record<string, unknown>[]
  const withBead = (index: number, change: Record<string, unknown>): string =>
    JSON.stringify({ ...good, beads: beads.map((one, at) => (at === index ? { ...one, ...change } : one)) })
  const place = [
    { bead: 'B', unit: 0 },
    { bead: 'X', unit: 0 },
  ]

  it.each([
    ['{', ['FILE_NOT_JSON ']],
    ['[]', ['FILE_FORMAT_UNKNOWN format']],
    ['null', ['FILE_FORMAT_UNKNOWN format']],
    [JSON.stringify({ ...good, format: 'other' }), ['FILE_FORMAT_UNKNOWN format']],
    [JSON.stringify({ ...good, version: 2 }), ['FILE_VERSION_UNKNOWN version']],
    [JSON.stringify({ ...good, beads: undefined }), ['FIELD_MISSING beads']],
    [JSON.stringify({ ...good, smiles: '*CC(*' }), ['SMILES_UNPARSABLE smiles']],
    [JSON.stringify({ ...good, smiles: '*CC' }), ['ATTACHMENT_COUNT smiles']],
    [withBead(1, { type: 'a b' }), ['FIELD_INVALID beads[1].type']],
    [withBead(1, { lable: 'x' }), ['FIELD_UNKNOWN beads[1].lable']],
    [withBead(2, { atoms: [{ atom: 13 }] }), ['ATOM_UNKNOWN beads[2].atoms[0].atom']],
    [withBead(2, { atoms: [{ atom: 7 }, { atom: 3 }] }), ['ATOM_IS_ATTACHMENT beads[2].atoms[1].atom']],
    [withBead(2, { atoms: [{ atom: 7 }, { atom: 7 }] }), ['ATOM_TWICE beads[2].atoms[1].atom']],
    [withBead(2, { atoms: [{ atom: 7, weight: 0 }] }), ['FIELD_INVALID beads[2].atoms[0].weight']],
    [withBead(2, { atoms: [{ weight: 1 }] }), ['FIELD_MISSING beads[2].atoms[0].atom']],
    [withBead(2, { atoms: [{ atom: 7, offset: 2 }] }), ['FIELD_INVALID beads[2].atoms[0].offset']],
    [withBead(0, { site: { rule: 'atom', atom: 40 } }), ['ATOM_UNKNOWN beads[0].site.atom']],
    [
      JSON.stringify({ ...good, termChoices: [{ types: ['B', 'E'], place, use: 'left out' }] }),
      ['PLACE_UNKNOWN termChoices[0].place'],
    ],
  ])('are named with their place: %#', async (text, errors) => {
    expect(await errorsOf(text)).toEqual(errors)
  })

  it('are all named at once', async () => {
    const text = withBead(0, { name: '', colour: 9 })
    expect(await errorsOf(text)).toEqual(['FIELD_INVALID beads[0].name', 'FIELD_INVALID beads[0].colour'])
  })

  it('never come as anything else, whatever JSON is read', () => {
    fc.assert(
      fc.property(fc.json(), (text) => {
        const reading = readMappingFile(text)
        expect(reading.ok).toBe(false)
      }),
    )
  })
})

function half(atom: number) {
  return { atom, weight: 0.5, unit: 0 }
}
