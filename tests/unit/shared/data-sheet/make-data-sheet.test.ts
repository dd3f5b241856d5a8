import { describe, expect, it } from 'vitest'
import { dataSheetSchema } from '@shared/contracts/data-sheet'
import { makeDataSheet } from '@shared/data-sheet'
import { DEFAULT_INVERSION_SETTINGS } from '@shared/inversion'
import { jointCase } from '../../../support/joint-histograms'
import { buildSheetSource } from '../../../support/data-sheet-builder'
import { DOCUMENT, SMILES } from '../../../support/job-builder'

const built = (options: Partial<Parameters<typeof buildSheetSource>[0]> = {}) =>
  buildSheetSource({ smiles: SMILES, document: DOCUMENT, ...options })

const textOf = (lines: readonly { title: string; text: string }[]): string =>
  lines.map(({ title, text }) => `${title}: ${text}`).join('\n')

const coupled = jointCase(
  {
    kinds: ['bond', 'angle'],
    xEdges: Array.from({ length: 21 }, (_, edge) => 0.2 + 0.01 * edge),
    yEdges: Array.from({ length: 21 }, (_, edge) => 1.2 + 0.08 * edge),
    energy: (x, y) => ((x - 0.3) / 0.03) ** 2 / 2 + ((y - 2) / 0.25 - (x - 0.3) / 0.03) ** 2 / 2,
  },
  20_000,
  7,
)

describe('a data sheet', () => {
  it('is read back as it was written', async () => {
    const sheet = makeDataSheet(await built())
    expect(dataSheetSchema.parse(JSON.parse(JSON.stringify(sheet)))).toEqual(sheet)
  })

  it('lists every table with domain, rows, lowest place, size and checksum', async () => {
    const source = await built()
    const { tables } = makeDataSheet(source)
    expect(tables.map(({ name, sha256 }) => [name, sha256])).toEqual(
      source.tables.map(({ name, sha256 }) => [name, sha256]),
    )
    const bond = tables.find(({ name }) => name === 'A–A')!
    expect(bond.domain[0]).toMatch(/^0\.\d{3}–0\.\d{3}\u00a0nm$/)
    expect(bond.rows).toBe(`${DEFAULT_INVERSION_SETTINGS.table.rows} rows`)
    expect(bond.lowest).toMatch(/^0\.\d{3}\u00a0nm$/)
    expect(tables.find(({ kinds }) => kinds[0] === 'dihedral')?.domain).toEqual(['−180 to 180°'])
  })

  it('gives masses of the beads and of the unit', async () => {
    const { beads } = makeDataSheet(await built())
    expect(beads.rows.map(({ formula, mass }) => [formula, mass])).toEqual([
      ['C2H3', '27.046'],
      ['C6H5', '77.106'],
    ])
    expect(beads.unit.mass).toBe('104.152')
  })

  it('writes forms with the ½ and parameters with their 95 % intervals, in the units of the files', async () => {
    const { forms } = makeDataSheet(
      await built({ settingsOf: ({ name }) => (name === 'A–A' ? { form: 'harmonic' } : {}) }),
    )
    expect(forms.map(({ title }) => title)).toEqual(['A–A'])
    expect(forms[0].text).toMatch(
      /^U = ½ k \(r − r0\)²?.*k\u00a0=\u00a0\(\d+(\u00a0\d{3})?\u00a0±\u00a0\d+\)\u00a0kJ\/mol\/nm²/,
    )
  })

  it('says what to know before running: angles made level, caps, a joint potential', async () => {
    const table = { ...DEFAULT_INVERSION_SETTINGS.table, cap: 60 }
    const source = await built({
      joint: { names: ['A–A', 'A–A–A'], histogram: coupled },
      settingsOf: ({ name }) => (name === 'A–A–B' ? { straightAngle: 'level', table } : {}),
    })
    const text = textOf(makeDataSheet(source).beforeYouRun)
    expect(text).toContain('Straight angle: The slope of A–A–B vanishes at 180°.')
    expect(text).toContain('Cap: Energies of A–A–B level off at 60 kJ/mol')
    expect(text).toContain('A–A with A–A–A')
    expect(text).not.toContain('State point')
  })

  it('draws a joint table as two maps and a single one as curves', async () => {
    const { tables } = makeDataSheet(await built({ joint: { names: ['A–A', 'A–A–A'], histogram: coupled } }))
    const joint = tables.find(({ kinds }) => kinds.length === 2)!
    expect(joint.curve).toBeNull()
    expect(joint.map!.energies).toHaveLength(joint.map!.columns * joint.map!.rows)
    expect(Math.min(...joint.map!.energies)).toBeLessThan(0.2)
    expect(tables.filter(({ kinds }) => kinds.length === 1).every(({ map, curve }) => !map && curve)).toBe(
      true,
    )
  })

  it('shows densities that sum to one over the whole turn, and a band only with a sample size', async () => {
    const source = await built()
    const { curve } = makeDataSheet(source).tables.find(({ kinds }) => kinds[0] === 'dihedral')!
    const sumOf = (values: readonly number[]): number =>
      values.reduce((sum, value, bin) => sum + value * (curve!.edges[bin + 1] - curve!.edges[bin]), 0)
    expect(sumOf(curve!.measured)).toBeCloseTo(1, 3)
    expect(sumOf(curve!.regenerated)).toBeCloseTo(1, 3)
    expect(curve!.band).not.toBeNull()
    const stated = await built({
      histogramOf: ({ kind }) => {
        const single = source.tables.find(({ kinds }) => kinds[0] === kind)!.single!
        const { edges, weights } = single.inversion.bins
        const total = weights.reduce((sum, weight) => sum + weight, 0)
        const shares = weights.map((weight) => weight / total)
        return { kind, edges, weights: shares, content: 'probability', independentSamples: null }
      },
    })
    const unstated = makeDataSheet(stated)
    expect(unstated.tables.every((table) => table.curve!.band === null)).toBe(true)
    expect(unstated.tables[0].caption).toContain('sample size not stated')
    expect(textOf(unstated.methods)).toContain('without smoothing')
  })

  it('names what was pooled, left out, kept apart and coupled', async () => {
    const reason = 'Both ends look alike'
    const leftOut = ['A–A–A–A']
    const document = {
      ...DOCUMENT,
      poolings: [{ types: ['A', 'A', 'B'], choice: 'pooled' as const, reason }],
    }
    const verdict = { mutualInformation: 0.3, mutualInformationCorrected: 0.29, nullMean: 0.01 }
    const numbers = { ...verdict, verdict: 'joint' as const, pValue: 0.0005, independentSamples: 20_000 }
    const decision = {
      choice: 'separate' as const,
      reason: 'Seldom met',
      by: 'M',
      at: '2026-06-01T00:00:00Z',
    }
    const sheet = makeDataSheet(
      await built({ document, leftOut, pairs: [{ name: 'A–A, A–A–A', numbers, decision, apart: null }] }),
    )
    const carry = textOf(sheet.carry)
    expect(carry).toContain(reason)
    expect(carry).toContain('A–A, A–A–A: a joint potential is advised, but the tables are single')
    expect(sheet.leftOut).toMatchObject([{ name: 'A–A–A–A', reason: 'Flat within 0.14 kT.' }])
    expect(sheet.verdicts).toEqual([
      {
        name: 'A–A, A–A–A',
        verdict: 'joint potential advised',
        information: '0.290',
        pValue: '< 0.001',
        samples: '20\u00a0000',
        decision: 'Two single tables. Seldom met. (M, 1 June 2026)',
      },
    ])
  })

  it('shows each warning with the answer on record', async () => {
    const answer = { reason: 'We looked', by: 'Milo', at: '2026-06-01T00:00:00Z' }
    const warningsOf = (name: string) => (name === 'A–A' ? [{ message: 'Few samples.', answer }] : [])
    expect(makeDataSheet(await built({ warningsOf })).warnings).toEqual([
      { about: 'A–A', message: 'Few samples.', answer: 'Kept: We looked. (Milo, 1 June 2026)' },
    ])
  })

  it('cites works in the order in which its methods name them, each once', async () => {
    const { methods, references } = makeDataSheet(await built())
    const cited = [...textOf(methods).matchAll(/\[([\d, ]+)\]/g)].flatMap(([, marks]) => marks.split(', '))
    expect([...new Set(cited)].map(Number)).toEqual(references.map((_, index) => index + 1))
    expect(new Set(references).size).toBe(references.length)
  })
})
