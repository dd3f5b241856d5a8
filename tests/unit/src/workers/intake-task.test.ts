import { describe, expect, it, vi } from 'vitest'
import { MAX_FILE_BYTES } from '@shared/intake'
import { forgetFile, lineOf, readFile, readText } from '@/workers/intake-task'

const bond = '# r count\n0.30 12\n0.31 15\n0.32 18\n0.33 14\n0.34 9\n'

describe('readText', () => {
  it('guesses the settings of a distribution and reads it with them', () => {
    const { single, joint, badLine } = readText(bond, { kinds: ['bond'], settings: null })
    expect(single?.settings).toMatchObject({ layout: 'centre', value: 'count', unit: 'nm' })
    expect(single?.histogram?.weights).toEqual(Float64Array.of(12, 15, 18, 14, 9))
    expect([joint, badLine]).toEqual([null, null])
  })

  it('takes given settings over its own guess', () => {
    const guessed = readText(bond, { kinds: ['bond'], settings: null }).single!.settings!
    const { single } = readText(bond, { kinds: ['bond'], settings: { ...guessed, unit: 'angstrom' } })
    expect(single?.histogram?.edges[0]).toBeCloseTo(0.0295, 12)
    expect(single?.reasons).toEqual([])
  })

  it('answers a refusal with the line that is to blame', () => {
    const { single, badLine } = readText(bond.replace('18', 'abc'), { kinds: ['bond'], settings: null })
    expect(single?.error).toMatchObject({ code: 'TEXT_NOT_A_NUMBER', place: { line: 4 } })
    expect(badLine).toBe('0.32 abc')
  })

  it('reads two kinds as a joint distribution', () => {
    const grid = [0, 1, 2, 3, 4].flatMap((i) =>
      [0, 1, 2, 3, 4].map((j) => `${0.3 + i / 100} ${90 + 4 * j} 7`),
    )
    const { single, joint } = readText(grid.join('\n'), { kinds: ['bond', 'angle'], settings: null })
    expect(single).toBeNull()
    expect(joint?.settings).toMatchObject({ layout: 'grid', units: ['nm', 'degree'] })
    expect(joint?.histogram?.weights).toHaveLength(25)
  })
})

describe('lineOf', () => {
  it('counts from 1, keeps the last line without an end and knows no line beyond it', () => {
    const lines = [1, 2, 3, 4].map((line) => lineOf('a\nb \r\nc', line))
    expect(lines).toEqual(['a', 'b', 'c', null])
  })

  it('cuts a line that is very long', () => {
    expect(lineOf('x'.repeat(10_000), 1)).toHaveLength(400)
  })
})

describe('readFile', () => {
  const task = { kinds: ['bond'], settings: null } as const

  it('reads the text of a file once for all its settings, and again when it was forgotten', async () => {
    const file = new Blob([bond])
    const text = vi.spyOn(file, 'text')
    await readFile(1, file, task)
    await readFile(1, file, task)
    expect(text).toHaveBeenCalledOnce()
    forgetFile(1)
    await readFile(1, file, task)
    expect(text).toHaveBeenCalledTimes(2)
    forgetFile(1)
  })

  it('refuses a file beyond the limit without reading it', async () => {
    const file = new Blob([bond])
    Object.defineProperty(file, 'size', { value: MAX_FILE_BYTES + 1 })
    const text = vi.spyOn(file, 'text')
    expect((await readFile(2, file, task)).single?.error?.code).toBe('FILE_TOO_LARGE')
    expect(text).not.toHaveBeenCalled()
  })
})
