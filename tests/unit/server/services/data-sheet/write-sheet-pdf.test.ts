import { readFileSync } from 'node:fs'
import { beforeAll, describe, expect, it } from 'vitest'
import type { DataSheet } from '@shared/contracts/data-sheet'
import { makeDataSheet } from '@shared/data-sheet'
import { coveredCodePoints } from '../../../../../server/services/data-sheet/font-coverage'
import { leanFont } from '../../../../../server/services/data-sheet/lean-font'
import { sheetDocument } from '../../../../../server/services/data-sheet/sheet-document'
import { LEAN_FONTS, printable, SHEET_FONTS } from '../../../../../server/services/data-sheet/sheet-fonts'
import { writeSheetPdf } from '../../../../../server/services/data-sheet/write-sheet-pdf'
import { buildSheetSource } from '../../../../support/data-sheet-builder'
import { DOCUMENT, SMILES } from '../../../../support/job-builder'

/** All text of a document definition, pieces of one line joined; drawings as their text elements. */
function textIn(node: unknown): string {
  if (typeof node === 'string') return node
  if (Array.isArray(node)) return node.map(textIn).join('')
  if (typeof node !== 'object' || node === null) return ''
  const parts = node as Record<string, unknown>
  if (typeof parts['svg'] === 'string') return parts['svg'].replace(/<[^>]*>/g, ' ')
  const { text, stack, columns, table } = parts as Record<string, unknown> & { table?: { body: unknown } }
  const each = (children: unknown): string =>
    Array.isArray(children) ? children.map((child) => `${textIn(child)}\n`).join('') : ''
  return textIn(text) + each(stack) + each(columns) + (table ? each((table.body as unknown[][]).flat()) : '')
}

const bodyText = (sheet: DataSheet): string => textIn({ stack: sheetDocument(sheet).content })

/** Milliseconds that the first PDF may take while the fonts and the writer are loaded. */
const LOADING = 60_000

let sheet: DataSheet

beforeAll(async () => {
  const settingsOf = ({ name }: { name: string }) => (name === 'A–A' ? { form: 'harmonic' } : {})
  sheet = makeDataSheet(await buildSheetSource({ smiles: SMILES, document: DOCUMENT, settingsOf }))
})

describe('the data sheet as a PDF', () => {
  it(
    'is the same to the byte for the same release, and another for another',
    async () => {
      const [first, second, other] = [
        await writeSheetPdf(sheet),
        await writeSheetPdf(structuredClone(sheet)),
        await writeSheetPdf({ ...sheet, releasedAt: '2026-06-13T10:00:00.000Z' }),
      ]
      expect(first.equals(second)).toBe(true)
      expect(first.equals(other)).toBe(false)
    },
    LOADING,
  )

  it(
    'has a title, an author, its date, A4 pages and every font embedded',
    async () => {
      const pdf = (await writeSheetPdf(sheet)).toString('latin1')
      expect(pdf.startsWith('%PDF-1.7')).toBe(true)
      expect(pdf).toContain('(Hand-over 2: Melt tables. Data sheet)')
      expect(pdf).toContain('(Adhesives)')
      expect(pdf).toContain('(D:20260612100000Z)')
      const pages = pdf.match(/\/Type \/Page\n/g)?.length ?? 0
      expect(pages).toBeGreaterThanOrEqual(4)
      expect(pages).toBeLessThanOrEqual(8)
      const fonts = new Set([...pdf.matchAll(/\/FontName \/[A-Z]{6}\+([\w-]+)/g)].map(([, name]) => name))
      expect([...fonts].sort()).toEqual([
        'FiraMono-Regular',
        'FiraSans-Italic',
        'FiraSans-Light',
        'FiraSans-Medium',
        'FiraSans-Regular',
      ])
      expect(pdf.match(/\/FontFile2 /g)).toHaveLength(fonts.size)
    },
    LOADING,
  )

  it('states every number of the sheet', () => {
    const text = bodyText(sheet)
    for (const { name, path, sha256, numbers, caption } of sheet.tables) {
      expect(text).toContain(name)
      expect(text.replaceAll('\u200b', '')).toContain(path)
      expect(text).toContain(sha256.slice(0, 8))
      expect(text).toContain(numbers.input.sha256.slice(0, 8))
      expect(text).toContain(caption)
    }
    for (const { text: form } of sheet.forms) expect(text).toContain(form)
    for (const { mass } of sheet.beads.rows) expect(text).toContain(mass)
    for (const line of [...sheet.methods, ...sheet.carry, ...sheet.beforeYouRun]) {
      expect(text).toContain(line.text)
    }
    expect(text).toContain(sheet.tablesSha256)
    expect(text).toContain('Invented data')
  })

  it('has a glyph for every sign it prints, whatever names and notes hold', () => {
    const covered = coveredCodePoints(readFileSync(SHEET_FONTS['Fira Sans'].normal))
    const odd = 'θ ψ λ ½ ± − × ≤ ≈ ∞ → ² ⁻⁵ ₂ ⟨R⟩ ✓ 聚 e\u0301 ① \u2009 “Å”'
    const text = bodyText({ ...sheet, notes: odd, title: odd, group: odd })
    expect(
      Array.from(text).filter((sign) => !'\n\u200b'.includes(sign) && !covered.has(sign.codePointAt(0)!)),
    ).toEqual([])
    expect(text).toContain('Signs that the fonts of this page lack')
    expect(bodyText(sheet)).not.toContain('Signs that the fonts of this page lack')
    expect(printable(odd)).toBe('θ ψ λ ½ ± − × ≤ ≈ ∞ → ² ⁻⁵ ₂ ?R? ? ? é 1 \u00a0 “Å”')
  })

  it('says on each page which hand-over it is, that data are invented, and which page of how many', () => {
    const foot = sheetDocument(sheet).footer as (page: number, pages: number) => unknown
    const text = textIn(foot(2, 5))
    expect(text).toContain('Hand-over 2')
    expect(text).toContain('INVENTED DATA')
    expect(text).toContain(sheet.tablesSha256.slice(0, 16))
    expect(text).toContain('2 of 5')
  })
})

describe('leanFont', () => {
  it('leaves tables out and keeps every other to the byte', () => {
    const [{ path }] = LEAN_FONTS
    const font = readFileSync(path)
    const lean = leanFont(font, ['GPOS'])
    expect(lean.includes('GPOS')).toBe(false)
    expect(lean.length).toBeLessThan(font.length)
    expect(coveredCodePoints(lean)).toEqual(coveredCodePoints(font))
  })

  it('unpacks a packed font', () => {
    const { path } = LEAN_FONTS.find(({ path: each }) => each.endsWith('.woff'))!
    const covered = coveredCodePoints(leanFont(readFileSync(path)))
    for (const sign of 'azAZ09–−…#') expect(covered.has(sign.codePointAt(0)!)).toBe(true)
    expect(covered.has('聚'.codePointAt(0)!)).toBe(false)
  })
})
