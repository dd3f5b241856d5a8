import { createHash } from 'node:crypto'
import { describe, expect, it } from 'vitest'
import { writeLayoutFile } from '@shared/documents'
import { type LayoutChanges, layoutWith } from '../../../support/layout-builder'
import { runCommand, withTextFile } from '../../../support/run-command'

const BOND = Array.from({ length: 41 }, (_, bin) => {
  const r = 0.3 + 0.005 * bin
  return `${r.toFixed(3)} ${(1e5 * r * r * Math.exp(-((r - 0.4) ** 2) / 0.0008)).toFixed(0)}`
}).join('\n')
const INVERT = ['--kind', 'bond', '--temperature', '300', '--unit', 'nm', '--columns', 'centre,count']

const inverted = (layoutText: string, ...words: string[]) =>
  withTextFile(BOND, (path) =>
    withTextFile(layoutText, (layout) => runCommand('invert', path, ...INVERT, '--layout', layout, ...words)),
  )
const file = (changes: LayoutChanges) => writeLayoutFile(layoutWith(changes), 'Mine')

describe('beadwright invert --layout', () => {
  it('writes the table as the layout says, in its units', async () => {
    const { status, printed } = await inverted(
      file({
        separator: 'comma',
        bond: { coordinateUnit: 'angstrom', rows: 5, low: 3, high: 5 },
        columns: ['row', 'coordinate', 'energy'],
        header: '{{kind}} {{rows}} {{coordinateUnit}}',
      }),
    )
    expect(status).toBe(0)
    const [head, ...rows] = printed.trimEnd().split('\n')
    expect(head).toBe('bond 5 angstrom')
    expect(rows.map((row) => row.split(',').slice(0, 2).map(Number))).toEqual([
      [1, 3],
      [2, 3.5],
      [3, 4],
      [4, 4.5],
      [5, 5],
    ])
  })

  it('states the checksum of its own rows in its comment lines', async () => {
    const { printed } = await inverted(file({ numbers: { energy: { style: 'scientific', digits: 4 } } }))
    const rows = printed.split('\n').filter((line) => line !== '' && !line.startsWith('#'))
    const stated = /^# rows: SHA-256 ([0-9a-f]{64})$/m.exec(printed)?.[1]
    expect(
      createHash('sha256')
        .update(`${rows.join('\n')}\n`)
        .digest('hex'),
    ).toBe(stated)
  })

  it.each([
    ['FILE_NOT_JSON', 'no json'],
    ['FILE_FORMAT_UNKNOWN', '{"format":"other"}'],
    ['FILE_VERSION_UNKNOWN', '{"format":"beadwright layout","version":9}'],
    ['FIELD_UNKNOWN', file({}).replace('"firstRow"', '"firstrow"')],
    ['FIELD_INVALID', file({ separator: 'pipes' as never })],
    ['TEMPLATE_FIELD_UNKNOWN', file({ header: '{{temprature}}' })],
    ['LAYOUT_INVALID', file({ bond: { low: -3 } })],
  ])('names what is wrong with the layout: %s', async (code, text) => {
    const { status, notes } = await inverted(text)
    expect(status).toBe(2)
    expect(notes).toContain(`(${code})`)
  })

  it('does not print its own JSON beside a layout', async () => {
    expect((await inverted(file({}), '--json')).status).toBe(2)
  })
})
