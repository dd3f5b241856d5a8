import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { drawCurveFigure, drawSilhouette, drawTermGlyph, makeDataSheet } from '@shared/data-sheet'
import { curveLine } from '@shared/data-sheet/figure-lines'
import { MAP_INKS } from '@shared/data-sheet/map-inks'
import { niceTicks } from '@shared/data-sheet/nice-ticks'
import { buildSheetSource } from '../../../support/data-sheet-builder'
import { DOCUMENT, SMILES } from '../../../support/job-builder'

const bead = (name: string) => ({ name, colour: 0 })

describe('drawings of a data sheet', () => {
  it('have the inks of the maps on screen', () => {
    const tokens = readFileSync('src/assets/tokens.css', 'utf8')
    const light = tokens.split('\n').find((line) => line.startsWith(':root,[data-theme=light]'))!
    const stops = MAP_INKS.map((_, stop) => new RegExp(`--seq-${stop}:(#[0-9A-F]{6})`).exec(light)?.[1])
    expect(stops).toEqual(MAP_INKS)
  })

  it('cut a line where it leaves the limit and take it up where it comes back', () => {
    const points = [
      [0, 0],
      [1, 2],
      [2, 2],
      [3, 0],
    ] as const
    expect(curveLine(points, { limit: 1 })).toBe('M0 0L0.5 1M2.5 1L3 0')
  })

  it('put ticks at values that divide a turn', () => {
    expect(niceTicks(-180, 180, 7, true).values).toEqual([-180, -120, -60, 0, 60, 120, 180])
    expect(niceTicks(0.21, 0.39, 6)).toEqual({ values: expect.any(Array) as number[], decimals: 2 })
  })

  it('are well-formed without a number that is none', async () => {
    const { tables } = makeDataSheet(await buildSheetSource({ smiles: SMILES, document: DOCUMENT }))
    const drawn = tables.flatMap(({ curve, name, silhouette, beads }) => [
      drawCurveFigure(curve!, name),
      drawSilhouette(silhouette, false, name),
      drawTermGlyph(beads, name),
    ])
    for (const svg of drawn) {
      expect(svg).toMatch(/^<svg [^>]*viewBox="0 0 /)
      expect(svg).not.toMatch(/NaN|Infinity|undefined/)
    }
  })

  it('thicken the bond that takes part in a joint table, in either direction', () => {
    const angle = ['B', 'E', 'H'].map(bead)
    const lines = (rows: (typeof angle)[]) => drawTermGlyph(rows, 'x').split('stroke-width="3.6"').length - 1
    expect(lines([angle])).toBe(0)
    expect(lines([['E', 'H'].map(bead), angle])).toBe(1)
    expect(lines([['H', 'E'].map(bead), angle])).toBe(1)
    expect(lines([['B', 'H'].map(bead), angle])).toBe(0)
  })
})
