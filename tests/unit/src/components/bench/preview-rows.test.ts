import { describe, expect, it } from 'vitest'
import { previewRows } from '@/components/bench/preview-rows'

const coordinates = Array.from({ length: 181 }, (_, row) => row)

describe('previewRows', () => {
  it('shows both ends and five rows about the reading', () => {
    expect(previewRows(coordinates, 130.8)).toEqual([0, 129, 130, 131, 132, 133, 180])
  })

  it('names no row twice at an end, also when the reading lies beyond it', () => {
    expect(previewRows(coordinates, -20)).toEqual([0, 1, 2, 180])
    expect(previewRows(coordinates, 400)).toEqual([0, 178, 179, 180])
  })

  it('shows the middle without a reading', () => {
    expect(previewRows(coordinates, null)).toContain(90)
  })

  it('shows a short table whole', () => {
    expect(previewRows([0, 1, 2], 1)).toEqual([0, 1, 2])
  })
})
