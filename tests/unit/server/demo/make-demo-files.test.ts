import { beforeAll, describe, expect, it } from 'vitest'
import { parseRepeatUnit } from '@shared/chemistry'
import { correlate } from '@shared/correlation'
import { readHistogram, readJointHistogram } from '@shared/intake'
import { checkMapping, deriveTerms } from '@shared/mapping'
import {
  DEMO_POLYMER,
  FIVE_TO_ONE,
  THREE_TO_ONE,
  type DemoMapping,
} from '../../../../server/demo/demo-mappings'
import {
  COUPLED_PAIR,
  FIVE_TO_ONE_PAIRS,
  findTerm,
  makeDemoFiles,
  SEPARABLE_PAIR,
  type DemoFiles,
  type DemoRequest,
} from '../../../../server/demo/make-demo-files'

let requests: DemoRequest[]
let files: DemoFiles[]

beforeAll(async () => {
  const unit = await parseRepeatUnit(DEMO_POLYMER.smiles)
  const request = (mapping: DemoMapping, pairs: DemoRequest['pairs']): DemoRequest => ({
    mapping,
    terms: deriveTerms(unit, mapping.document),
    pairs,
  })
  requests = [request(THREE_TO_ONE, [COUPLED_PAIR, SEPARABLE_PAIR]), request(FIVE_TO_ONE, FIVE_TO_ONE_PAIRS)]
  files = makeDemoFiles(requests, 400)
})

describe('the mappings of the demonstration', () => {
  it('cover every atom of the repeat unit without a problem', async () => {
    const unit = await parseRepeatUnit(DEMO_POLYMER.smiles)
    for (const { document } of [THREE_TO_ONE, FIVE_TO_ONE]) {
      expect(checkMapping(unit, document)).toEqual([])
      const atoms = document.beads.flatMap(({ atoms }) => atoms.map(({ atom }) => atom))
      expect(atoms.toSorted((a, b) => a - b)).toEqual(unit.atoms.map(({ index }) => index))
    }
  })
})

describe('makeDemoFiles', () => {
  it('writes a file for every term that the intake reads back to the counts written', () => {
    requests.forEach(({ terms }, at) => {
      expect(files[at].distributions).toHaveLength(terms.length)
      files[at].distributions.forEach(({ text, settings }, index) => {
        const { histogram } = readHistogram(text, settings)
        const written = text.split('\n').filter((line) => line !== '' && !line.startsWith('#'))
        const counts = written.map((line) => Number(line.split(' ')[1]))
        expect(histogram.kind).toBe(terms[index].kind)
        expect([...histogram.weights]).toEqual(counts)
      })
    })
  })

  it('marks every file as invented in its first line', () => {
    const all = files.flatMap(({ distributions, joints }) => [...distributions, ...joints])
    expect(all.length).toBeGreaterThan(20)
    for (const { text } of all) expect(text.startsWith('# INVENTED data')).toBe(true)
  })

  it('gives the same files again, byte for byte', () => {
    const again = makeDemoFiles(requests, 400)
    expect(again).toEqual(files)
  })

  it('gives other files at another temperature', () => {
    const warmer = makeDemoFiles(requests, 450)
    expect(warmer[0].distributions[0].text).not.toBe(files[0].distributions[0].text)
  })

  it('states fewer independent samples than counts, since frames of one chain are alike', () => {
    for (const { distributions } of files) {
      for (const { text, settings } of distributions) {
        const { histogram } = readHistogram(text, settings)
        const total = histogram.weights.reduce((sum, count) => sum + count, 0)
        expect(histogram.independentSamples).toBeLessThan(total)
        expect(histogram.independentSamples).toBeGreaterThan(500)
      }
    }
  })

  it('finds the inefficiency that the renewal of a unit implies, 4, for bonds, angles, turns and pairs', () => {
    const [{ terms }] = requests
    const [{ distributions, joints }] = files
    const own = [
      ['B', 'B'],
      ['B', 'E'],
      ['E', 'H'],
      ['B', 'B', 'B'],
      ['B', 'E', 'H'],
      ['B', 'B', 'B', 'B'],
    ].map((types) => {
      const { text, settings } = distributions[terms.indexOf(findTerm(terms, types))]
      return readHistogram(text, settings).histogram
    })
    const pairs = joints.map(({ text, settings }) => readJointHistogram(text, settings).histogram)
    for (const { weights, independentSamples } of [...own, ...pairs]) {
      const inefficiency = weights.reduce((sum, count) => sum + count, 0) / independentSamples!
      // 24 frames see a little less than 4; the scatter of 100 chains estimates it to some 10 %.
      expect(inefficiency).toBeGreaterThan(3)
      expect(inefficiency).toBeLessThan(4.6)
    }
  })

  it('measures the pair on the very samples of its two terms', () => {
    const { terms } = requests[0]
    files[0].joints.forEach(({ text, settings }, at) => {
      const { histogram } = readJointHistogram(text, settings)
      const ny = histogram.yEdges.length - 1
      const angle = findTerm(terms, [COUPLED_PAIR, SEPARABLE_PAIR][at].angle)
      const alone = files[0].distributions[terms.indexOf(angle)]
      const single = readHistogram(alone.text, alone.settings).histogram
      const summed = Array.from({ length: ny }, (_, y) =>
        histogram.weights.reduce((sum, count, index) => (index % ny === y ? sum + count : sum), 0),
      )
      expect(summed).toEqual([...single.weights])
    })
  })

  it('gives one pair that needs a joint potential and one that is separable', () => {
    const [coupled, separable] = files[0].joints.map(({ text, settings }) =>
      correlate(readJointHistogram(text, settings).histogram),
    )
    expect(coupled.verdict).toBe('joint')
    expect(coupled.mutualInformationCorrected).toBeGreaterThan(0.3)
    expect(separable.verdict).toBe('separable')
    expect(separable.pValue).toBeGreaterThan(0.05)
  })

  it('leaves hardly any correlation to the finer mapping, in every bond with every angle it is a side of', () => {
    const { terms } = requests[1]
    const angles = terms.filter(({ kind }) => kind === 'angle')
    // B–E–S1 and the like have two sides that differ; B–B–B has one.
    const sides = angles.flatMap(
      ({ types: [a, b, c] }) => new Set([[a, b].sort().join(), [b, c].sort().join()]).size,
    )
    expect(files[1].joints).toHaveLength(sides.reduce((sum, count) => sum + count, 0))
    const correlations = files[1].joints.map(({ text, settings }) =>
      correlate(readJointHistogram(text, settings).histogram),
    )
    expect(correlations.map(({ verdict }) => verdict)).toEqual(correlations.map(() => 'separable'))
  })
})
