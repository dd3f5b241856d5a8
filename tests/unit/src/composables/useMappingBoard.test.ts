import { describe, expect, it } from 'vitest'
import { ref } from 'vue'
import { parseRepeatUnit } from '@shared/chemistry'
import { useMappingBoard } from '@/composables/useMappingBoard'
import { useMappingConsequences } from '@/composables/useMappingConsequences'

const unit = await parseRepeatUnit('*CC(*)OC(C)=O')
const open = () => useMappingBoard({ version: 1, beads: [] })
const atomsOf = (board: ReturnType<typeof open>) =>
  board.document.value.beads.map(({ atoms }) => atoms.map(({ atom }) => atom))

describe('useMappingBoard', () => {
  it('makes a first bead when an atom is painted without one', () => {
    const board = open()
    board.begin(0)
    board.end()
    expect(atomsOf(board)).toEqual([[0]])
    board.history.undo()
    expect(board.document.value.beads).toEqual([])
  })

  it('paints a stroke as one step', () => {
    const board = open()
    board.begin(2)
    for (const atom of [3, 4, 5]) board.paintOver(atom)
    expect(atomsOf(board)).toEqual([[2, 3, 4, 5]])
    board.end()
    board.history.undo()
    expect(board.document.value.beads).toEqual([])
  })

  it('takes away along a stroke that begins on an atom of the bead in hand', () => {
    const board = open()
    board.begin(0)
    board.paintOver(1)
    board.end()
    board.begin(0)
    board.paintOver(1)
    board.end()
    expect(atomsOf(board)).toEqual([[]])
  })

  it('moves atoms to the bead in hand, and terms follow live', () => {
    const board = open()
    board.begin(0)
    for (const atom of [1, 2, 3, 4, 5]) board.paintOver(atom)
    board.end()
    board.add()
    for (const atom of [2, 3, 4, 5]) {
      board.begin(atom)
      board.end()
    }
    expect(atomsOf(board)).toEqual([
      [0, 1],
      [2, 3, 4, 5],
    ])
    const { terms, problems } = useMappingConsequences(ref(unit), board.document, () => false)
    expect(terms.value.terms).toHaveLength(7)
    expect(problems.value).toEqual([])
  })

  it('never gives a new bead the id of one that stood before', () => {
    const board = open()
    board.add()
    const first = board.document.value.beads[0].id
    board.remove(first)
    board.add()
    expect(board.document.value.beads[0].id).not.toBe(first)
  })
})
